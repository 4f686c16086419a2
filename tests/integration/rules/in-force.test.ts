import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { starterPolicy } from '#shared/domain/policy/defaults'
import type { Policy } from '#shared/domain/policy/types'
import { policyVersions } from '#server/database/schema/rules'
import { Unavailable } from '#server/services/errors'
import { rulesById, rulesInForce } from '#server/services/rules/in-force'
import { createTestDepartment } from '../../support/department'
import type { TestDepartment } from '../../support/department'

let department: TestDepartment

beforeAll(async () => {
  department = await createTestDepartment()
})
afterAll(() => department.close())

const year = (number: number) => new Date(`${number}-06-01T00:00:00Z`)

async function store(label: string, effectiveFrom: Date, content: Policy): Promise<string> {
  const [row] = await department.db.insert(policyVersions).values({ label, content, signedBy: 'Test', effectiveFrom }).returning({ id: policyVersions.id })
  if (!row) throw new Error('the policy was not stored')
  return row.id
}

describe('a stored policy', () => {
  it('is in force as it was written', async () => {
    expect((await rulesInForce(department.db, year(2021))).rules.policy).toEqual(starterPolicy)
  })

  it('that no department can mean is refused with the place and the reason, and still read back for what it decided', async () => {
    const id = await store('nonsense', year(2030), { ...starterPolicy, holdBelowEgfr: { ...starterPolicy.holdBelowEgfr, value: 300 } })
    const refused = rulesInForce(department.db, year(2031))
    await expect(refused).rejects.toThrow(Unavailable)
    await expect(refused).rejects.toThrow(/holdBelowEgfr\.value: The eGFR that holds contrast must be/)
    const { guidanceId } = await rulesInForce(department.db, year(2021))
    expect((await rulesById(department.db, guidanceId, id)).rules.policy.holdBelowEgfr.value).toBe(300)
  })

  it('of another shape is refused', async () => {
    await store('shapeless', year(2040), { ...starterPolicy, links: { ...starterPolicy.links, value: JSON.parse('{"validDays":"many"}') } })
    await expect(rulesInForce(department.db, year(2041))).rejects.toThrow(/policy shapeless cannot be used: links\.value/)
  })
})
