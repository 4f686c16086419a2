import type { Source } from '../source'

/** What must be in place before the exam. Which ones apply is derived; what people did about them is stored. */
export const needKinds = [
  'creatinine', 'iv-start', 'pregnancy-answer', 'weight', 'height', 'premedication', 'dialysis-after', 'radiologist-word',
  'reaction-history', 'medication-guide', 'implant-clearance', 'interpreter', 'sedation', 'radiologist-present', 'observation',
] as const
export type NeedKind = (typeof needKinds)[number]

export const needOwners = ['ordering', 'scheduler', 'radiologist', 'scan-room'] as const
export type NeedOwner = (typeof needOwners)[number]

export interface Need {
  kind: NeedKind
  /** A short line, for instance "Creatinine drawn within 14 days of the exam". */
  text: string
  /** Why it is needed. */
  why: string
  owner: NeedOwner
  /** Latest moment, ISO instant; null while no slot is set or none applies. */
  dueAt: string | null
  /** Words for the due time, for instance "before the exam". */
  dueText: string
  source: Source
}

/** What people have done about a need; `open` where nothing yet. */
export const needStates = ['open', 'arranged', 'met', 'waived'] as const
export type NeedState = (typeof needStates)[number]
