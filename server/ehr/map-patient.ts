import type { Sex } from '#shared/domain/kidney/types'
import type { RecordPatient, RecordWarning } from '#shared/domain/record/types'
import { patientResource, type FhirJson, type PatientResource } from './resources'

const birthDateForm = /^\d{4}(-\d{2}(-\d{2})?)?$/

/** A Patient resource as a person; null where it is not one. */
export function mapPatient(json: FhirJson, recordNumberSystem: string | null): RecordPatient | null {
  const parsed = patientResource.safeParse(json)
  if (!parsed.success) return null
  const patient = parsed.data
  const name = bestName(patient)
  const given = name?.given.join(' ').trim() || null
  const family = name?.family?.trim() || null
  return {
    ehrId: patient.id,
    recordNumber: recordNumberOf(patient, recordNumberSystem),
    familyName: family,
    givenName: given,
    displayName: [given, family].filter(Boolean).join(' ') || name?.text?.trim() || 'Name not recorded',
    birthDate: patient.birthDate && birthDateForm.test(patient.birthDate) ? patient.birthDate : null,
    sex: sexOf(patient.gender),
    email: contact(patient, 'email'),
    phone: contact(patient, 'phone'),
    language: languageOf(patient),
    deceased: patient.deceasedBoolean === true || patient.deceasedDateTime !== undefined,
    active: patient.active !== false,
    replacedBy: replacedBy(patient),
  }
}

/** Every record number a Patient carries, for checking a match on our side. */
export function recordNumbers(json: FhirJson, recordNumberSystem: string | null): string[] {
  const parsed = patientResource.safeParse(json)
  return parsed.success ? numbersOf(parsed.data, recordNumberSystem) : []
}

/** Every family and given name a Patient carries, lower case without accents, for checking a match on our side. */
export function nameWords(json: FhirJson): { family: string[], given: string[], all: string[] } {
  const parsed = patientResource.safeParse(json)
  const names = parsed.success ? parsed.data.name : []
  const family = names.flatMap(name => words(name.family))
  const given = names.flatMap(name => name.given.flatMap(words))
  return { family, given, all: [...family, ...given, ...names.flatMap(name => words(name.text))] }
}

/** Words of a name, lower case, accents folded (R4 Search, "string" ignores both). */
export function words(text: string | undefined): string[] {
  return (text ?? '').normalize('NFD').replace(/\p{M}/gu, '').toLowerCase().split(/[\s,.'’-]+/u).filter(word => word !== '')
}

/** What a person must know before going on with this record. */
export function patientWarnings(patient: RecordPatient): RecordWarning[] {
  const warnings: RecordWarning[] = []
  if (patient.deceased) warnings.push({ id: 'deceased', text: 'The record says this person has died' })
  if (!patient.active) warnings.push({ id: 'inactive', text: 'This record is marked as no longer in use' })
  if (patient.replacedBy) warnings.push({ id: 'replaced', text: 'This record was replaced by another; use that one' })
  if (patient.birthDate === null || patient.birthDate.length < 10) {
    warnings.push({ id: 'birth-date-partial', text: 'The record does not hold a full date of birth' })
  }
  return warnings
}

const nameRank = ['official', 'usual', undefined]

function bestName(patient: PatientResource) {
  const current = patient.name.filter(({ use, period }) => use !== 'old' && period?.end === undefined)
  const rank = (use: string | undefined) => nameRank.includes(use) ? nameRank.indexOf(use) : nameRank.length
  return [...(current.length > 0 ? current : patient.name)].sort((a, b) => rank(a.use) - rank(b.use))[0]
}

function numbersOf(patient: PatientResource, system: string | null): string[] {
  return patient.identifier
    .filter(identifier => system === null || identifier.system === system)
    .flatMap(({ value }) => value?.trim() || [])
}

function recordNumberOf(patient: PatientResource, system: string | null): string | null {
  const current = { ...patient, identifier: patient.identifier.filter(({ use }) => use !== 'old') }
  return numbersOf(current, system)[0] ?? numbersOf(patient, system)[0] ?? null
}

function sexOf(gender: string | undefined): Sex {
  return gender === 'female' || gender === 'male' || gender === 'other' ? gender : 'unknown'
}

function contact(patient: PatientResource, system: 'email' | 'phone'): string | null {
  const found = patient.telecom
    .filter(entry => entry.system === system && entry.value?.trim() && entry.use !== 'old' && entry.period?.end === undefined)
    .sort((a, b) => (a.rank ?? 99) - (b.rank ?? 99))[0]
  return found?.value?.trim().replace(/^(mailto|tel):/i, '') ?? null
}

function languageOf(patient: PatientResource): string | null {
  const chosen = patient.communication.find(({ preferred }) => preferred) ?? patient.communication[0]
  return chosen?.language.coding.find(({ code }) => code)?.code ?? null
}

function replacedBy(patient: PatientResource): string | null {
  const link = patient.link.find(({ type }) => type === 'replaced-by')
  return link ? link.other.reference?.split('/').at(-1) ?? 'another record' : null
}
