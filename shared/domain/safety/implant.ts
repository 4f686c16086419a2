import type { SafetyContext } from './context'
import type { SafetyFinding } from './types'
import { finding } from './finding'
import { safetySources } from './sources'

/** Implants are passed on to MR safety and never judged here; they matter with and without contrast. */
export function findImplants(context: SafetyContext): SafetyFinding[] {
  const answer = context.screening.implants
  if (answer !== 'yes' && answer !== 'unknown') return []
  const detail = context.screening.implantDetail.trim()
  return [finding({
    id: answer === 'yes' ? 'implant-declared' : 'implant-unknown', topic: 'implant', severity: 'caution',
    text: answer === 'yes'
      ? `Implant or metal declared${detail ? `: ${detail}` : ', not described'}. Passed on to MR safety, not judged here.`
      : 'Whether there is an implant or metal is not known: MR safety clears it by records, relatives or radiographs.',
    plain: answer === 'yes'
      ? 'You have an implant or metal in your body. Our team checks it before the scan.'
      : 'We need to know about any implant or metal in your body.',
    addsNeeds: ['implant-clearance'],
    source: safetySources.practice,
  })]
}
