import { describe, expect, it } from 'vitest'
import { assess } from '#shared/domain/assessment/assess'
import { kidneyLine, watchedKidneyLines } from '#shared/domain/assessment/kidney-line'
import type { AssessmentInputs } from '#shared/domain/assessment/types'
import { quietScreening } from '../safety/situation'
import { creatinine, marta, rules } from './request-inputs'

const lineOf = (changes: Partial<AssessmentInputs>) => kidneyLine(assess({ ...marta, ...changes }, rules))
const series = (...values: [number, string][]) => values.map(([value, day]) => creatinine(value, `2026-11-${day}T14:00:00Z`))
const infant = { birthDate: '2026-06-01', sex: 'male' as const, weightKg: 7, weightAt: null, heightCm: 65, heightAt: null }

describe('the kidney line of a list', () => {
  it.each<[string, string, Partial<AssessmentInputs>]>([
    ['a steady creatinine', 'eGFR 69', {}],
    ['a creatinine falling from 2.2 to 1.2', 'creatinine not steady', { readings: series([2.2, '27'], [1.2, '30']) }],
    ['an injury that has just passed', 'creatinine not steady', { readings: series([1, '24'], [2.2, '26'], [1.2, '29']) }],
    ['an injury now', 'acute kidney injury', { readings: series([0.9, '29'], [1.6, '30']) }],
    ['a presumed injury', 'acute kidney injury', { readings: series([1, '01'], [1.8, '28']) }],
    ['dialysis, whatever the creatinine does', 'dialysis', { readings: series([6.2, '27'], [3.1, '30']), screening: { ...quietScreening, dialysis: 'hemodialysis' } }],
    ['a scan without contrast', 'no lab needed', { answers: { tumorInfection: 'no' }, readings: series([2.2, '27'], [1.2, '30']) }],
    ['an old creatinine', 'lab 61 days old', { readings: [creatinine(0.94, '2026-10-01T14:00:00Z')] }],
    ['no creatinine', 'no creatinine', { readings: [] }],
    ['a record that could not be read', 'record not reachable', { readings: [], record: { state: 'unreachable', readAt: null } }],
    ['an infant with a creatinine', 'under 1 year', { patient: infant }],
    ['an infant without one', 'under 1 year', { patient: infant, readings: [] }],
  ])('for %s: %s', (_when, line, changes) => {
    expect(lineOf(changes)).toBe(line)
  })

  it('is watched by its words wherever it gives no number on account of danger', () => {
    expect(watchedKidneyLines).toEqual(['dialysis', 'acute kidney injury', 'creatinine not steady'])
  })
})
