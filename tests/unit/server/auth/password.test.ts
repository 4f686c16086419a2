import { hash } from '@node-rs/argon2'
import { describe, expect, it } from 'vitest'
import { hashPassword, needsRehash, verifyPassword } from '#server/auth/password'

describe('stored passwords', () => {
  it('are argon2id with at least 19 MiB, two passes and one lane (OWASP password storage)', async () => {
    expect(await hashPassword('three old bicycles')).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/)
  })

  it('open with the same words in another Unicode form, and with no others', async () => {
    const stored = await hashPassword('caf\u00e9 on the corner')
    expect(await verifyPassword(stored, 'cafe\u0301 on the corner')).toBe(true)
    expect(await verifyPassword(stored, 'Café on the corner')).toBe(false)
  })

  it('answer no where there is no account', async () => {
    expect(await verifyPassword(null, 'no such account')).toBe(false)
  })

  it('are made again when they were made with less', async () => {
    expect(needsRehash(await hash('three old bicycles', { memoryCost: 8_192, timeCost: 2, parallelism: 1 }))).toBe(true)
    expect(needsRehash(await hashPassword('three old bicycles'))).toBe(false)
  })

  it('are checked in turn, and beyond a long queue the answer is to come back later', async () => {
    const stored = await hashPassword('three old bicycles')
    const results = await Promise.allSettled(Array.from({ length: 60 }, () => verifyPassword(stored, 'three old bicycles')))
    expect(results.filter(result => result.status === 'fulfilled' && result.value)).toHaveLength(42)
    for (const result of results) if (result.status === 'rejected') expect(result.reason).toMatchObject({ status: 503 })
  })
})
