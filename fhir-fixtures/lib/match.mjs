// R4 search: what each parameter means for each type. Written from the specification, apart from the product's reader.

const tokens = value => splitEscaped(value, ',').map((item) => {
  const parts = splitEscaped(item, '|')
  return parts.length > 1 ? { system: unescape(parts[0]), code: unescape(parts.slice(1).join('|')) } : { code: unescape(item) }
})

const strings = value => splitEscaped(value, ',').map(unescape)

function splitEscaped(value, separator) {
  const parts = ['']
  for (let index = 0; index < value.length; index += 1) {
    if (value[index] === '\\' && index + 1 < value.length) {
      parts[parts.length - 1] += value[index] + value[index + 1]
      index += 1
    }
    else if (value[index] === separator) parts.push('')
    else parts[parts.length - 1] += value[index]
  }
  return parts
}

const unescape = value => value.replace(/\\(.)/g, '$1')

const codings = concept => concept?.coding ?? []
const hasToken = (wanted, found) => wanted.some(({ system, code }) =>
  found.some(coding => (code === '' || coding.code === code) && (system === undefined || (coding.system ?? '') === system)))

const token = pick => (resource, value) => hasToken(tokens(value), pick(resource))
const concept = pick => token(resource => [pick(resource) ?? []].flat().flatMap(codings))

const folded = text => text.normalize('NFD').replace(/\p{M}/gu, '').toLowerCase()
const nameParts = name => [name.family, ...(name.given ?? []), name.text].filter(Boolean)
const beginsWith = pick => (resource, value) => strings(value).some(wanted =>
  pick(resource).some(text => [text, ...text.split(/\s+/)].some(part => folded(part).startsWith(folded(wanted)))))

const reference = (pick, type) => (resource, value) => strings(value).some((wanted) => {
  const target = pick(resource)?.reference ?? ''
  return target === wanted || target === `${type}/${wanted}`
})

/** The first and last millisecond that a date text can mean; plain dates in UTC, this server's zone. */
function range(text) {
  if (/^\d{4}$/.test(text)) return [Date.UTC(+text, 0), Date.UTC(+text + 1, 0) - 1]
  if (/^\d{4}-\d{2}$/.test(text)) return [Date.UTC(+text.slice(0, 4), +text.slice(5) - 1), Date.UTC(+text.slice(0, 4), +text.slice(5)) - 1]
  if (/^\d{4}-\d{2}-\d{2}$/.test(text)) return [Date.parse(text), Date.parse(text) + 86_399_999]
  const at = Date.parse(text)
  return Number.isNaN(at) ? null : [at, at + 999]
}

function rangeOf(found) {
  if (found === undefined) return null
  if (typeof found === 'string') return range(found)
  const start = found.start === undefined ? [Number.NEGATIVE_INFINITY] : range(found.start)
  const end = found.end === undefined ? [0, Number.POSITIVE_INFINITY] : range(found.end)
  return start && end ? [start[0], end[1]] : null
}

const date = pick => (resource, value) => {
  const found = rangeOf(pick(resource))
  if (!found) return false
  const [, prefix = 'eq', text] = /^(eq|ne|lt|gt|le|ge|sa|eb)?(.+)$/.exec(value)
  const wanted = range(text)
  if (!wanted) throw new BadRequest(`Not a date: ${text}`)
  switch (prefix) {
    case 'eq': return found[0] >= wanted[0] && found[1] <= wanted[1]
    case 'ne': return found[0] < wanted[0] || found[1] > wanted[1]
    case 'gt': return found[1] > wanted[1]
    case 'lt': return found[0] < wanted[0]
    case 'ge': return found[1] >= wanted[0]
    case 'le': return found[0] <= wanted[1]
    case 'sa': return found[0] > wanted[1]
    default: return found[1] < wanted[0]
  }
}

const conceptText = pick => (resource, value) => [pick(resource)?.text, ...codings(pick(resource)).map(({ display }) => display)]
  .some(text => text !== undefined && folded(text).startsWith(folded(value)))

