// Token endpoint of SMART Backend Services: the assertion is really verified.
import { randomBytes } from 'node:crypto'
import { createLocalJWKSet, jwtVerify } from 'jose'

const assertionType = 'urn:ietf:params:oauth:client-assertion-type:jwt-bearer'

export class Tokens {
  issued = new Map()
  seen = new Set()

  /** @param {{ clientId: string, jwks: { keys: object[] }, lifeSeconds?: number }} registered the one client known here */
  constructor(registered) {
    this.registered = registered
  }

  /** Answers a token request: status and body (RFC 6749, 5.1 and 5.2). */
  async exchange(form, endpoint) {
    if (form.get('grant_type') !== 'client_credentials') return refused(400, 'unsupported_grant_type')
    if (form.get('client_assertion_type') !== assertionType) return refused(400, 'invalid_request')
    try {
      const { payload } = await jwtVerify(form.get('client_assertion') ?? '', createLocalJWKSet(this.registered.jwks), {
        issuer: this.registered.clientId, subject: this.registered.clientId, audience: endpoint, algorithms: ['RS384', 'ES384'], typ: 'JWT',
        requiredClaims: ['exp', 'jti'],
      })
      if (payload.exp > Date.now() / 1000 + 300) return refused(401, 'invalid_client')
      if (this.seen.has(payload.jti)) return refused(401, 'invalid_client')
      this.seen.add(payload.jti)
    }
    catch {
      return refused(401, 'invalid_client')
    }
    const scope = form.get('scope') ?? ''
    if (!scope.split(' ').every(part => /^system\/([A-Z][A-Za-z]+|\*)\.(c?r?u?d?s?|read)$/.test(part))) return refused(400, 'invalid_scope')
    const token = randomBytes(24).toString('base64url')
    const seconds = this.registered.lifeSeconds ?? 300
    this.issued.set(token, { until: Date.now() + seconds * 1000, scope: scope.split(' ') })
    return { status: 200, body: { access_token: token, token_type: 'bearer', expires_in: seconds, scope } }
  }

  /** 'ok', 'login' where the token is missing, unknown or expired, 'forbidden' where it does not cover the type. */
  check(header, type) {
    const held = this.issued.get(/^Bearer (.+)$/.exec(header ?? '')?.[1] ?? '')
    if (!held || held.until < Date.now()) return 'login'
    return held.scope.some(part => [`system/${type}.`, 'system/*.'].some(start => part.startsWith(start))) ? 'ok' : 'forbidden'
  }

  expireAll() {
    this.issued.clear()
  }
}

const refused = (status, error) => ({ status, body: { error } })
