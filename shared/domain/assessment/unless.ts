import { DateTime } from 'luxon'
import type { Judgement } from './judge'
import type { AssessmentInputs, AssessmentRules, Clause } from './types'
import type { ClinicalQuestion, Decider } from '../guidance/types'
import type { KidneyFunction } from '../kidney/types'
import type { ScreeningAnswers } from '../safety/types'
import { isIntravenous, outcomeWords, usesContrast } from '../contrast/outcome'
import { answerLabel, decidedValues } from '../guidance/deciders'
import { kidneyHeld } from '../safety/kidney'
import { pregnancyAsked } from '../safety/pregnancy'
import { judge, kidneyOf } from './judge'
import { listed, needWords, windowWords } from './words'

/** At most this many, the most telling first. */
const mostClauses = 5
/** A fall of this many mL/min/1.73 m² is within reach between the sample and the exam. */
const reachEgfr = 30
/** Waiting this many days for a slot is within reach. */
const reachDays = 42

interface Change { fact: string, flips: string, weight: number, result: Judgement }

/**
 * The facts that would change the answer: each decider, safety answer and threshold within reach is flipped alone,
 * and kept where outcome, needs, agent or the need of a radiologist's word change.
 */
export function unlessClauses(inputs: AssessmentInputs, rules: AssessmentRules, base: Judgement): Clause[] {
  if (base.question === null) return []
  const changes = [
    ...deciderChanges(inputs, rules, base, base.question),
    ...(base.suggestion === null ? [] : [...screeningChanges(inputs, rules, base), ...thresholdChanges(inputs, rules, base)]),
  ]
  const kept = changes.flatMap((change) => {
    const effect = effectOf(base, change)
    return effect === null ? [] : [{ ...change, ...effect, rank: change.weight + (effect.leadsTo === null ? 0 : 100) }]
  })
  return merged(kept).sort((a, b) => b.rank - a.rank).slice(0, mostClauses)
    .map(({ fact, flips, leadsTo, words }) => ({ text: `${fact}: ${words}`, source: null, leadsTo, flips }))
}

/** Several options of one decider with one effect make one clause. */
function merged<T extends { fact: string, flips: string, words: string }>(changes: T[]): T[] {
  const first = new Map<string, T>()
  for (const change of changes) {
    const key = `${change.flips}|${change.words}`
    if (!first.has(key)) first.set(key, change)
  }
  return [...first.values()]
}

function effectOf(base: Judgement, { result: other, flips }: Change): { leadsTo: Clause['leadsTo'], words: string } | null {
  if (other.suggestion !== null && other.suggestion !== base.suggestion) {
    const reason = other.turnedBy === null && other.guidance?.status === 'answered' ? `, because ${other.guidance.inShort}` : ''
    return {
      leadsTo: other.suggestion,
      words: other.suggestion === 'discuss' ? `then a radiologist decides about contrast${reason}` : `then ${outcomeWords[other.suggestion].phrase}${reason}`,
    }
  }
  if (base.suggestion === null || other.suggestion === null) return null
  const words = preparationEffect(base, other, flips)
  return words === '' ? null : { leadsTo: null, words: `then ${words}` }
}

/** What changes around an unchanged outcome, weightiest first. */
function preparationEffect(base: Judgement, other: Judgement, flips: string): string {
  // "Not on dialysis: then no dialysis" tells nobody anything.
  const had = new Set(base.needs.map(need => need.kind).filter(kind => flips !== 'dialysis' || kind !== 'dialysis-after'))
  const has = new Set(other.needs.map(need => need.kind))
  // The radiologist's word is said as waiting, not as one more need.
  const added = [...has].filter(kind => !had.has(kind) && kind !== 'radiologist-word').map(kind => needWords[kind])
  const dropped = [...had].filter(kind => !has.has(kind) && kind !== 'radiologist-word').map(kind => needWords[kind])
  const best = other.agents?.ranked.find(entry => entry.agent === other.agents?.best)
  const words: string[] = []
  // Where contrast is left out either way, none waits for a word.
  if (base.suggestion !== 'none' && other.asksRadiologist !== base.asksRadiologist) {
    words.push(other.asksRadiologist ? 'contrast waits for a radiologist\'s word' : 'contrast no longer waits for a radiologist\'s word')
  }
  if (added.length > 0) words.push(`${listed(added)} ${added.length === 1 ? 'is' : 'are'} needed`)
  if (dropped.length > 0) words.push(`${listed(dropped)} ${dropped.length === 1 ? 'is' : 'are'} no longer needed`)
  if (best && base.agents && best.agent !== base.agents.best) words.push(base.agents.best === null ? `${best.name} fits` : `${best.name} is suggested instead`)
  return words.join('; ')
}

