import type { ContrastOutcome } from '../contrast/outcome'
import type { Answers } from '../guidance/types'
import type { LabReading } from '../kidney/types'
import type { ScreeningAnswers } from '../safety/types'
import type { Priority } from './priority'

/** What the clinician fills in, saved as they type. Nothing in it is computed. */
export interface RequestForm {
  region: string | null
  questionId: string | null
  answers: Answers
  priority: Priority
  setting: 'outpatient' | 'inpatient' | 'emergency'
  history: string
  /** Another wish than the suggestion; a reason goes with it. */
  wish: { contrast: ContrastOutcome, reason: string } | null
  weightKg: number | null
  heightCm: number | null
  screening: ScreeningAnswers
  /** Readings typed in because the record had none or could not be reached. */
  typedReadings: LabReading[]
  /** Whether the clinician confirmed the safety answers. */
  screeningConfirmed: boolean
  contactNumber: string
  /** The patient's agreement to details by e-mail, as asked by the clinician; null: not asked. */
  detailsByEmail: boolean | null
  /** E-mail the patient gave where the record has none or another. */
  patientEmail: string | null
}

export const formSteps = ['patient', 'question', 'contrast', 'safety', 'check'] as const
export type FormStep = (typeof formSteps)[number]
