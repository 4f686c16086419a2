import { DateTime } from 'luxon'
import type { Policy } from '../policy/types'
import type { Priority } from '../request/priority'
import { ageAt, sampleAgeWords } from './age'
import { chooseCreatinine, chooseCystatinC } from './creatinine'
import type { CreatinineChoice } from './creatinine'
import { estimateGfr } from './equation-choice'
import type { EstimateInput } from './equation-choice'
import { kidneyHeadline } from './headline'
import { assessInjury, isAcute } from './injury'
import { requireInstant } from './instant'
import { creatinineWindow, judgeCurrency } from './recency'
import type { KidneyFunction, KidneyStatus, LabReading, Sex } from './types'
import { kidneyCautions } from './validity'
import type { KidneyScreening } from './validity'

/** What an evaluation depends on. An assessed patient and the full answers and policy fit as they are. */
export interface KidneyInput {
  /** ISO instant. */
  now: string
  /** Planned exam start, ISO instant; null while none is set. */
  plannedAt: string | null
  patient: {
    /** YYYY-MM-DD, YYYY-MM or YYYY. */
    birthDate: string
    sex: Sex
    heightCm: number | null
    heightAt: string | null
  }
  readings: readonly LabReading[]
  record: { state: 'complete' | 'incomplete' | 'unreachable' | 'not-read' }
  screening: KidneyScreening
  setting: 'outpatient' | 'inpatient' | 'emergency'
  priority?: Priority
  policy: Pick<Policy, 'creatinineWindowDays' | 'ageRiskAboveYears' | 'holdBelowEgfr'> & { department: Pick<Policy['department'], 'timeZone'> }
}

/** A height taken for a growing child, or why there is none: older than twelve months it must be measured again. */
function usableHeight({ patient, now }: KidneyInput): { cm: number, dated: boolean } | null {
  if (patient.heightCm === null || !(patient.heightCm > 0)) return null
  if (patient.heightAt === null) return { cm: patient.heightCm, dated: false }
  const measured = DateTime.fromISO(patient.heightAt, { zone: 'utc' })
  if (!measured.isValid) return { cm: patient.heightCm, dated: false }
  return measured.plus({ years: 1 }) >= DateTime.fromMillis(requireInstant(now), { zone: 'utc' }) ? { cm: patient.heightCm, dated: true } : null
}

/** What the estimates of one patient have in common, whichever sample they are made from. */
type Common = Pick<EstimateInput, 'sex' | 'heightCm' | 'gates'>

/** Missing, not looked for and not readable are three states; they are never merged. */
function statusWithoutCreatinine(state: KidneyInput['record']['state']): KidneyStatus {
  if (state === 'complete') return 'no-creatinine'
  return state === 'not-read' ? 'not-looked' : 'could-not-look'
}

/** The trend: each usable creatinine with its eGFR from creatinine alone, so that all points are comparable. */
function trend({ patient, policy }: KidneyInput, common: Common, choice: CreatinineChoice, onDialysis: boolean): KidneyFunction['series'] {
  return choice.series.map((point) => {
    const outcome = onDialysis
      ? null
      : estimateGfr({ ...common, creatinine: point, cystatinC: null, ages: ageAt(patient.birthDate, point.atMs, policy.department.timeZone) })
    return {
      collectedAt: point.collectedAt, mgPerDl: point.mgPerDl, comparator: point.comparator,
      egfr: outcome?.status === 'estimated' ? outcome.egfr.value : null,
    }
  })
}

/**
 * Everything that may be said about a patient's kidneys from what was found: the newest usable creatinine, the estimate
 * that age and data allow, signs of acute injury, reasons for doubt, and whether policy accepts the sample's age at the
 * planned exam (at `now` while none is planned). On dialysis no number is given.
 *
 * `gateEgfr` reckons with the worse of what is open: the lower of a range, the lower of creatinine alone and with cystatin C
 * unless the latter leads, and 0 for a result known only as "above". Acute injury does not change it: see `countsAsBelow`.
 *
 * @throws RangeError where `now` or `plannedAt` is no ISO instant
 */
