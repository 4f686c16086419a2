import { describe, expect, it } from 'vitest'
import { assess } from '#shared/domain/assessment/assess'
import { quietScreening } from '../safety/situation'
import { creatinine, marta, rules } from './request-inputs'

const unless = (inputs: typeof marta) => assess(inputs, rules).unless

describe('Unless', () => {
  it('leads with the answer that changes the contrast, and with its reason', () => {
    const [first] = unless(marta)
    expect(first).toMatchObject({ flips: 'tumorInfection', leadsTo: 'none' })
    expect(first?.text).toMatch(/is answered “No”: then without contrast, because an uncomplicated first seizure/)
  })

  it('holds at most five facts, each one once', () => {
    const clauses = unless(marta)
    expect(clauses.length).toBeLessThanOrEqual(5)
    expect(new Set(clauses.map(clause => clause.text)).size).toBe(clauses.length)
  })

  it('names a reaction and an exam later than the creatinine allows', () => {
    const words = unless(marta).map(clause => clause.text).join('\n')
    expect(words).toMatch(/has reacted to a gadolinium agent before: then contrast waits for a radiologist's word/)
    expect(words).toMatch(/later than December 24, 6 weeks after the creatinine: then a new creatinine is needed/)
  })

  it('names the threshold of 30 where it is within reach', () => {
    const near = unless({ ...marta, readings: [creatinine(1.5, '2026-11-30T14:00:00Z')] })
    expect(near.find(clause => clause.flips === 'egfr')?.text).toMatch(/^eGFR falls below 30: then contrast waits/)
    expect(unless(marta).some(clause => clause.flips === 'egfr')).toBe(false)
  })

  it('names the way back where eGFR is just below 30', () => {
    const low = unless({ ...marta, readings: [creatinine(2.0, '2026-11-30T14:00:00Z')] })
    expect(low.find(clause => clause.flips === 'egfr')?.text).toMatch(/^eGFR recovers to 30 or more: then contrast no longer waits/)
  })

  it('speaks of no radiologist\'s word where contrast is left out either way', () => {
    const fibrosis = { ...quietScreening, nephrogenicSystemicFibrosis: 'yes' as const }
    const without = unless({ ...marta, screening: fibrosis, answers: { tumorInfection: 'no' } })
    const barred = unless({ ...marta, screening: fibrosis })
    for (const clause of [...without, ...barred]) {
      if (clause.leadsTo === null) expect(clause.text).not.toMatch(/waits for a radiologist/)
    }
    expect(barred.map(clause => clause.flips)).toContain('nephrogenicSystemicFibrosis')
  })

  it('asks about pregnancy only where it may be', () => {
    const young = { ...marta, patient: { ...marta.patient, birthDate: '1992-05-20' }, screening: { ...quietScreening, pregnancy: 'no' as const } }
    expect(unless(young).find(clause => clause.flips === 'pregnancy')).toMatchObject({ leadsTo: 'discuss' })
    expect(unless(marta).some(clause => clause.flips === 'pregnancy')).toBe(false)
  })

  it('says what a withdrawn reaction would spare', () => {
    const reacted = unless({ ...marta, screening: { ...quietScreening, earlierReaction: 'yes', reactionKind: 'allergic-like', reactionSeverity: 'moderate', reactionAgent: 'gadobutrol' } })
    expect(reacted.find(clause => clause.flips === 'earlierReaction')?.text).toMatch(/no longer waits .*premedication .*no longer needed; gadobutrol is suggested instead/)
  })

  it('says nothing of dialysis that follows from the answer itself', () => {
    expect(unless(marta).some(clause => clause.flips === 'dialysis')).toBe(false)
    const onDialysis = unless({ ...marta, setting: 'emergency', screening: { ...quietScreening, dialysis: 'hemodialysis' } })
    expect(onDialysis.map(clause => clause.text).join()).not.toMatch(/dialysis after the exam is no longer needed/)
  })

  it('names the sex for the equation where it decides', () => {
    const open = unless({ ...marta, patient: { ...marta.patient, sex: 'unknown' }, readings: [creatinine(2, '2026-11-28T14:00:00Z')] })
    expect(open.map(clause => clause.text)).toContain('The sex for the equation is male: then contrast no longer waits for a radiologist\'s word')
  })

  it('says what follows once an open pregnancy question is answered with no', () => {
    const open = unless({ ...marta, patient: { ...marta.patient, birthDate: '1996-05-05' }, screening: { ...quietScreening, pregnancy: 'unknown' } })
    expect(open.map(clause => clause.text).join()).toMatch(/turns out not to be pregnant: then contrast no longer waits for a radiologist's word/)
  })
})
