import type { ContrastOutcome } from '../contrast/outcome'
import type { AgentChoice, Agent } from '../contrast/types'
import type { Answers, Guidance, GuidanceResult } from '../guidance/types'
import type { KidneyFunction, LabReading, Sex } from '../kidney/types'
import type { Policy } from '../policy/types'
import type { Priority } from '../request/priority'
import type { GadoliniumExposure, SafetyFinding, ScreeningAnswers } from '../safety/types'
import type { Source } from '../source'
import type { Need } from './needs'

/** Changes whenever the same inputs could give another result; stored with every assessment. */
export const engineVersion = '1.1.0'

/** How the reading of the hospital record went. The last two are never merged with "none found". */
export type RecordState = 'complete' | 'incomplete' | 'unreachable' | 'not-read'

export interface AssessedPatient {
  /** YYYY-MM-DD, or YYYY-MM / YYYY where the record knows no more. */
  birthDate: string
  sex: Sex
  weightKg: number | null
  weightAt: string | null
  heightCm: number | null
  heightAt: string | null
}

/** Everything an assessment depends on. Plain data, kept with the result so that it can be replayed. */
export interface AssessmentInputs {
  /** ISO instant. The engine has no clock. */
  now: string
  /** Planned exam start, ISO instant; null while no slot is set. */
  plannedAt: string | null
  questionId: string | null
  answers: Answers
  priority: Priority
  setting: 'outpatient' | 'inpatient' | 'emergency'
  patient: AssessedPatient
  readings: LabReading[]
  record: { state: RecordState, readAt: string | null }
  screening: ScreeningAnswers
  exposures: GadoliniumExposure[]
}

/** Data the engine is handed beside the inputs: stored versions, never a constant of the code. */
export interface AssessmentRules { guidance: Guidance, policy: Policy, agents: readonly Agent[] }

/** One line under Because, Provided or Unless. */
export interface Clause {
  text: string
  source: Source | null
  /** For Provided: who owes it. */
  owner?: Need['owner']
  /** For Unless: the outcome it would lead to, null where it changes a need or an agent only. */
  leadsTo?: ContrastOutcome | null
  /** For Unless: the decider or screening answer that was flipped. */
  flips?: string
}

export interface Assessment {
  engineVersion: string
  guidanceVersion: string
  policyVersion: string
  assessedAt: string
  /** Null while no question is chosen. */
  exam: { questionId: string, region: string, name: string, question: string } | null
  guidance: GuidanceResult | null
  /** Guidance after safety findings; null while answers are missing. */
  suggestion: ContrastOutcome | null
  /** "MRI brain without and with contrast, because …", or what is still needed. */
  sentence: string
  kidney: KidneyFunction
  findings: SafetyFinding[]
  agents: AgentChoice | null
  needs: Need[]
  because: Clause[]
  provided: Clause[]
  unless: Clause[]
  /** True where a named radiologist's word is needed before contrast. */
  asksRadiologist: boolean
  /** For the patient, plain words: why, what to do before. */
  plain: { why: string, before: string[] }
  /** What to do when contrast is unsafe, from the guidance. */
  alternatives: string | null
}
