import type { ContrastOutcome } from '../contrast/outcome'
import type { Source } from '../source'

/** A fact that changes the answer. `yesno` takes `yes` or `no`; `choice` takes an option's id. `unknown` is always possible. */
export type Decider =
  | { id: string, ask: string, help?: string, kind: 'yesno' }
  | { id: string, ask: string, help?: string, kind: 'choice', options: { id: string, label: string }[] }

/** One row of the first-hit table. An empty `when` is "otherwise" and stands last. */
export interface Branch {
  when: Record<string, string[]>
  contrast: ContrastOutcome
  /** Fits after "because" in the headline sentence; lower case, no full stop. */
  inShort: string
  because: string
  /** The same for the patient, in plain words. */
  plain: string
}

export interface ClinicalQuestion {
  id: string
  region: string
  /** Plain exam name as a scheduler would say it, for instance "MRI brain". */
  exam: string
  question: string
  plainQuestion: string
  /** 1 rare to 5 very common (common practice). */
  volume: 1 | 2 | 3 | 4 | 5
  usualBranch: number
  deciders: Decider[]
  branches: Branch[]
  sources: Source[]
  commonError: string
  /** What to do when contrast is unsafe; null only where no answer uses contrast. */
  alternatives: string | null
  /** Words people type: synonyms, abbreviations. */
  searchWords: string[]
}

/** The guidance in force: content of one stored version. */
export interface Guidance {
  /** For instance "2026.1". */
  version: string
  questions: ClinicalQuestion[]
}

/** `unknown` stands for "not known"; a missing key means not answered yet. */
export type Answers = Record<string, string>

export type GuidanceResult =
  | { status: 'answered', contrast: ContrastOutcome, branch: number, inShort: string, because: string, plain: string,
    /** True where an answer is not known but every value it could take leads here. */
    despiteUnknown: boolean }
  | { status: 'needs-answers', /** Deciders that would settle it. */ deciders: string[], possible: ContrastOutcome[] }