function deciderChanges(inputs: AssessmentInputs, rules: AssessmentRules, base: Judgement, question: ClinicalQuestion): Change[] {
  const relevant = base.guidance?.status === 'needs-answers' ? base.guidance.deciders : question.deciders.map(decider => decider.id)
  return question.deciders.filter(decider => relevant.includes(decider.id)).flatMap((decider, index) =>
    decidedValues(decider).filter(value => value !== inputs.answers[decider.id]).map(value => ({
      fact: deciderFact(decider, value),
      flips: decider.id,
      weight: 60 - index,
      result: judge({ ...inputs, answers: { ...inputs.answers, [decider.id]: value } }, rules, { kidney: base.kidney }),
    })))
}

function deciderFact(decider: Decider, value: string): string {
  return `“${decider.ask}” is answered “${answerLabel(decider, value)}”`
}

interface Flip { field: keyof ScreeningAnswers, weight: number, to: Partial<ScreeningAnswers>, fact: string }

/** Safety answers as facts: what would be so instead, and how telling it is beside the others. */
function screeningFlips({ screening, patient, now }: AssessmentInputs, { policy }: AssessmentRules, base: Judgement): Flip[] {
  const vein = base.wanted !== null && (isIntravenous(base.wanted) || base.wanted === 'discuss')
  const contrast = vein || (base.wanted !== null && usesContrast(base.wanted))
  if (!contrast) return []
  const flips: Flip[] = []
  if (pregnancyAsked(patient, policy, now)) {
    flips.push(screening.pregnancy === 'yes' || screening.pregnancy === 'possible'
      ? { field: 'pregnancy', weight: 50, to: { pregnancy: 'no' }, fact: 'The patient is not pregnant after all' }
      : { field: 'pregnancy', weight: 45, to: { pregnancy: 'yes' }, fact: 'The patient is pregnant' })
  }
  if (pregnancyAsked(patient, policy, now) && screening.pregnancy === 'unknown') {
    flips.push({ field: 'pregnancy', weight: 50, to: { pregnancy: 'no' }, fact: 'The patient turns out not to be pregnant' })
  }
  flips.push(screening.earlierReaction === 'yes'
    ? { field: 'earlierReaction', weight: 49, to: { earlierReaction: 'no' }, fact: 'There was no earlier reaction to a gadolinium agent' }
    : {
        field: 'earlierReaction', weight: 48, fact: 'The patient has reacted to a gadolinium agent before',
        to: { earlierReaction: 'yes', reactionAgent: 'unknown', reactionKind: 'unknown', reactionSeverity: 'unknown' },
      })
  if (!vein) return flips
  if (screening.dialysis === 'hemodialysis' || screening.dialysis === 'peritoneal' || screening.dialysis === 'unknown') {
    flips.push({ field: 'dialysis', weight: 46, to: { dialysis: 'none' }, fact: 'The patient is not on dialysis' })
  }
  // A patient answered as not on dialysis, with an estimate above the hold, is not on it after all.
  else if (screening.dialysis === null || base.kidney.gateEgfr === null || kidneyHeld(base.kidney, policy)) {
    flips.push({ field: 'dialysis', weight: 43, to: { dialysis: 'hemodialysis' }, fact: 'The patient is on hemodialysis' })
  }
  if (screening.acuteIllness !== 'yes') flips.push({ field: 'acuteIllness', weight: 42, to: { acuteIllness: 'yes' }, fact: 'The patient is acutely ill' })
  if (screening.kidneyRiskFactor !== 'yes') {
    flips.push({ field: 'kidneyRiskFactor', weight: 41, to: { kidneyRiskFactor: 'yes' }, fact: 'A kidney risk factor turns up, such as diabetes or treated high blood pressure' })
  }
  flips.push(screening.nephrogenicSystemicFibrosis === 'yes'
    ? { field: 'nephrogenicSystemicFibrosis', weight: 47, to: { nephrogenicSystemicFibrosis: 'no' }, fact: 'Nephrogenic systemic fibrosis is ruled out' }
    // Rare enough to stand behind every needs-only fact although it turns the outcome.
    : { field: 'nephrogenicSystemicFibrosis', weight: -80, to: { nephrogenicSystemicFibrosis: 'yes' }, fact: 'Nephrogenic systemic fibrosis is known' })
  return flips
}

