import fc from 'fast-check'
import { DateTime } from 'luxon'
import { describe, expect, it } from 'vitest'
import { assess } from '#shared/domain/assessment/assess'
import type { Assessment, AssessmentInputs, Clause } from '#shared/domain/assessment/types'
import { needWords } from '#shared/domain/assessment/words'
import { answerLabel, decidedValues } from '#shared/domain/guidance/deciders'
import type { ScreeningAnswers } from '#shared/domain/safety/types'
import { arbitraryContrastInputs, arbitraryInputs } from './arbitrary-inputs'
import { creatinine, marta, rules } from './request-inputs'

/** The safety answer that a fact states, as a person would enter it. */
const stated: [RegExp, Partial<ScreeningAnswers>][] = [
  [/^The patient is not pregnant after all|^The patient turns out not to be pregnant/, { pregnancy: 'no' }],
  [/^The patient is pregnant/, { pregnancy: 'yes' }],
  [/^There was no earlier reaction/, { earlierReaction: 'no' }],
  [/^The patient has reacted/, { earlierReaction: 'yes', reactionAgent: 'unknown', reactionKind: 'unknown', reactionSeverity: 'unknown' }],
  [/^The patient is not on dialysis/, { dialysis: 'none' }],
  [/^The patient is on hemodialysis/, { dialysis: 'hemodialysis' }],
  [/^The patient is acutely ill/, { acuteIllness: 'yes' }],
  [/^A kidney risk factor turns up/, { kidneyRiskFactor: 'yes' }],
  [/^Nephrogenic systemic fibrosis is ruled out/, { nephrogenicSystemicFibrosis: 'no' }],
  [/^Nephrogenic systemic fibrosis is known/, { nephrogenicSystemicFibrosis: 'yes' }],
]

/** The inputs with the clause's fact made true; null for an eGFR, which is no input. */
function applied(inputs: AssessmentInputs, clause: Clause, before: Assessment): AssessmentInputs | null {
  const question = rules.guidance.questions.find(each => each.id === inputs.questionId)
  const decider = question?.deciders.find(each => each.id === clause.flips && clause.text.startsWith(`“${each.ask}”`))
  if (decider !== undefined) {
    const value = decidedValues(decider).find(each => clause.text.startsWith(`“${decider.ask}” is answered “${answerLabel(decider, each)}”`))
    if (value === undefined) throw new Error(`no such answer: ${clause.text}`)
    return { ...inputs, answers: { ...inputs.answers, [decider.id]: value } }
  }
  if (clause.flips === 'egfr') return null
  if (clause.flips === 'sex') return { ...inputs, patient: { ...inputs.patient, sex: clause.text.includes('female') ? 'female' : 'male' } }
  if (clause.flips === 'plannedAt') {
    const drawn = DateTime.fromISO(before.kidney.creatinine?.collectedAt ?? '', { zone: rules.policy.department.timeZone })
    return { ...inputs, plannedAt: drawn.plus({ days: (before.kidney.windowDays ?? 0) + 1, hours: 1 }).toUTC().toISO() }
  }
  const answers = stated.find(([fact]) => fact.test(clause.text))?.[1]
  if (answers === undefined) throw new Error(`not understood: ${clause.text}`)
  return { ...inputs, screening: { ...inputs.screening, ...answers } }
}

/** Fails where the words after "then" are not true of the new assessment. */
function expectClaims(clause: Clause, before: Assessment, after: Assessment): void {
  if (clause.leadsTo != null) {
    expect(after.suggestion, clause.text).toBe(clause.leadsTo)
    return
  }
  expect(after.suggestion, clause.text).toBe(before.suggestion)
  const had = before.needs.map(need => need.kind)
  const has = after.needs.map(need => need.kind)
  for (const claim of clause.text.slice(clause.text.lastIndexOf(': then ') + 7).split('; ')) {
    const named = has.concat(had).filter(kind => claim.includes(needWords[kind]) && kind !== 'radiologist-word')
    if (/waits for a radiologist/.test(claim)) expect(after.asksRadiologist, clause.text).toBe(!claim.includes('no longer'))
    else if (/(is|are) no longer needed$/.test(claim)) {
      expect(named.length, clause.text).toBeGreaterThan(0)
      for (const kind of named) expect(has, clause.text).not.toContain(kind)
    }
    else if (/(is|are) needed$/.test(claim)) {
      expect(named.length, clause.text).toBeGreaterThan(0)
      for (const kind of named) expect(has, clause.text).toContain(kind)
    }
    else {
      const best = after.agents?.ranked.find(entry => entry.agent === after.agents?.best)
      expect(claim, clause.text).toMatch(new RegExp(`^${best?.name} (fits|is suggested instead)$`))
    }
  }
}

describe('each fact under Unless', () => {
  it('really leads where it says, once it is entered', { timeout: 120_000 }, () => {
    fc.assert(fc.property(fc.oneof(arbitraryInputs, arbitraryContrastInputs), (inputs) => {
      const before = assess(inputs, rules)
      for (const clause of before.unless) {
        const then = applied(inputs, clause, before)
        if (then !== null) expectClaims(clause, before, assess(then, rules))
      }
    }), { numRuns: 250 })
  })

  it.each([[1.5, 2.2], [2.0, 1.5]])('also for an eGFR that crosses the hold, by a creatinine of %d that becomes %d', (value, later) => {
    const at = (mgPerDl: number) => ({ ...marta, readings: [creatinine(mgPerDl, '2026-11-30T14:00:00Z')] })
    const before = assess(at(value), rules)
    const clause = before.unless.find(each => each.flips === 'egfr')
    expect(clause).toBeDefined()
    if (clause !== undefined) expectClaims(clause, before, assess(at(later), rules))
  })
})
