import { describe, expect, it } from 'vitest'
import type { RankedAgent } from '#shared/domain/contrast/types'
import { approvalSchema } from '#shared/schemas/requests'
import { agentFields, approvalBody, doseOf } from '~/composables/use-review-decision'
import type { DecisionFields } from '~/composables/use-review-decision'

const ranked: RankedAgent = {
  agent: 'gadobutrol', name: 'Gadobutrol', descriptor: '', concentrationMmolPerMl: 1, eligible: true, reasons: [],
  dose: { doseMmolPerKg: 0.1, weightKg: 74, amountMmol: 7.4, volumeMl: 7.4, volumeDisplay: '7.4', amountDisplay: '7.4', checks: ['ok'] },
}
const fields: DecisionFields = {
  contrast: 'iv-with-and-without', agent: 'gadobutrol', doseMmolPerKg: 0.1, weightKg: 74, volumeMl: null, note: '', differsReason: 'kept from before', wordGiven: true, waived: {},
}
const calm = { differs: [], against: [], agentBarred: [], reasonNeeded: false, wordNeeded: false, confirmNeeded: false }

describe('the draft of a decision', () => {
  it('begins with the best agent at its dose', () => {
    expect(agentFields('iv-with-and-without', { outcome: 'iv-with-and-without', ranked: [ranked], best: 'gadobutrol' })).toEqual({ agent: 'gadobutrol', doseMmolPerKg: 0.1 })
  })

  it('has no agent without contrast and no dose by weight for a joint', () => {
    expect(agentFields('none', null)).toEqual({ agent: null, doseMmolPerKg: null })
    expect(agentFields('intra-articular', { outcome: 'intra-articular', ranked: [ranked], best: 'gadobutrol' })).toEqual({ agent: 'gadobutrol', doseMmolPerKg: null })
  })

  it('sends nothing of contrast along once it is chosen without', () => {
    expect(approvalBody({ ...fields, contrast: 'none' }, calm)).toMatchObject({ contrast: 'none', agent: null, doseMmolPerKg: null, weightKg: null, volumeMl: null })
  })

  it('sends neither a reason nor a word that nobody asked for', () => {
    expect(approvalBody(fields, calm)).toMatchObject({ differsReason: null, wordGiven: false })
    expect(approvalBody(fields, { ...calm, reasonNeeded: true, wordNeeded: true })).toMatchObject({ differsReason: 'kept from before', wordGiven: true })
  })

  it('is a body that the route accepts', () => {
    expect(approvalSchema.safeParse(approvalBody({ ...fields, waived: { 'medication-guide': 'Had it in May' } }, calm)).success).toBe(true)
  })
})

describe('amount and volume beside the fields', () => {
  it('follow weight and dose at once', () => {
    // US label of gadobutrol: 0.1 mL per kg; half the dose at 80 kg is 4 mL.
    expect(doseOf({ ...fields, weightKg: 80, doseMmolPerKg: 0.05 }, ranked)).toMatchObject({ amountDisplay: '4.00', volumeDisplay: '4.00' })
  })

  it('say nothing while a number is missing or is none', () => {
    expect(doseOf({ ...fields, weightKg: null }, ranked)).toBeNull()
    expect(doseOf({ ...fields, doseMmolPerKg: Number.NaN }, ranked)).toBeNull()
  })

  it('ask for a second look at an unusual weight', () => {
    expect(doseOf({ ...fields, weightKg: 180 }, ranked)?.checks).toContain('check-weight')
  })
})