/** Answers that move neither the kidney estimate nor the age its creatinine may have. */
const besideKidneys: readonly (keyof ScreeningAnswers)[] = ['pregnancy', 'earlierReaction', 'nephrogenicSystemicFibrosis']

function screeningChanges(inputs: AssessmentInputs, rules: AssessmentRules, base: Judgement): Change[] {
  return screeningFlips(inputs, rules, base).map(({ field, weight, to, fact }) => ({
    fact, flips: field, weight,
    result: judge({ ...inputs, screening: { ...inputs.screening, ...to } }, rules, besideKidneys.includes(field) ? { kidney: base.kidney } : {}),
  }))
}

function thresholdChanges(inputs: AssessmentInputs, rules: AssessmentRules, base: Judgement): Change[] {
  if (base.wanted === null || !isIntravenous(base.wanted)) return []
  const { kidney } = base
  const changes: Change[] = []
  const hold = rules.policy.holdBelowEgfr.value
  if (kidney.gateEgfr !== null && kidney.status === 'estimated') {
    const falls = kidney.gateEgfr >= hold
    if (Math.abs(kidney.gateEgfr - hold) <= reachEgfr) {
      const moved: KidneyFunction = { ...kidney, gateEgfr: falls ? hold - 1 : hold }
      changes.push({
        fact: falls ? `eGFR falls below ${hold}` : `eGFR recovers to ${hold} or more`, flips: 'egfr', weight: 55,
        result: judge(inputs, rules, { kidney: moved }),
      })
    }
  }
  if (kidney.range !== null) {
    for (const sex of ['female', 'male'] as const) {
      changes.push({
        fact: `The sex for the equation is ${sex}`, flips: 'sex', weight: 56,
        result: judge(inputs, rules, { kidney: kidneyOf({ ...inputs, patient: { ...inputs.patient, sex } }, rules) }),
      })
    }
  }
  const latest = lastAcceptedDay(kidney, rules.policy.department.timeZone)
  if (latest !== null && latest.diff(DateTime.fromISO(inputs.now), 'days').days <= reachDays) {
    changes.push({
      fact: `The exam is later than ${latest.setLocale('en-US').toFormat('LLLL d')}, ${windowWords(kidney.windowDays ?? 0)} after the creatinine`, flips: 'plannedAt', weight: 44,
      result: judge({ ...inputs, plannedAt: latest.plus({ days: 1, hours: 1 }).toUTC().toISO() }, rules),
    })
  }
  return changes
}

function lastAcceptedDay(kidney: KidneyFunction, zone: string): DateTime | null {
  if (kidney.currency !== 'current' || kidney.windowDays === null || kidney.creatinine === null) return null
  const latest = DateTime.fromISO(kidney.creatinine.collectedAt, { zone }).plus({ days: kidney.windowDays })
  return latest.isValid ? latest : null
}
