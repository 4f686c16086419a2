import type { Source } from '../source'

export const observationStatuses = [
  'registered', 'preliminary', 'final', 'amended', 'corrected', 'cancelled', 'entered-in-error', 'unknown',
] as const
export type ObservationStatus = (typeof observationStatuses)[number]

export type Comparator = '<' | '<=' | '>=' | '>'
export type Sex = 'female' | 'male' | 'other' | 'unknown'

/** One laboratory or typed-in result, as found; nothing is converted or dropped before the domain judges it. */
export interface LabReading {
  /** Observation id, `Observation-id#component` for a panel part, or the id of a typed-in value. */
  id: string
  analyte: 'creatinine' | 'cystatin-c'
  source: 'record' | 'typed'
  /** Who it comes from, in words: a laboratory, a hospital, or the clinician who typed it. */
  sourceLabel: string
  value: number | null
  comparator: Comparator | null
  /** The unit exactly as sent, or null where none was sent. */
  unit: string | null
  /** Collection instant, ISO 8601 in UTC; null where unknown. */
  collectedAt: string | null
  /** The collection time exactly as sent. */
  collectedText: string | null
  /** `day`: only a date was sent, `collectedAt` is its start in the department's zone. */
  precision: 'instant' | 'day' | 'unknown'
  /** When this version was released, ISO 8601 in UTC; orders versions, never stands for the collection time. */
  issuedAt: string | null
  status: ObservationStatus
  /** Why the reader already refused it (urine specimen, another patient, value as text, hidden value), else null. */
  refusal: string | null
}

/** A reading that was not used, with the reason in words a clinician understands. */
export interface PassedOver { reading: LabReading, reason: string }

/** The newest usable creatinine. */
export interface ChosenCreatinine {
  reading: LabReading
  mgPerDl: number
  umolPerL: number
  comparator: Comparator | null
  collectedAt: string
  /** Elapsed whole days from collection to `now`. */
  ageDays: number
}

export const equationIds = ['ckd-epi-2021-cr', 'ckd-epi-2021-cr-cys', 'ckd-epi-2012-cys', 'ckid-u25-cr', 'schwartz-2009'] as const
export type EquationId = (typeof equationIds)[number]

export const gfrStages = ['G1', 'G2', 'G3a', 'G3b', 'G4', 'G5'] as const
export type GfrStage = (typeof gfrStages)[number]

/** An estimated GFR in mL/min/1.73 m². */
export interface GfrEstimate {
  /** Unrounded; gates use this one. */
  value: number
  /** What a screen shows; never contradicts a gate (29.6 stays "29.6"). */
  display: string
  /** `at-least`: from a creatinine with `<`. `at-most`: from `>`. */
  bound: 'exact' | 'at-least' | 'at-most'
  equation: EquationId
  /** For instance "CKD-EPI 2021". */
  equationLabel: string
  /** The age the equation was given, years. */
  ageYears: number
  stage: GfrStage
}

/** KDIGO acute kidney injury, read from the creatinine series. `insufficient` never means "none". */
export interface InjuryAssessment {
  status: 'aki' | 'aki-presumed' | 'recent-aki' | 'none' | 'insufficient' | 'not-applicable'
  stageCurrent: 0 | 1 | 2 | 3 | null
  stagePeak: 0 | 1 | 2 | 3 | null
  /** Null where it cannot be judged. */
  steady: boolean | null
  rule: string
  text: string
}

/** A reason why an estimate may mislead, shown beside it. */
export interface KidneyCaution { id: string, text: string, source: Source }

export const kidneyStatuses = [
  'estimated', 'no-creatinine', 'could-not-look', 'not-looked', 'needs-height', 'needs-sex', 'no-equation', 'dialysis',
] as const
export type KidneyStatus = (typeof kidneyStatuses)[number]

/** Everything a screen or rule may say about the kidneys. */
export interface KidneyFunction {
  status: KidneyStatus
  /** Words for the status, for instance "No creatinine found in the record". */
  headline: string
  /** Null wherever a number would mislead. */
  egfr: GfrEstimate | null
  /** A second equation shown beside the main one (bedside Schwartz, or creatinine alone beside the combined). */
  beside: GfrEstimate | null
  /** Where sex is not known: both results; gates use `low`. */
  range: { low: GfrEstimate, high: GfrEstimate } | null
  /** The lowest value a gate must reckon with, unrounded, mL/min/1.73 m²; null where unknown. */
  gateEgfr: number | null
  creatinine: ChosenCreatinine | null
  /** Age of the sample in words, for instance "19 days old". */
  ageWords: string | null
  /** Whether policy accepts the sample's age at the planned exam time. */
  currency: 'current' | 'too-old' | 'missing' | 'not-needed'
  /** Longest accepted age in days, null where none is set. */
  windowDays: number | null
  /** Why that window applies, in words. */
  windowReason: string
  injury: InjuryAssessment
  cautions: KidneyCaution[]
  passedOver: PassedOver[]
  /** Usable series, oldest first, for the trend. */
  series: { collectedAt: string, mgPerDl: number, comparator: Comparator | null, egfr: number | null }[]
}