export function evaluateKidney(input: KidneyInput): KidneyFunction {
  const { screening, patient, policy } = input
  const nowMs = requireInstant(input.now)
  const examMs = input.plannedAt === null ? nowMs : requireInstant(input.plannedAt)
  const onDialysis = screening.dialysis === 'hemodialysis' || screening.dialysis === 'peritoneal'
  const timeZone = policy.department.timeZone

  const choice = chooseCreatinine(input.readings, input.now)
  const newest = choice.series.at(-1) ?? null
  const cystatinC = chooseCystatinC(input.readings, input.now, newest?.atMs ?? null)
  const agesAtSample = newest === null ? null : ageAt(patient.birthDate, newest.atMs, timeZone)
  const agesAtExam = ageAt(patient.birthDate, examMs, timeZone)
  const height = usableHeight(input)
  const common: Common = { sex: patient.sex, heightCm: height?.cm ?? null, gates: [policy.holdBelowEgfr.value] }
  const outcome = newest === null || onDialysis
    ? null
    : estimateGfr({ ...common, creatinine: newest, cystatinC: cystatinC.mgPerL === null ? null : cystatinC, ages: agesAtSample })

  const injury = assessInjury({
    series: choice.series, ageYears: agesAtSample?.youngest.decimalYears ?? null, heightCm: height?.cm ?? null,
    dialysis: onDialysis ? 'chronic' : 'none',
  })
  const egfr = outcome?.status === 'estimated' ? outcome.egfr : null
  const range = outcome?.status === 'needs-sex' ? outcome.range : null
  const beside = outcome?.status === 'estimated' || outcome?.status === 'needs-sex' ? outcome.beside : null
  const gateEgfr = outcome?.status === 'estimated' || outcome?.status === 'needs-sex' ? outcome.gateEgfr : null

  const window = creatinineWindow({
    policy, screening, setting: input.setting, stat: input.priority === 'stat', injury, gateEgfr,
    ageYears: agesAtExam?.oldest.completedYears ?? null, underOne: agesAtExam !== null && agesAtExam.youngest.completedYears < 1,
  })
  const shown = {
    status: onDialysis ? 'dialysis' : outcome?.status ?? statusWithoutCreatinine(input.record.state),
    egfr,
    range,
    creatinine: choice.chosen,
    ageWords: newest === null ? null : sampleAgeWords(newest.atMs, nowMs, timeZone),
    currency: judgeCurrency(newest?.atMs ?? null, examMs, window),
    injury,
    passedOver: [...choice.passedOver, ...cystatinC.passedOver],
  } satisfies Partial<KidneyFunction>

  return {
    ...shown,
    headline: kidneyHeadline({ ...shown, recordState: input.record.state, infant: outcome?.status === 'no-equation' && outcome.why === 'infant' }),
    beside,
    gateEgfr,
    windowDays: window.days,
    windowReason: window.reason,
    cautions: kidneyCautions({
      screening, setting: input.setting, recordState: input.record.state, choice, injury, egfr, range, beside,
      birthDateExact: agesAtSample?.exact ?? true,
      childHeight: egfr?.equation === 'ckid-u25-cr' || range?.low.equation === 'ckid-u25-cr' ? height : null,
    }),
    series: trend(input, common, choice, onDialysis),
  }
}

/**
 * Whether a gate must treat the kidneys as below a threshold: the estimate is, or may be; the patient is on dialysis; or
 * acute injury or an unsteady creatinine makes the estimate worthless. An unknown estimate alone is not "below": it is
 * its own state, see `status`.
 *
 * @param threshold mL/min/1.73 m²
 */
export function countsAsBelow(kidney: Pick<KidneyFunction, 'status' | 'gateEgfr' | 'injury'>, threshold: number): boolean {
  return kidney.status === 'dialysis' || isAcute(kidney.injury) || (kidney.gateEgfr !== null && kidney.gateEgfr < threshold)
}
