import type { NeedKind } from '../assessment/needs'
import type { DecidableOutcome } from '../contrast/outcome'
import type { Policy } from '../policy/types'

/** How long an exam takes on the scanner's calendar, minutes, from the department's lengths. */
export function examMinutes(contrast: DecidableOutcome | null, needs: readonly NeedKind[], policy: Policy): number {
  const { base, ivStart, joint, liver } = policy.examMinutes.value
  let minutes: number = base
  if (needs.includes('iv-start')) minutes += ivStart
  if (contrast === 'intra-articular') minutes += joint
  if (contrast === 'iv-hepatobiliary') minutes += liver
  if (needs.includes('observation')) minutes += policy.observationMinutes.value
  return minutes
}
