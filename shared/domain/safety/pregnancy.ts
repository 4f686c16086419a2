import type { AgeBounds } from './age'
import type { SafetyContext } from './context'
import type { SafetyFinding } from './types'
import type { AssessedPatient } from '../assessment/types'
import type { Policy } from '../policy/types'
import { ageBounds } from './age'
import { mayUseContrast } from './context'
import { finding } from './finding'
import { safetySources } from './sources'

/**
 * Whether pregnancy is asked: anyone not recorded as male, at the ages policy names.
 * An incomplete birth date asks whenever any age it allows is among them; an unreadable one always asks.
 */
export function pregnancyAsked(patient: Pick<AssessedPatient, 'birthDate' | 'sex'>, policy: Policy, now: string): boolean {
  return askedAt(patient.sex, ageBounds(patient.birthDate, now, policy.department.timeZone), policy)
}

function askedAt(sex: AssessedPatient['sex'], age: AgeBounds | null, policy: Policy): boolean {
  if (sex === 'male') return false
  if (age === null) return true
  const { from, to } = policy.pregnancyAskedAges.value
  return age.oldest >= from && age.youngest <= to
}

/** Pregnancy holds contrast for a radiologist; a scan without contrast is not withheld in any trimester. */
export function findPregnancy(context: SafetyContext): SafetyFinding[] {
  const answer = context.screening.pregnancy
  const contrast = mayUseContrast(context)
  const asked = pregnancyAsked(context.patient, context.policy, context.now)
  if (answer === 'yes' || answer === 'possible') {
    if (!contrast) {
      return [finding({
        id: 'pregnancy-without-contrast', topic: 'pregnancy', severity: 'info',
        text: `${answer === 'yes' ? 'Pregnant' : 'Possibly pregnant'}: a scan without contrast is not withheld in any trimester. The scan room has to know.`,
        plain: 'An MRI scan without contrast can be done in pregnancy. Please tell the team in the scan room.',
        source: safetySources.acogPregnancy,
      })]
    }
    return [answer === 'yes'
      ? finding({
          id: 'pregnancy-yes', topic: 'pregnancy', severity: 'hold',
          text: 'Pregnant: gadolinium crosses the placenta. Only if the exam is essential, cannot wait and contrast changes what is done; '
            + 'a radiologist decides. If given: a group II macrocyclic agent, lowest dose, consent recorded.',
          plain: 'You are pregnant. Contrast is left out unless your doctors agree that it is needed.',
          addsNeeds: ['radiologist-word'], asksRadiologist: true, turns: 'discuss',
          source: safetySources.acogPregnancy,
        })
      : finding({
          id: 'pregnancy-possible', topic: 'pregnancy', severity: 'hold',
          text: 'Pregnancy is possible: contrast waits until it is settled, or until a radiologist decides.',
          plain: 'You may be pregnant. We need to know before contrast is given.',
          addsNeeds: ['pregnancy-answer', 'radiologist-word'], asksRadiologist: true,
          source: safetySources.acogPregnancy,
        })]
  }
  if (!contrast || !asked || answer === 'no') return []
  return [finding({
    id: 'pregnancy-open', topic: 'pregnancy', severity: answer === 'unknown' ? 'hold' : 'caution',
    text: answer === 'unknown'
      ? 'Whether the patient is pregnant is not known: contrast waits for an answer, or for a radiologist.'
      : 'The pregnancy question has no answer yet.',
    plain: 'We need to know if you may be pregnant.',
    addsNeeds: answer === 'unknown' ? ['pregnancy-answer', 'radiologist-word'] : ['pregnancy-answer'], asksRadiologist: answer === 'unknown',
    source: safetySources.acogPregnancy,
  })]
}
