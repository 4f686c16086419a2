import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { assess } from '#shared/domain/assessment/assess'
import type { Assessment } from '#shared/domain/assessment/types'
import type { ScreeningAnswers } from '#shared/domain/safety/types'
import { arbitraryContrastInputs, arbitraryInputs } from './arbitrary-inputs'
import { rules } from './request-inputs'

/** An answer without a risk, and the same with one. */
const risks: [Partial<ScreeningAnswers>, Partial<ScreeningAnswers>][] = [
  ...(['kidneyDisease', 'kidneyRiskFactor', 'acuteIllness', 'liverDisease', 'asthma', 'nephrogenicSystemicFibrosis', 'implants', 'breastfeeding'] as const)
    .flatMap(field => (['yes', 'unknown'] as const).map((risk): [Partial<ScreeningAnswers>, Partial<ScreeningAnswers>] => [{ [field]: 'no' }, { [field]: risk }])),
  ...(['yes', 'possible', 'unknown'] as const).map((pregnancy): [Partial<ScreeningAnswers>, Partial<ScreeningAnswers>] => [{ pregnancy: 'no' }, { pregnancy }]),
  ...(['hemodialysis', 'peritoneal', 'unknown'] as const).map((dialysis): [Partial<ScreeningAnswers>, Partial<ScreeningAnswers>] => [{ dialysis: 'none' }, { dialysis }]),
  [{ earlierReaction: 'no' }, { earlierReaction: 'unknown' }],
  ...(['mild', 'moderate', 'severe', 'unknown'] as const).flatMap(reactionSeverity => (['allergic-like', 'physiologic', 'unknown'] as const)
    .map((reactionKind): [Partial<ScreeningAnswers>, Partial<ScreeningAnswers>] =>
      [{ earlierReaction: 'no' }, { earlierReaction: 'yes', reactionSeverity, reactionKind, reactionAgent: 'gadobutrol' }])),
]

const barred = ({ findings }: Assessment) => new Set(findings.flatMap(found => found.barsAgents))

/** Needs that a named finding makes pointless: on dialysis the creatinine and the height for its eGFR decide nothing. */
function replaced({ kidney, agents }: Assessment, before: Assessment): string[] {
  return [
    ...(kidney.status === 'dialysis' ? ['creatinine', 'height'] : []),
    // The leaflet belongs to the agent: another one may have been given before.
    ...(agents?.best !== before.agents?.best ? ['medication-guide'] : []),
  ]
}

describe('one more risk', () => {
  it('removes no need and frees no agent, unless contrast itself is turned', { timeout: 120_000 }, () => {
    fc.assert(fc.property(fc.oneof(arbitraryInputs, arbitraryContrastInputs), fc.constantFrom(...risks), (inputs, [without, risk]) => {
      const of = (answers: Partial<ScreeningAnswers>) => assess({ ...inputs, screening: { ...inputs.screening, ...without, ...answers } }, rules)
      const before = of({})
      const after = of(risk)
      for (const agent of barred(before)) expect([...barred(after)]).toContain(agent)
      if (before.asksRadiologist) expect(after.asksRadiologist).toBe(true)
      if (after.suggestion !== before.suggestion) {
        expect(after.findings.some(found => found.turns === after.suggestion)).toBe(true)
        return
      }
      const gone = before.needs.map(need => need.kind).filter(kind => !after.needs.some(need => need.kind === kind))
      expect(gone.filter(kind => !replaced(after, before).includes(kind))).toEqual([])
    }), { numRuns: 600 })
  })
})

describe('an older creatinine', () => {
  it('never takes the place of the newest', { timeout: 60_000 }, () => {
    fc.assert(fc.property(fc.oneof(arbitraryInputs, arbitraryContrastInputs), fc.double({ min: 0.1, max: 30, noNaN: true }), fc.integer({ min: 1, max: 4_000_000 }), (inputs, value, minutes) => {
      const newest = assess(inputs, rules).kidney.creatinine
      if (newest === null) return
      const collectedAt = new Date(Date.parse(newest.collectedAt) - minutes * 60_000).toISOString()
      const older = { ...newest.reading, id: 'older', value, unit: 'mg/dL', comparator: null, status: 'final' as const, refusal: null, precision: 'instant' as const, collectedAt, issuedAt: inputs.now }
      expect(assess({ ...inputs, readings: [older, ...inputs.readings] }, rules).kidney.creatinine).toEqual(newest)
    }), { numRuns: 200 })
  })
})
