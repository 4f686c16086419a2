import { randomBytes } from 'node:crypto'
import { describe, expect, it } from 'vitest'
import { assertDemoStaysHome, assertSecretIsRandom } from '#server/utils/start-checks'

describe('demo accounts', () => {
  it.each([['http://127.0.0.1:3900', '127.0.0.1'], ['http://localhost:3900', 'localhost'], ['http://[::1]:3900', '::1']])('may exist at %s', (origin, host) => {
    expect(() => assertDemoStaysHome(origin, host)).not.toThrow()
  })

  it.each([['https://wherefore.example.org', '127.0.0.1'], ['http://127.0.0.1.example.org', '127.0.0.1'], ['http://127.0.0.1:3900', '0.0.0.0'], ['http://127.0.0.1:3900', undefined], ['http://127.0.0.1:3900', '']])('may not exist at %s listening on %s', (origin, host) => {
    expect(() => assertDemoStaysHome(origin, host)).toThrow(/NUXT_DEMO/)
  })
})

describe('the signing secret', () => {
  it('is accepted when it was drawn at random', () => {
    for (let draw = 0; draw < 50; draw++) expect(() => assertSecretIsRandom(randomBytes(48).toString('hex'))).not.toThrow()
  })

  it.each(['a'.repeat(64), 'my-default-secret-for-development-only', 'abcabcabcabcabcabcabcabcabcabcabcabc'])('is refused when it was not: %s', (secret) => {
    expect(() => assertSecretIsRandom(secret)).toThrow(/NUXT_AUTH_SECRET/)
  })
})
