import { describe, expect, it } from 'vitest'
import { assess } from '#shared/domain/assessment/assess'
import { differenceBetween } from '#shared/domain/assessment/difference'
import type { AssessmentInputs } from '#shared/domain/assessment/types'
import { quietScreening } from '../safety/situation'
import { creatinine, marta, rules } from './request-inputs'

const changed = (inputs: Partial<AssessmentInputs>) => differenceBetween(assess(marta, rules), assess({ ...marta, ...inputs }, rules))

describe('what changed between two assessments', () => {
  it('is nothing where only time passed', () => {
    expect(changed({ now: '2026-12-01T21:00:00Z' })).toEqual([])
  })

  it('leads with another contrast', () => {
    expect(changed({ answers: { tumorInfection: 'no' } })[0]).toEqual({ kind: 'outcome', text: 'Now without contrast; it was without and with contrast' })
  })

  it('names a fallen eGFR and the hold that follows', () => {
    const kinds = changed({ readings: [...marta.readings, creatinine(2.4, '2026-11-30T14:00:00Z')] }).map(item => item.kind)
    expect(kinds).toEqual(expect.arrayContaining(['hold', 'kidney', 'finding', 'need']))
  })

  it('names another agent after a reaction', () => {
    const texts = changed({ screening: { ...quietScreening, earlierReaction: 'yes', reactionKind: 'allergic-like', reactionSeverity: 'mild', reactionAgent: 'gadobutrol' } }).map(item => item.text)
    expect(texts).toContain('Agent suggested now: gadoterate instead of gadobutrol')
  })

  it('says when an answer is taken back', () => {
    expect(changed({ answers: {} })[0]?.text).toMatch(/Answers are missing again/)
  })

  it('names new guidance', () => {
    const later = assess(marta, { ...rules, guidance: { ...rules.guidance, version: '2026.2' } })
    expect(differenceBetween(assess(marta, rules), later)).toEqual([{ kind: 'rules', text: 'Guidance 2026.2 applies, not 2026.1' }])
  })
})
