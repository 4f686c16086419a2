import { describe, expect, it } from 'vitest'
import { databaseGrantsSql, plainName, rolesSql } from '../../../scripts/lib/roles.mjs'

describe('the SQL that the scripts compose', () => {
  it('accepts plain names only, so that nothing else can be said in them', () => {
    expect(plainName('wherefore_e2e')).toBe('wherefore_e2e')
    for (const name of ['', 'Wherefore', '1st', 'a b', 'x; drop database y', 'a"b', 'a'.repeat(64)]) expect(() => plainName(name)).toThrow('plain database name')
  })

  it('lets nobody but the three roles into a database', () => {
    expect(databaseGrantsSql('wherefore')).toContain('revoke all on database wherefore from public')
    expect(rolesSql).toContain("'wherefore_owner', 'wherefore_app', 'wherefore_worker'")
    expect(rolesSql).toContain('nosuperuser')
  })
})
