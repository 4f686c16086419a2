import { describe, expect, it } from 'vitest'
import { demoPassPhrase as seeded, demoUsers } from '../../../../server/database/seed/demo-users.mjs'
import { demoPassPhrase, demoSignIns } from '#shared/utils/demo-sign-ins'

describe('the demonstration\'s sign-ins', () => {
  it('offers only people whom the seed makes, with its pass phrase', () => {
    expect(demoPassPhrase).toBe(seeded)
    for (const { email, name } of demoSignIns) expect(demoUsers).toContainEqual(expect.objectContaining({ email, name }))
  })

  it('offers every role', () => {
    const roles = demoSignIns.map(({ email }) => demoUsers.find(user => user.email === email)?.role)
    expect(new Set(roles)).toEqual(new Set(['orderer', 'radiologist', 'scheduler', 'administrator']))
  })
})
