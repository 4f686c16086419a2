import type { AcrGroup, AgentId } from '../contrast/types'
import type { Priority } from '../request/priority'
import type { Source } from '../source'

/** A setting with where its value comes from; screens show all three. */
export interface Sourced<T> { value: T, source: Source, asOf: string }

/** What the department decides for itself. One stored version is in force at a time; every assessment names it. */
export interface Policy {
  version: string
  department: {
    name: string
    /** IANA zone, for instance "America/Chicago". All times on screens are in it. */
    timeZone: string
    phone: string
    /** What patients are told to call for, in words. */
    callHours: string
    address: string
  }
  /** Which published position on kidney function is followed. */
  kidneyPosition: Sourced<'label' | 'acr' | 'esur' | 'local'>
  /** Contrast waits for a radiologist's word below this eGFR, mL/min/1.73 m². */
  holdBelowEgfr: Sourced<number>
  /** Longest accepted age of a creatinine at the planned exam, days. Null: none needed. */
  creatinineWindowDays: Sourced<{
    noRiskFactor: number | null
    riskFactorStable: number
    egfr30To59: number
    egfrBelow30: number
    acute: number
  }>
  ageRiskAboveYears: Sourced<number>
  /** Ages in whole years at which pregnancy is asked. */
  pregnancyAskedAges: Sourced<{ from: number, to: number }>
  premedicationLeadHours: Sourced<{ oral: number, accelerated: number }>
  dialysisWithinHours: Sourced<number>
  weightLimitsKg: Sourced<{ low: number, high: number }>
  observationMinutes: Sourced<number>
  /** Shortest time between doses by eGFR band, hours. */
  repeatIntervalHours: Sourced<{ above60: Interval, from30To60: Interval, below30: Interval }>
  /** Agents on the shelf, in the department's preferred order. */
  stockedAgents: Sourced<AgentId[]>
  acrGroups: Sourced<Partial<Record<AgentId, AcrGroup>>>
  cannula: Sourced<{ usualGauge: string, powerGauge: string }>
  /** Promise from sending to decision, minutes, by priority. */
  decisionWithinMinutes: Sourced<Record<Priority, number>>
  /** Longest time an approved exam may stay unbooked, days. */
  bookWithinDays: Sourced<number>
  examMinutes: Sourced<{ base: number, ivStart: number, joint: number, liver: number }>
  links: Sourced<{ validDays: number, birthDateTries: number }>
}

interface Interval { optimal: number, least: number }
