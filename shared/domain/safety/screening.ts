import type { ScreeningAnswers } from './types'
import type { AssessedPatient } from '../assessment/types'
import type { ContrastOutcome } from '../contrast/outcome'
import type { Policy } from '../policy/types'
import { isIntravenous, usesContrast } from '../contrast/outcome'
import { pregnancyAsked } from './pregnancy'

export { pregnancyAsked } from './pregnancy'

/** Screening with nothing answered yet. */
export const emptyScreening: ScreeningAnswers = {
  kidneyDisease: null,
  kidneyRiskFactor: null,
  dialysis: null,
  nextDialysisAt: null,
  acuteIllness: null,
  liverDisease: null,
  earlierReaction: null,
  reactionAgent: null,
  reactionKind: null,
  reactionSeverity: null,
  asthma: null,
  pregnancy: null,
  breastfeeding: null,
  nephrogenicSystemicFibrosis: null,
  implants: null,
  implantDetail: '',
  specialNeeds: [],
}

/** A safety question: the field it fills. */
export type ScreeningQuestion = Exclude<keyof ScreeningAnswers, 'specialNeeds' | 'implantDetail'>

export interface ScreeningSituation {
  /** What the clinical question asks for; null while it is open, when every question may still matter. */
  outcome: ContrastOutcome | null
  patient: Pick<AssessedPatient, 'birthDate' | 'sex'>
  policy: Policy
  /** ISO instant. */
  now: string
}

/** Whether breastfeeding is asked: like pregnancy, wherever contrast may be given. */
export function breastfeedingAsked(patient: Pick<AssessedPatient, 'birthDate' | 'sex'>, policy: Policy, now: string): boolean {
  return pregnancyAsked(patient, policy, now)
}

/**
 * The safety questions that apply to this exam and patient, in the order they are asked.
 * Implants and pregnancy are asked for every scan; the rest only where contrast may be given; kidneys not for a joint.
 */
export function askedScreening(answers: ScreeningAnswers, situation: ScreeningSituation): ScreeningQuestion[] {
  const { outcome, patient, policy, now } = situation
  const contrast = outcome === null || outcome === 'discuss' || usesContrast(outcome)
  const vein = outcome === null || outcome === 'discuss' || isIntravenous(outcome)
  const asked: ScreeningQuestion[] = []
  if (vein) asked.push('kidneyDisease', 'kidneyRiskFactor', 'dialysis', 'acuteIllness', 'liverDisease')
  if (contrast) {
    asked.push('earlierReaction')
    if (answers.earlierReaction === 'yes') asked.push('reactionAgent', 'reactionKind', 'reactionSeverity')
    asked.push('asthma')
  }
  if (vein) asked.push('nephrogenicSystemicFibrosis')
  if (pregnancyAsked(patient, policy, now)) asked.push('pregnancy')
  if (contrast && breastfeedingAsked(patient, policy, now)) asked.push('breastfeeding')
  asked.push('implants')
  return asked
}

/**
 * The questions that must still be answered before a request is sent. "Not known" is an answer.
 * "Not applicable" is no answer to the pregnancy question where it applies.
 */
export function missingScreening(answers: ScreeningAnswers, situation: ScreeningSituation): ScreeningQuestion[] {
  return askedScreening(answers, situation).filter((question) => {
    const answer = answers[question]
    return answer === null || (question === 'pregnancy' && answer === 'not-applicable')
  })
}
