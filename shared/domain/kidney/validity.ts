import { egfrLikeCreatinine } from './creatinine'
import type { CreatinineChoice } from './creatinine'
import { isAcute } from './injury'
import { parseInstant } from './instant'
import { kidneySources } from './sources'
import type { GfrEstimate, InjuryAssessment, KidneyCaution, LabReading } from './types'

/** The safety answers that bear on the kidneys; null is not answered yet, `unknown` is an answer and counts as a risk. */
export interface KidneyScreening {
  kidneyDisease: 'yes' | 'no' | 'unknown' | null
  kidneyRiskFactor: 'yes' | 'no' | 'unknown' | null
  dialysis: 'none' | 'hemodialysis' | 'peritoneal' | 'unknown' | null
  acuteIllness: 'yes' | 'no' | 'unknown' | null
  liverDisease: 'yes' | 'no' | 'unknown' | null
  pregnancy: 'yes' | 'no' | 'possible' | 'unknown' | 'not-applicable' | null
}

export interface ValidityInput {
  screening: KidneyScreening
  setting: 'outpatient' | 'inpatient' | 'emergency'
  recordState: 'complete' | 'incomplete' | 'unreachable' | 'not-read'
  choice: CreatinineChoice
  injury: InjuryAssessment
  egfr: GfrEstimate | null
  /** Where sex is not known. */
  range: { low: GfrEstimate, high: GfrEstimate } | null
  beside: GfrEstimate | null
  /** False where the birth date is known only to the month or year. */
  birthDateExact: boolean
  /** Only where a child's equation used it. */
  childHeight: { cm: number, dated: boolean } | null
}

/** Input limits of the CKiD U25 reference code. */
const u25Inputs = { heightCm: { low: 60, high: 200 }, mgPerDl: { low: 0.1, high: 10 } } as const

/** A limit up to here, mg/dL, is the lower end of a measuring range and not a cut-off for show (project convention). */
const belowRangeMgPerDl = 0.5

/** A reading that a person would want to know of although it could not be used. */
function isTelling(reading: LabReading): boolean {
  return reading.analyte === 'creatinine' && reading.status !== 'cancelled' && reading.status !== 'entered-in-error'
}

function patientCautions({ screening, setting, injury, choice }: ValidityInput): KidneyCaution[] {
  const cautions: KidneyCaution[] = []
  const { kdigoAki, equationLimits } = kidneySources
  if (isAcute(injury)) {
    cautions.push({ id: 'acute-injury', text: `${injury.text}. Creatinine lags behind kidney function by days, so the eGFR cannot be relied on`, source: kdigoAki })
  }
  else if (injury.status === 'insufficient' && (setting !== 'outpatient' || screening.acuteIllness === 'yes')) {
    cautions.push({ id: 'injury-not-judged', text: `${injury.text}. A clinician must judge it`, source: kdigoAki })
  }
  // On dialysis no number is given that an illness or a pregnancy could mislead.
  const onDialysis = screening.dialysis === 'hemodialysis' || screening.dialysis === 'peritoneal'
  if (!onDialysis && (screening.acuteIllness === 'yes' || screening.acuteIllness === 'unknown')) {
    const known = screening.acuteIllness === 'yes' ? 'Acute illness, dehydration or surgery in the last 7 days' : 'Acute illness in the last 7 days is not ruled out'
    cautions.push({ id: 'acute-illness', text: `${known}: kidney function may be changing`, source: kdigoAki })
  }
  if (screening.dialysis === 'unknown') {
    cautions.push({ id: 'dialysis-unknown', text: 'Whether the patient is on dialysis is not known; on dialysis an eGFR means nothing', source: equationLimits })
  }
  if (!onDialysis && choice.series.length > 0 && (screening.pregnancy === 'yes' || screening.pregnancy === 'possible')) {
    cautions.push({ id: 'pregnancy', text: 'In pregnancy creatinine is lower than usual and no equation holds', source: equationLimits })
  }
  if (screening.liverDisease === 'yes') {
    cautions.push({ id: 'liver-disease', text: 'In advanced liver disease the eGFR from creatinine is too high', source: equationLimits })
  }
  return cautions
}

