import { describe, expect, it } from 'vitest'
import { starterPolicy } from '#shared/domain/policy/defaults'
import { firstPolicyProblem, policySchema, policyShape } from '#shared/schemas/policy'

const stored = (changes: object = {}) => JSON.parse(JSON.stringify({ ...starterPolicy, ...changes })) as unknown
const problem = (value: unknown) => {
  const read = policySchema.safeParse(value)
  return read.success ? null : firstPolicyProblem(read.error)
}

describe('a stored policy', () => {
  it('comes back as it was written', () => {
    expect(policySchema.parse(stored())).toEqual(starterPolicy)
  })

  it.each<[string, object, RegExp]>([
    ['a setting it does not know', { colour: 'blue' }, /colour/],
    ['a setting missing', { links: undefined }, /^links: /],
    ['no source', { holdBelowEgfr: { value: 30, asOf: '2026-01-01' } }, /^holdBelowEgfr\.source: /],
    ['a date that is none', { holdBelowEgfr: { ...starterPolicy.holdBelowEgfr, asOf: '2026-02-30' } }, /^holdBelowEgfr\.asOf: /],
    ['an agent that does not exist', { stockedAgents: { ...starterPolicy.stockedAgents, value: ['water'] } }, /^stockedAgents\.value\.0: /],
    ['nonsense', { holdBelowEgfr: { ...starterPolicy.holdBelowEgfr, value: 300 } }, /^holdBelowEgfr\.value: The eGFR that holds contrast must be mL\/min\/1\.73 m² from 5 to 60/],
  ])('with %s is refused, with the place and the reason', (_what, changes, reason) => {
    expect(problem(stored(changes))).toMatch(reason)
  })

  it('never repeats the refused value', () => {
    expect(problem(stored({ holdBelowEgfr: { ...starterPolicy.holdBelowEgfr, value: 31337 } }))).not.toContain('31337')
  })

  it('of the past is read by its shape alone', () => {
    expect(policyShape.safeParse(stored({ holdBelowEgfr: { ...starterPolicy.holdBelowEgfr, value: 300 } })).success).toBe(true)
  })
})
