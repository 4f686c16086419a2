import type { Policy } from '../policy/types'
import { isAcute } from './injury'
import { dayMs } from './instant'
import type { InjuryAssessment } from './types'
import type { KidneyScreening } from './validity'

/** The part of the policy that says how old a creatinine may be. */
export type RecencyPolicy = Pick<Policy, 'creatinineWindowDays' | 'ageRiskAboveYears'>

export interface WindowInput {
  policy: RecencyPolicy
  screening: KidneyScreening
  setting: 'outpatient' | 'inpatient' | 'emergency'
  stat: boolean
  injury: InjuryAssessment
  /** The lowest value to reckon with; null where there is no estimate. */
  gateEgfr: number | null
  /** Completed years, the older end where the birth date is partial; null where unknown. */
  ageYears: number | null
  /** Whether the patient may be under one year old at the exam, where no equation estimates GFR. */
  underOne: boolean
}

/** The longest accepted age in days, null where none is set, and why, in words. */
export interface CreatinineWindow { days: number | null, reason: string }

/** Why a creatinine may have changed within days, or null. */
function acuteReason({ screening, setting, stat, injury }: WindowInput): string | null {
  if (isAcute(injury)) return 'Acute kidney injury or an unsteady creatinine'
  if (screening.acuteIllness === 'yes') return 'Acute illness'
  if (screening.acuteIllness === 'unknown') return 'Acute illness not ruled out'
  if (setting === 'emergency' || stat) return 'Emergency'
  return setting === 'inpatient' ? 'Inpatient' : null
}

/** The first kidney risk in the answers, or null where all are answered with no. */
function riskReason({ screening, policy, ageYears }: WindowInput): string | null {
  if (screening.kidneyDisease === 'yes') return 'Kidney disease'
  if (screening.kidneyRiskFactor === 'yes') return 'A kidney risk factor'
  if (screening.liverDisease === 'yes') return 'Liver disease'
  if (ageYears === null) return 'Age not known'
  if (ageYears > policy.ageRiskAboveYears.value) return `Age over ${policy.ageRiskAboveYears.value}`
  const answers = [screening.kidneyDisease, screening.kidneyRiskFactor, screening.liverDisease, screening.dialysis, screening.acuteIllness]
  if (answers.includes('unknown')) return 'A kidney risk not ruled out'
  return answers.includes(null) ? 'Kidney questions not all answered' : null
}

function inDays(reason: string, days: number): CreatinineWindow {
  return { days, reason: `${reason}: creatinine at most ${days === 1 ? '1 day' : `${days} days`} old at the exam` }
}

/**
 * How old a creatinine may be for this patient. The days come from the department's policy; which of them applies follows
 * from the situation, the most pressing first. There is no universal figure in the literature.
 */
export function creatinineWindow(input: WindowInput): CreatinineWindow {
  const days = input.policy.creatinineWindowDays.value
  if (input.screening.dialysis === 'hemodialysis' || input.screening.dialysis === 'peritoneal') {
    return { days: null, reason: 'On dialysis: already in the group with the highest risk, no creatinine is needed' }
  }
  if (input.underOne) return { days: null, reason: 'Under 1 year of age: no equation uses a creatinine; a radiologist decides with the pediatric team' }
  const acute = acuteReason(input)
  if (acute !== null) return inDays(acute, days.acute)
  if (input.gateEgfr !== null && input.gateEgfr < 30) return inDays('Last eGFR below 30', days.egfrBelow30)
  if (input.gateEgfr !== null && input.gateEgfr < 60) return inDays('Last eGFR 30 to 59', days.egfr30To59)
  const risk = riskReason(input)
  if (risk !== null) return inDays(risk, days.riskFactorStable)
  return days.noRiskFactor === null
    ? { days: null, reason: 'No kidney risk factor: policy asks for no creatinine' }
    : inDays('No kidney risk factor', days.noRiskFactor)
}

/**
 * Whether policy accepts the sample's age at the planned exam; the last moment still counts.
 *
 * @param collectedMs when the sample was drawn, null where there is none
 * @param examMs planned start of the exam, or now while none is set
 */
export function judgeCurrency(
  collectedMs: number | null, examMs: number, window: CreatinineWindow,
): 'current' | 'too-old' | 'missing' | 'not-needed' {
  if (window.days === null) return 'not-needed'
  if (collectedMs === null) return 'missing'
  return examMs - collectedMs <= window.days * dayMs ? 'current' : 'too-old'
}
