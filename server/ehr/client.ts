import { randomUUID } from 'node:crypto'
import { Client, type RequestOptions, type SearchParams } from 'fhir-kit-client'
import type { BreakerState } from '#shared/domain/record/types'
import { createBreaker, type Verdict } from './breaker'
import { EhrUnavailable } from './errors'
import { readPages, type SearchAnswer } from './paging'
import { capabilityStatement, fhirJson, type FhirJson } from './resources'
import { withRetries } from './retry'
import type { EhrSettings } from './settings'
import { createTokenSource } from './token'
import { exchange, type HttpAnswer, type HttpAsk } from './transport'

/** What the server says it can do. Null where it would not say: everything is then worth a try. */
export interface Capabilities {
  fhirVersion: string | null
  software: string | null
  types: Map<string, { params: Set<string>, includes: Set<string> }>
}

/** A bounded stretch of reading: one deadline over all its calls. */
export interface EhrSession {
  read: (resourceType: string, id: string) => Promise<FhirJson>
  /**
   * Searches and follows every page. Several forms of one question are tried in order while the server does not
   * understand them; the first is asked with `handling=strict`.
   */
  search: (resourceType: string, forms: readonly SearchParams[], options?: { post?: boolean, maxPages?: number }) => Promise<SearchAnswer>
  /** What the server offers, remembered for a day. */
  capabilities: (options?: { fresh?: boolean }) => Promise<Capabilities | null>
}

export interface EhrClient {
  readonly settings: EhrSettings
  now: () => number
  breaker: () => BreakerState
  /** Whether searching by POST has been seen to work, or been refused. */
  readonly postSearch: { state: 'untried' | 'works' | 'refused' }
  session: (signal?: AbortSignal) => EhrSession
}

export interface EhrClientParts {
  fetch?: typeof fetch
  /** Milliseconds since 1970. */
  now?: () => number
  random?: () => number
}

const capabilitiesLastMs = 24 * 3_600_000

/**
 * The one way to the hospital's FHIR server. Keep one per process: it holds the token and the breaker.
 *
 * The bearer token goes to the base URL's own origin and to the configured page origins, nowhere else.
 */
export function createEhrClient(settings: EhrSettings, parts: EhrClientParts = {}): EhrClient {
  const send = parts.fetch ?? fetch
  const now = parts.now ?? Date.now
  const random = parts.random ?? Math.random
  const { limits, baseUrl } = settings
  const base = new URL(`${baseUrl}/`)
  const trusted = new Set([base.origin, ...settings.pageOrigins])
  const breaker = createBreaker(limits, now, verdictOn)
  const tokens = settings.auth.kind === 'none'
    ? null
    : createTokenSource(settings.auth, baseUrl, ask => exchange(send, { ...ask, signal: AbortSignal.timeout(limits.requestMs) }, limits, now), now)
  let known: { capabilities: Capabilities, at: number } | null = null
  const postSearch: EhrClient['postSearch'] = { state: 'untried' }

  /** The address as one of ours, or the refusal to go there. */
  function ours(url: string): string {
    const target = URL.canParse(url, base.href) ? new URL(url, base.href) : null
    if (!target || !trusted.has(target.origin) || target.username !== '' || target.password !== '') {
      throw new EhrUnavailable('cut-short', 'The hospital record points to another server for the rest; it is not followed')
    }
    return target.href
  }

  async function once(ask: HttpAsk, requestMs: number): Promise<FhirJson> {
    const bounds = { ...limits, requestMs }
    const token = await tokens?.token()
    let answer = await exchange(send, withToken(ask, token), bounds, now)
    if (answer.status === 401 && tokens && token !== undefined) {
      tokens.forget(token)
      answer = await exchange(send, withToken(ask, await tokens.token()), bounds, now)
    }
    if (answer.status < 200 || answer.status > 299) throw errorOf(answer)
    const parsed = fhirJson.safeParse(answer.body)
    if (!parsed.success) throw new EhrUnavailable('unreadable', 'The hospital record sent an answer that is not FHIR', { status: answer.status })
    return parsed.data
  }

  function session(callerSignal?: AbortSignal): EhrSession {
    const deadline = now() + limits.readingMs
    const signal = AbortSignal.any([AbortSignal.timeout(limits.readingMs), ...(callerSignal ? [callerSignal] : [])])
    const fhir = new Client({ baseUrl })
    // The library sends the token wherever a link points and sets no limits; its requests go through ours instead.
    fhir.httpClient.request = (method: string, url: string, options: RequestOptions = {}, body?: unknown) => {
      const ask: HttpAsk = {
        method,
        url: ours(fhir.httpClient.expandUrl(url)),
        headers: { 'accept': 'application/fhir+json, application/json;q=0.9', 'x-request-id': randomUUID(), ...options.headers },
        signal,
        ...(typeof body === 'string' ? { body } : {}),
      }
      return breaker.run(() => withRetries(budgetMs => once(ask, budgetMs), limits, { now, random }, signal, deadline))
    }

    async function firstPage(resourceType: string, searchParams: SearchParams, strict: boolean, post: boolean): Promise<FhirJson> {
      const headers: Record<string, string> = strict ? { prefer: 'handling=strict' } : {}
      if (!post || postSearch.state === 'refused') return fhir.search({ resourceType, searchParams, options: { headers } })
      try {
        return await fhir.search({ resourceType, searchParams, options: { headers, postSearch: true } })
      }
      catch (error) {
        if (!(error instanceof EhrUnavailable) || !['not-offered', 'not-found', 'refused'].includes(error.problem)) throw error
        const answer = await fhir.search({ resourceType, searchParams, options: { headers } })
        postSearch.state = 'refused'
        return answer
      }
    }

    return {
      read: (resourceType, id) => fhir.read({ resourceType, id: encodeURIComponent(id) }),
      async search(resourceType, forms, options = {}) {
        let refusal: unknown = null
        for (const [index, form] of forms.entries()) {
          try {
            return await readPages({
              resourceType,
              first: () => firstPage(resourceType, form, index === 0, options.post ?? false),
              // Kept as sent: a page link is opaque. Only its destination is checked.
              next: url => fhir.nextPage({ bundle: { resourceType: 'Bundle', link: [{ relation: 'next', url: ours(url) }] } }),
              address: ours,
              maxPages: options.maxPages ?? limits.maxPages,
            })
          }
          catch (error) {
            if (!(error instanceof EhrUnavailable) || error.problem !== 'not-offered') throw error
            refusal = error
          }
        }
        throw refusal
      },
      async capabilities(options = {}) {
        if (known && !options.fresh && now() - known.at < capabilitiesLastMs) return known.capabilities
        const capabilities = capabilitiesOf(await fhir.capabilityStatement())
        if (capabilities) known = { capabilities, at: now() }
        return capabilities
      },
    }
  }

  return { settings, now, breaker: breaker.state, postSearch, session }
}

