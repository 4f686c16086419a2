import type { Source } from '../source'
import type { ContrastOutcome } from './outcome'

export const agentIds = [
  'gadobutrol', 'gadoterate', 'gadoteridol', 'gadopiclenol', 'gadobenate', 'gadoxetate',
  'gadopentetate', 'gadodiamide', 'gadoversetamide', 'gadofosveset',
] as const
export type AgentId = (typeof agentIds)[number]

export type AcrGroup = 'I' | 'II' | 'III' | 'not listed'

/** One gadolinium-based contrast agent, by its generic name. */
export interface Agent {
  id: AgentId
  name: string
  /** Other spellings met in records, lower case. */
  synonyms: string[]
  structure: 'macrocyclic' | 'linear'
  /** Charge of the ligand; the net charge adds 3 for Gd3+. */
  ligandCharge: number
  /** ACR group and the date it was taken over: a department setting, since groups move. */
  acrGroup: AcrGroup
  acrGroupAsOf: string
  concentrationMmolPerMl: number
  /** Labelled adult dose, mmol per kg body weight. */
  doseMmolPerKg: number
  /** Youngest labelled age in years; null where children are not labelled. */
  youngestLabelledAgeYears: number | null
  /** 4 highest to 1 lowest: linear non-ionic, linear ionic, macrocyclic non-ionic, macrocyclic ionic (common practice). */
  structureRank: 1 | 2 | 3 | 4
  liverUptake: boolean
  intraArticularCommon: boolean
  relaxivity: { r1At1_5T: number | null, r2At1_5T: number | null, r1At3T: number | null, r2At3T: number | null }
  source: Source
}

export type DoseCheck = 'ok' | 'check-weight' | 'age-below-label'

/** Amount and volume for checking only; a person prescribes. */
export interface Dose {
  doseMmolPerKg: number
  weightKg: number
  amountMmol: number
  volumeMl: number
  /** Rounded for show: to 0.01 mL below 5 mL, else 0.1 mL. */
  volumeDisplay: string
  amountDisplay: string
  checks: DoseCheck[]
}

/** An agent with its place for this exam and patient, or why it is left out. */
export interface RankedAgent {
  agent: AgentId
  name: string
  /** For instance "macrocyclic, non-ionic, group II". */
  descriptor: string
  concentrationMmolPerMl: number
  eligible: boolean
  /** Why it stands here, or each reason it is left out. */
  reasons: string[]
  /** Also of an agent left out, since a radiologist may choose one with a reason; lists show it for the others only. Null without a weight, or for a joint. */
  dose: Dose | null
}

export interface AgentChoice { outcome: ContrastOutcome, ranked: RankedAgent[], best: AgentId | null }
