// Search results in pages, behind random tokens that say nothing about what follows.
import { randomBytes } from 'node:crypto'

export class Pages {
  held = new Map()

  constructor(cap) {
    this.cap = cap
  }

  /** The first page of a search. */
  first({ rows, base, self, asked, quirks, type }) {
    const wanted = quirks.smallPages ? Number(quirks.smallPages) : Math.min(asked ?? this.cap, this.cap)
    return this.page({ rows, offset: 0, size: Math.max(1, wanted), base, self, type, total: rows.length }, quirks)
  }

  /** The page behind a token; null where the token is unknown or has expired. */
  next(token, quirks) {
    const state = this.held.get(token)
    if (!state) return null
    if (quirks.expirePages) {
      quirks.expirePages -= 1
      this.held.delete(token)
      return null
    }
    return this.page(state, quirks)
  }

  page(state, quirks) {
    const { rows, offset, size, base, self, type, total } = state
    const empty = Boolean(quirks.emptyPages) && !state.wasEmpty && offset > 0
    const shown = empty ? [] : rows.slice(offset, offset + size)
    // A row added meanwhile pushes the last one of this page onto the next.
    const following = empty ? offset : offset + size - (quirks.repeatRows && size > 1 ? 1 : 0)
    const links = [{ relation: 'self', url: self }]
    if (following < rows.length) links.push({ relation: 'next', url: this.link({ ...state, offset: following, wasEmpty: empty }, base, quirks) })
    const entry = shown.map(resource => ({ fullUrl: `${base}/${resource.resourceType}/${resource.id}`, resource: spoil(resource, quirks), search: { mode: 'match' } }))
    if (quirks.outcomeEntry) entry.push(remark('information', 'informational'))
    if (quirks.incompleteEntry) entry.push(remark('warning', 'incomplete'))
    const bundle = { resourceType: 'Bundle', id: randomBytes(8).toString('hex'), type: 'searchset', link: links }
    if (!quirks.noTotal) bundle.total = total
    if (entry.length > 0) bundle.entry = entry
    return { bundle, type }
  }

  link(state, base, quirks) {
    if (quirks.loopNext && state.token) return `${base}?_page=${state.token}`
    const token = randomBytes(18).toString('base64url')
    this.held.set(token, { ...state, token })
    if (quirks.foreignNext) return `${quirks.foreignNext === true ? 'http://127.0.0.2:9' : quirks.foreignNext}/?_page=${token}`
    return quirks.relativeNext ? `?_page=${token}` : `${base}?_page=${token}`
  }
}

function remark(severity, code) {
  return { resource: { resourceType: 'OperationOutcome', issue: [{ severity, code }] }, search: { mode: 'outcome' } }
}

function spoil(resource, quirks) {
  const row = structuredClone(resource)
  if (quirks.numberAsString && row.valueQuantity) row.valueQuantity.value = String(row.valueQuantity.value)
  if (quirks.unknownExtensions) row.extension = [{ url: 'https://northshore.example/fhir/unknown', valueString: 'x' }]
  return row
}