export class BadRequest extends Error {}

const effective = resource => resource.effectiveDateTime ?? resource.effectivePeriod ?? resource.effectiveInstant
const performed = resource => resource.performedDateTime ?? resource.performedPeriod
const subject = resource => resource.subject
const everyType = {
  _id: (resource, value) => strings(value).includes(resource.id),
  _lastUpdated: date(resource => resource.meta?.lastUpdated),
}
const ofSubject = {
  patient: reference(subject, 'Patient'),
  subject: reference(subject, 'Patient'),
}

/** Search parameters by type: name to test. */
export const parameters = {
  Patient: {
    ...everyType,
    identifier: token(({ identifier = [] }) => identifier.map(({ system, value }) => ({ system, code: value }))),
    family: beginsWith(({ name = [] }) => name.flatMap(({ family }) => family ?? [])),
    given: beginsWith(({ name = [] }) => name.flatMap(({ given }) => given ?? [])),
    name: beginsWith(({ name = [] }) => name.flatMap(nameParts)),
    birthdate: date(({ birthDate }) => birthDate),
    gender: token(({ gender }) => [{ code: gender }]),
    active: token(({ active }) => [{ code: String(active) }]),
  },
  Observation: {
    ...everyType,
    ...ofSubject,
    'code': concept(({ code }) => code),
    'code:text': conceptText(({ code }) => code),
    'component-code': concept(({ component = [] }) => component.map(({ code }) => code)),
    'category': concept(({ category }) => category),
    'status': token(({ status }) => [{ code: status }]),
    'date': date(effective),
  },
  Condition: {
    ...everyType,
    ...ofSubject,
    'code': concept(({ code }) => code),
    'category': concept(({ category }) => category),
    'clinical-status': concept(({ clinicalStatus }) => clinicalStatus),
    'verification-status': concept(({ verificationStatus }) => verificationStatus),
  },
  AllergyIntolerance: {
    ...everyType,
    'patient': reference(({ patient }) => patient, 'Patient'),
    'code': concept(({ code }) => code),
    'clinical-status': concept(({ clinicalStatus }) => clinicalStatus),
  },
  Procedure: {
    ...everyType,
    ...ofSubject,
    code: concept(({ code }) => code),
    status: token(({ status }) => [{ code: status }]),
    date: date(performed),
  },
  MedicationAdministration: {
    ...everyType,
    ...ofSubject,
    'code': concept(({ medicationCodeableConcept }) => medicationCodeableConcept),
    'status': token(({ status }) => [{ code: status }]),
    'effective-time': date(effective),
  },
  Medication: { ...everyType, code: concept(({ code }) => code) },
  Specimen: { ...everyType, ...ofSubject, type: concept(({ type }) => type) },
}

const sortKeys = {
  date: resource => rangeOf(effective(resource) ?? performed(resource))?.[0],
  _lastUpdated: resource => rangeOf(resource.meta?.lastUpdated)?.[0],
  _id: resource => resource.id,
  birthdate: resource => resource.birthDate,
  family: resource => resource.name?.[0]?.family,
}

/** Rows in the order of `_sort`; without a value for it a row goes last. */
export function sorted(rows, order) {
  const keys = order.split(',').map(name => name.startsWith('-') ? { key: sortKeys[name.slice(1)], sign: -1, name } : { key: sortKeys[name], sign: 1, name })
  const unknown = keys.find(({ key }) => !key)
  if (unknown) throw new BadRequest(`Cannot sort by ${unknown.name}`)
  return [...rows].sort((a, b) => {
    for (const { key, sign } of keys) {
      const [left, right] = [key(a), key(b)]
      if (left === right) continue
      if (left === undefined) return 1
      if (right === undefined) return -1
      return left < right ? -sign : sign
    }
    return 0
  })
}

/** Ways to look rows up beside filters. */
export const resultParameters = new Set(['_sort', '_count', '_total', '_format', '_summary'])
