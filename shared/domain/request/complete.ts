import type { Assessment, AssessmentInputs } from '../assessment/types'
import type { ClinicalQuestion } from '../guidance/types'
import type { Policy } from '../policy/types'
import { missingScreening } from '../safety/screening'
import type { RequestForm } from './form'

export interface MissingField { path: string, message: string }

/**
 * What a form still lacks before it may be sent, as field paths with words. The form asks the same before its last step, the
 * server before it takes the request.
 */
export function missingForSending(form: RequestForm, known: {
  question: ClinicalQuestion | null
  assessment: Assessment
  inputs: AssessmentInputs
  policy: Policy
}): MissingField[] {
  const missing: MissingField[] = []
  const { question, assessment, inputs, policy } = known
  if (!question) missing.push({ path: 'questionId', message: 'Choose the clinical question the scan should answer.' })
  for (const decider of question?.deciders ?? []) {
    const matters = assessment.guidance?.status !== 'needs-answers' || assessment.guidance.deciders.includes(decider.id)
    if (!form.answers[decider.id] && matters && assessment.guidance?.status === 'needs-answers') {
      missing.push({ path: `answers.${decider.id}`, message: 'Answer this, or say that it is not known.' })
    }
  }
  if (form.history.trim().length === 0) {
    missing.push({ path: 'history', message: 'Tell the radiologist the history in a sentence or two.' })
  }
  if (form.wish && form.wish.reason.trim().length === 0) {
    missing.push({ path: 'wish.reason', message: 'Say why you ask for something other than the suggestion.' })
  }
  const outcome = form.wish?.contrast ?? assessment.suggestion
  for (const field of missingScreening(form.screening, { outcome, patient: inputs.patient, policy, now: inputs.now })) {
    missing.push({ path: `screening.${field}`, message: 'Answer this, or say that it is not known.' })
  }
  if (!form.screeningConfirmed) {
    missing.push({ path: 'screeningConfirmed', message: 'Confirm that the safety answers are right.' })
  }
  return missing
}