function readingCautions({ choice, recordState }: ValidityInput): KidneyCaution[] {
  const cautions: KidneyCaution[] = []
  const source = kidneySources.reading
  const newest = choice.series.at(-1)
  if (newest === undefined) return cautions
  if (newest.mayBeEgfr) {
    cautions.push({ id: 'may-be-egfr', text: `A creatinine of ${egfrLikeCreatinine.low} mg/dL or more may be an eGFR filed as creatinine: check with the laboratory`, source })
  }
  if (newest.hadRival) {
    cautions.push({ id: 'two-results', text: 'Two results of the same moment differ; the worse one is used', source })
  }
  if (choice.tenfoldJump) {
    cautions.push({ id: 'tenfold-jump', text: 'Creatinine results differ more than tenfold: a unit may be wrong', source })
  }
  const aside = choice.passedOver.find(({ reading }) => isTelling(reading) && (parseInstant(reading.collectedAt) ?? 0) > newest.atMs)
  if (aside !== undefined) {
    cautions.push({ id: 'newer-set-aside', text: `A newer creatinine could not be used. Reason: ${aside.reason}`, source })
  }
  if (recordState !== 'complete') {
    const why = recordState === 'incomplete' ? 'was only partly read' : recordState === 'unreachable' ? 'could not be read' : 'has not been read'
    cautions.push({ id: `record-${recordState}`, text: `The hospital record ${why}: a newer creatinine may exist`, source })
  }
  return cautions
}

function equationCautions({ choice, egfr, range, beside, birthDateExact, childHeight }: ValidityInput): KidneyCaution[] {
  const cautions: KidneyCaution[] = []
  const { reading, ckidU25, ckdEpi2021, equationLimits } = kidneySources
  const newest = choice.series.at(-1)
  if (newest === undefined) return cautions
  if (newest.comparator !== null) {
    const side = newest.comparator.startsWith('<') ? 'below a limit: the eGFR is at least the value shown' : 'above a limit: the eGFR is at most the value shown'
    cautions.push({ id: 'bound', text: `The laboratory reports creatinine only as ${side}`, source: reading })
  }
  const muscle = egfr ?? range?.low ?? null
  const withCystatin = [egfr, beside].some(one => one?.equation === 'ckd-epi-2021-cr-cys')
  if (newest.comparator?.startsWith('<') && newest.mgPerDl <= belowRangeMgPerDl && muscle?.equation === 'ckd-epi-2021-cr' && !withCystatin) {
    cautions.push({
      id: 'low-muscle-mass', source: equationLimits,
      text: 'In an adult, a creatinine too low to measure suggests little muscle, and then the eGFR is too high: a cystatin C tells more',
    })
  }
  if (!birthDateExact) {
    cautions.push({ id: 'birth-date-partial', text: 'The day of birth is not known; the age with the lower eGFR is used', source: reading })
  }
  if (childHeight !== null) {
    const { heightCm, mgPerDl } = u25Inputs
    if (!childHeight.dated) cautions.push({ id: 'height-undated', text: 'When the height was measured is not known', source: reading })
    if (childHeight.cm < heightCm.low || childHeight.cm > heightCm.high || newest.mgPerDl < mgPerDl.low || newest.mgPerDl > mgPerDl.high) {
      cautions.push({ id: 'outside-equation', text: 'Height or creatinine lies outside the range that the equation was made for', source: ckidU25 })
    }
  }
  const pair = [egfr, beside].filter(one => one !== null)
  const combined = pair.find(one => one.equation === 'ckd-epi-2021-cr-cys')
  const alone = pair.find(one => one.equation === 'ckd-epi-2021-cr')
  if (combined !== undefined && alone !== undefined && combined.stage !== alone.stage) {
    cautions.push({
      id: 'cystatin-disagrees',
      text: `With cystatin C the eGFR is ${combined.display}, from creatinine alone ${alone.display}; unusual muscle mass, steroids, thyroid disease or inflammation can set them apart`,
      source: ckdEpi2021,
    })
  }
  return cautions
}

/**
 * Every reason in the data why an estimate may mislead, the gravest first. The number is shown only with these beside it.
 */
export function kidneyCautions(input: ValidityInput): KidneyCaution[] {
  return [...patientCautions(input), ...readingCautions(input), ...equationCautions(input)]
}