function withToken(ask: HttpAsk, token: string | undefined): HttpAsk {
  return token === undefined ? ask : { ...ask, headers: { ...ask.headers, authorization: `Bearer ${token}` } }
}

/** What an HTTP status means for the reader (R4 RESTful API, "HTTP Status Codes"). */
function errorOf({ status, retryAfterMs, body }: HttpAnswer): EhrUnavailable {
  const details = { status, retryAfterMs, inFhir: fhirJson.safeParse(body).success }
  if (status === 401) return new EhrUnavailable('not-connected', 'The hospital record did not accept this system\'s sign-in', details)
  if (status === 403) return new EhrUnavailable('refused', 'The hospital record refused access to this part', details)
  if (status === 404 || status === 410) return new EhrUnavailable('not-found', 'The hospital record has nothing at this place', details)
  if (status === 429 || status === 503) return new EhrUnavailable('busy', 'The hospital record is too busy to answer', details)
  if (status === 501 || [400, 405, 406, 415, 422].includes(status)) {
    return new EhrUnavailable('not-offered', 'The hospital record does not understand this question', details)
  }
  if (status >= 300 && status < 400) {
    return new EhrUnavailable('not-connected', 'The hospital record sends us to another address; it is not followed', details)
  }
  return new EhrUnavailable('unreachable', 'The hospital record reports a fault of its own', details)
}

function verdictOn(error: unknown): Verdict {
  if (!(error instanceof EhrUnavailable)) return 'neither'
  if (error.problem === 'cut-short') return 'neither'
  return ['unreachable', 'busy', 'unreadable', 'not-connected'].includes(error.problem) ? 'failure' : 'answer'
}

function capabilitiesOf(json: FhirJson): Capabilities | null {
  const parsed = capabilityStatement.safeParse(json)
  if (!parsed.success) return null
  const { fhirVersion, software, rest } = parsed.data
  const server = rest.filter(part => part.mode !== 'client')
  return {
    fhirVersion: fhirVersion ?? null,
    software: software?.name ? [software.name, software.version].filter(Boolean).join(' ') : null,
    types: new Map(server.flatMap(part => part.resource).map(({ type, searchParam, searchInclude }) => [type, {
      params: new Set(searchParam.map(({ name }) => name)), includes: new Set(searchInclude),
    }])),
  }
}

