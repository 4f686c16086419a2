import type { ContrastOutcome } from '../contrast/outcome'
import type { AgentId } from '../contrast/types'
import type { NeedKind } from '../assessment/needs'
import type { Source } from '../source'

export const safetyTopics = [
  'kidney', 'dialysis', 'reaction', 'pregnancy', 'breastfeeding', 'child', 'exposure', 'weight', 'condition', 'implant', 'history',
] as const
export type SafetyTopic = (typeof safetyTopics)[number]

/** `info` only informs; `caution` asks for attention; `hold` waits for a radiologist's word; `stop` bars. */
export const findingSeverities = ['info', 'caution', 'hold', 'stop'] as const
export type FindingSeverity = (typeof findingSeverities)[number]

export interface SafetyFinding {
  /** Stable, kebab-case, for instance `kidney-below-30`. */
  id: string
  topic: SafetyTopic
  severity: FindingSeverity
  text: string
  /** The same for the patient. */
  plain: string
  addsNeeds: NeedKind[]
  barsAgents: AgentId[]
  /** A named radiologist must give the word before contrast. */
  asksRadiologist: boolean
  /** The outcome suggested instead, null where the suggestion stands. */
  turns: ContrastOutcome | null
  source: Source
}

export type YesNoUnknown = 'yes' | 'no' | 'unknown'

/** Answers to the safety questions. Null means not answered yet; `unknown` is an answer and counts as a risk. */
export interface ScreeningAnswers {
  kidneyDisease: YesNoUnknown | null
  /** Hypertension under treatment, diabetes, gout, proteinuria, single kidney, kidney surgery or transplant. */
  kidneyRiskFactor: YesNoUnknown | null
  dialysis: 'none' | 'hemodialysis' | 'peritoneal' | 'unknown' | null
  /** Next hemodialysis session, ISO instant, where known. */
  nextDialysisAt: string | null
  /** Acute illness, sepsis, dehydration or surgery in the last 7 days. */
  acuteIllness: YesNoUnknown | null
  liverDisease: YesNoUnknown | null
  earlierReaction: YesNoUnknown | null
  reactionAgent: AgentId | 'unknown' | null
  reactionKind: 'allergic-like' | 'physiologic' | 'unknown' | null
  reactionSeverity: 'mild' | 'moderate' | 'severe' | 'unknown' | null
  asthma: YesNoUnknown | null
  /** `not-applicable`: male, or outside the ages asked by policy. */
  pregnancy: 'yes' | 'no' | 'possible' | 'unknown' | 'not-applicable' | null
  breastfeeding: YesNoUnknown | 'not-applicable' | null
  nephrogenicSystemicFibrosis: YesNoUnknown | null
  /** Pacemaker, pump, clip, metal: passed on to MR safety, not judged here. */
  implants: YesNoUnknown | null
  implantDetail: string
  specialNeeds: ('interpreter' | 'wheelchair' | 'claustrophobia' | 'sedation' | 'cannot-consent' | 'hard-iv-access')[]
}

/** An earlier gadolinium dose read from the record or the department's own ledger. */
export interface GadoliniumExposure {
  id: string
  agent: AgentId | null
  agentText: string
  givenAt: string
  amountMmol: number | null
  source: 'record' | 'ledger' | 'typed'
}
