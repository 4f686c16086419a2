import type { LabReading, Sex } from '../kidney/types'
import type { GadoliniumExposure, ScreeningAnswers } from '../safety/types'

/** The person as the hospital record knows them. Nothing is guessed: what the record does not say is null. */
export interface RecordPatient {
  /** Logical id on the hospital's FHIR server, without `Patient/`. */
  ehrId: string
  /** The hospital's record number, under the configured identifier system where one is set. */
  recordNumber: string | null
  familyName: string | null
  givenName: string | null
  /** For a screen: "Marta Lindqvist", or the text the record holds where it has no parts. */
  displayName: string
  /** YYYY-MM-DD, or YYYY-MM / YYYY where the record knows no more. */
  birthDate: string | null
  /** Administrative. `other` and `unknown` mean the equation must ask. */
  sex: Sex
  email: string | null
  phone: string | null
  /** Preferred language, BCP 47, for instance "es". */
  language: string | null
  deceased: boolean
  /** False where the record is marked no longer in use. */
  active: boolean
  /** The record that took this one's place: order there instead. */
  replacedBy: string | null
}

/**
 * How looking for one part went. `none` means looked and found nothing; `could-not-look` says nothing about the
 * patient at all. The two are never merged.
 */
export type PartState = 'found' | 'none' | 'could-not-look'

/** Why a part could not be looked at, or not to its end. */
export type PartProblem =
  | 'unreachable' | 'busy' | 'not-connected' | 'refused' | 'not-found' | 'not-offered' | 'unreadable' | 'cut-short' | 'other-patient'

export const recordPartNames = [
  'patient', 'laboratory', 'weight', 'height', 'pregnancy', 'conditions', 'allergies', 'exposures',
] as const
export type RecordPartName = (typeof recordPartNames)[number]

export interface RecordPart {
  state: PartState
  /** False where more may exist than was read: a page was missing, or rows of another patient were dropped. */
  complete: boolean
  problem: PartProblem | null
  /** What happened, for a clinician, without patient data; null where nothing did. */
  words: string | null
}

/** A suggestion for one safety question, from the record. A person confirms it; it is never an answer by itself. */
export type ScreeningHint = {
  [Field in keyof ScreeningAnswers]: {
    field: Field
    value: NonNullable<ScreeningAnswers[Field]>
    /** The record's own words for it, for instance "Problem list: end-stage kidney disease (N18.6)". */
    because: string
    /** When the record noted it, ISO 8601 (instant in UTC, or a date); null where unknown. */
    recordedAt: string | null
  }
}[keyof ScreeningAnswers]

/** Weight, kg, newest usable. */
export interface RecordWeight { kg: number, at: string, observationId: string }

/** Height, cm, newest usable. */
export interface RecordHeight { cm: number, at: string, observationId: string }

/** An estimated GFR the laboratory sent, shown beside ours and never used in its place. */
export interface LaboratoryEgfr {
  observationId: string
  value: number
  comparator: '<' | '<=' | '>=' | '>' | null
  unit: string | null
  /** For instance "CKD-EPI 2009"; "formula not stated" where the code does not say. */
  formula: string
  collectedAt: string | null
}

export interface RecordWarning {
  id:
    | 'deceased' | 'inactive' | 'replaced' | 'birth-date-differs' | 'birth-date-partial' | 'row-of-another-patient'
    | 'unrecognized-code' | 'server-message' | 'not-offered' | 'reaction-to-confirm' | 'hidden-value' | 'skipped-row'
  text: string
}

/** Everything one reading of the hospital record brought. Plain data, kept with the request. */
export interface RecordReading {
  /**
   * `complete`: all that the server offers was read to its end. `incomplete`: some part was not; what is here is real but
   * may not be all. `unreachable`: nothing could be read.
   */
  state: 'complete' | 'incomplete' | 'unreachable'
  /** ISO instant the reading began. */
  readAt: string
  /** The id asked for. */
  ehrPatientId: string
  parts: Record<RecordPartName, RecordPart>
  patient: RecordPatient | null
  /** Every creatinine and cystatin C seen, refused ones too, newest first. */
  readings: LabReading[]
  laboratoryEgfr: LaboratoryEgfr[]
  weight: RecordWeight | null
  height: RecordHeight | null
  hints: ScreeningHint[]
  exposures: GadoliniumExposure[]
  /** One short line each, for instance "Gadobutrol: severe, anaphylaxis (2022)". */
  allergies: string[]
  /** True only where the record says outright that there is no known allergy. */
  noKnownAllergy: boolean
  /** One short line each, present ones only. */
  conditions: string[]
  warnings: RecordWarning[]
}

/** What a patient search brought. Never picks: with several, a person chooses. */
export interface PatientSearch {
  outcome: 'one' | 'several' | 'none'
  patients: RecordPatient[]
  /** False where the server had more than was read; `none` is then not certain. */
  complete: boolean
  words: string | null
}

/** State of the connection's circuit breaker. */
export interface BreakerState {
  state: 'closed' | 'open' | 'half-open'
  /** Failures counted in the last 60 s. */
  failures: number
  /** ISO instant from which a call is tried again; null while closed. */
  retryAt: string | null
}

/** Answer of the connection check for the health screen. */
export interface ConnectionReport {
  state: 'ok' | 'degraded' | 'unreachable' | 'not-configured'
  /** Words for an administrator. */
  words: string
  checkedAt: string
  fhirVersion: string | null
  software: string | null
  /** Resource types the reading needs that the server does not offer. */
  missing: string[]
  breaker: BreakerState | null
  elapsedMs: number | null
}
