import { describe, expect, it } from 'vitest'
import { starterAgents } from '#shared/domain/contrast/agents'
import { rankAgents } from '#shared/domain/contrast/rank'
import type { RankInput } from '#shared/domain/contrast/rank'
import type { AgentId } from '#shared/domain/contrast/types'
import { starterPolicy } from '#shared/domain/policy/defaults'

const stocked = (...agents: AgentId[]) => ({ ...starterPolicy, stockedAgents: { ...starterPolicy.stockedAgents, value: agents } })

function rank(changes: Partial<RankInput> = {}) {
  return rankAgents({
    outcome: 'iv-with-and-without', patient: { ageYears: 50, weightKg: 70 }, policy: stocked('gadobenate', 'gadoterate', 'gadobutrol', 'gadoxetate'),
    barred: [], agents: starterAgents, ...changes,
  })
}

const eligible = (changes?: Partial<RankInput>) => rank(changes).ranked.filter(row => row.eligible).map(row => row.agent)
const row = (agent: AgentId, changes?: Partial<RankInput>) => rank(changes).ranked.find(one => one.agent === agent)

describe('the agents for an exam', () => {
  it('are macrocyclic before linear, then in the department\'s order', () => {
    expect(eligible()).toEqual(['gadoterate', 'gadobutrol', 'gadobenate'])
    expect(rank().best).toBe('gadoterate')
  })

  it('name every agent, those that may be given first', () => {
    const { ranked } = rank()
    expect(ranked).toHaveLength(starterAgents.length)
    expect(ranked.map(one => one.eligible)).toEqual([...ranked.map(one => one.eligible)].sort((a, b) => Number(b) - Number(a)))
    expect(ranked.every(one => one.reasons.length > 0)).toBe(true)
  })

  it('say each reason why one is left out', () => {
    expect(row('gadodiamide', { barred: [{ agent: 'gadodiamide', reason: 'eGFR below 30: group I agents are barred' }] })).toMatchObject({
      eligible: false, reasons: ['eGFR below 30: group I agents are barred', 'Not stocked by the department'],
    })
    expect(row('gadoxetate')).toMatchObject({ eligible: false, reasons: ['Kept for liver exams'] })
  })

  it('keep the dose of one left out, since a radiologist may choose it with a reason', () => {
    expect(row('gadobutrol', { barred: [{ agent: 'gadobutrol', reason: 'An earlier reaction to it' }] })).toMatchObject({ eligible: false, dose: { volumeDisplay: '7.0' } })
  })

  it('leave none where all are barred', () => {
    const barred = starterAgents.map(({ id }) => ({ agent: id, reason: 'Earlier severe reaction to it' }))
    expect(rank({ barred }).best).toBeNull()
  })

  it('prefer, for a child, one labelled at that age over one that is not', () => {
    const young = { policy: stocked('gadopiclenol', 'gadoterate'), patient: { ageYears: 1.5, weightKg: 11 } }
    expect(eligible(young)).toEqual(['gadoterate', 'gadopiclenol'])
    expect(row('gadopiclenol', young)?.reasons).toContain('Off label at this age: the label starts at 2 years')
    expect(eligible({ ...young, patient: { ageYears: 2, weightKg: 12 } })).toEqual(['gadopiclenol', 'gadoterate'])
  })

  it('come with amount and volume, or say that a weight is missing', () => {
    expect(row('gadobutrol')).toMatchObject({ dose: { volumeDisplay: '7.0', amountDisplay: '7.0' }, descriptor: 'macrocyclic, non-ionic, group II', concentrationMmolPerMl: 1 })
    const unweighed = row('gadobutrol', { patient: { ageYears: 50, weightKg: null } })
    expect(unweighed?.dose).toBeNull()
    expect(unweighed?.reasons).toContain('No dose without a weight')
    expect(row('gadobutrol', { patient: { ageYears: 50, weightKg: 160 } })?.reasons).toContain('Weight outside 2.5 to 140 kg: a person confirms the dose')
  })

  it('take the ACR group from the department', () => {
    const policy = { ...stocked('gadobutrol'), acrGroups: { ...starterPolicy.acrGroups, value: { gadobutrol: 'III' as const } } }
    expect(row('gadobutrol', { policy })?.descriptor).toBe('macrocyclic, non-ionic, group III')
  })
})

describe('a liver exam', () => {
  it('takes gadoxetate, then gadobenate, whatever the shelf\'s order', () => {
    expect(eligible({ outcome: 'iv-hepatobiliary' })).toEqual(['gadoxetate', 'gadobenate'])
    expect(row('gadobutrol', { outcome: 'iv-hepatobiliary' })?.reasons).toEqual(['Not taken up by the liver'])
  })

  it('says that gadoxetate is labelled for adults only', () => {
    expect(row('gadoxetate', { outcome: 'iv-hepatobiliary', patient: { ageYears: 10, weightKg: 30 } })).toMatchObject({
      eligible: true, reasons: expect.arrayContaining(['Off label at this age: the label covers adults only']), dose: { checks: ['age-below-label'] },
    })
  })
})

describe('an injection into a joint', () => {
  it('takes agents in common use there, without a dose by weight', () => {
    expect(eligible({ outcome: 'intra-articular' })).toEqual(['gadoterate', 'gadobutrol'])
    expect(row('gadobenate', { outcome: 'intra-articular' })?.reasons).toEqual(['Not in common use in joints'])
    expect(rank({ outcome: 'intra-articular', patient: { ageYears: 30, weightKg: null } }).ranked.every(one => one.dose === null)).toBe(true)
  })
})

describe('an exam without contrast, or still to be discussed', () => {
  it.each(['none', 'discuss'] as const)('ranks none (%s)', (outcome) => {
    expect(rank({ outcome })).toEqual({ outcome, ranked: [], best: null })
  })
})
