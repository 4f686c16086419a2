import { randomUUID } from 'node:crypto'
import { importJWK, SignJWT } from 'jose'
import { z } from 'zod'
import { EhrUnavailable } from './errors'
import type { HttpAnswer, HttpAsk } from './transport'
import type { BackendServicesSettings } from './settings'

/** Renewed this long before it runs out. */
const renewBeforeMs = 30_000
/** What a server that does not say is taken to mean: the longest SMART Backend Services allows. */
const assumedLifeSeconds = 300

const tokenAnswer = z.looseObject({
  access_token: z.string().min(1),
  token_type: z.string().refine(type => type.toLowerCase() === 'bearer'),
  expires_in: z.coerce.number().positive().optional().catch(undefined),
})

const smartConfiguration = z.looseObject({ token_endpoint: z.string() })

export interface TokenSource {
  /** A token good for at least another moment; several callers share one request, which none of them can call off. */
  token: () => Promise<string>
  /** Forgets the token if it is still the one held, after the server refused it. */
  forget: (token: string) => void
}

/**
 * Tokens by SMART Backend Services (SMART App Launch 2.2.0, "Backend Services"): a signed assertion, good once and for
 * four minutes, exchanged for a bearer token.
 */
export function createTokenSource(
  auth: BackendServicesSettings, baseUrl: string, send: (ask: Omit<HttpAsk, 'signal'>) => Promise<HttpAnswer>, now: () => number,
): TokenSource {
  let held: { token: string, until: number } | null = null
  let pending: Promise<string> | null = null
  let endpoint: string | null = auth.tokenUrl

  async function tokenEndpoint(): Promise<string> {
    if (endpoint) return endpoint
    const answer = await send({ method: 'GET', url: `${baseUrl}/.well-known/smart-configuration`, headers: { accept: 'application/json' } })
    const parsed = smartConfiguration.safeParse(answer.body)
    const url = answer.status === 200 && parsed.success && URL.canParse(parsed.data.token_endpoint, baseUrl)
      ? new URL(parsed.data.token_endpoint, baseUrl)
      : null
    if (!url) throw new EhrUnavailable('not-connected', 'The hospital record does not say where to sign in; set the token address', { status: answer.status })
    if (url.protocol !== 'https:' && url.origin !== new URL(baseUrl).origin) {
      throw new EhrUnavailable('not-connected', 'The hospital record names an unprotected sign-in address', { status: answer.status })
    }
    endpoint = url.href
    return endpoint
  }

  async function ask(): Promise<string> {
    const url = await tokenEndpoint()
    const key = await importJWK({ ...auth.privateJwk, kty: String(auth.privateJwk.kty) }, auth.algorithm)
    const seconds = Math.floor(now() / 1000)
    const assertion = await new SignJWT({})
      .setProtectedHeader({ alg: auth.algorithm, kid: auth.keyId, typ: 'JWT' })
      .setIssuer(auth.clientId).setSubject(auth.clientId).setAudience(url)
      .setIssuedAt(seconds).setExpirationTime(seconds + 240).setJti(randomUUID())
      .sign(key)
    const body = new URLSearchParams({
      grant_type: 'client_credentials',
      scope: auth.scope,
      client_assertion_type: 'urn:ietf:params:oauth:client-assertion-type:jwt-bearer',
      client_assertion: assertion,
    }).toString()
    const answer = await send({
      method: 'POST', url, body, headers: { 'accept': 'application/json', 'content-type': 'application/x-www-form-urlencoded' },
    })
    if (answer.status === 429 || answer.status >= 500) {
      throw new EhrUnavailable(answer.status === 429 ? 'busy' : 'unreachable', 'The hospital record\'s sign-in is not answering', {
        status: answer.status, retryAfterMs: answer.retryAfterMs,
      })
    }
    const parsed = tokenAnswer.safeParse(answer.body)
    if (answer.status !== 200 || !parsed.success) {
      throw new EhrUnavailable('not-connected', 'The hospital record did not accept this system\'s sign-in', { status: answer.status })
    }
    const life = (parsed.data.expires_in ?? assumedLifeSeconds) * 1000
    held = { token: parsed.data.access_token, until: now() + Math.max(life - renewBeforeMs, life / 2) }
    return held.token
  }

  return {
    async token() {
      if (held && now() < held.until) return held.token
      pending ??= ask().finally(() => { pending = null })
      return pending
    },
    forget(token) {
      if (held?.token === token) held = null
    },
  }
}
