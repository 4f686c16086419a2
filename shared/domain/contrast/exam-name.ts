import type { ContrastOutcome } from './outcome'
import { isIntravenous } from './outcome'

const either = /^MRI or MR arthrogram\b/

/**
 * An exam's name once its contrast is known: "MRI or MR arthrogram shoulder" is an "MR arthrogram shoulder" with contrast in
 * the joint and an "MRI shoulder" otherwise. While contrast is open the name stays as guidance writes it, as do all others.
 */
export function examNameFor(name: string, outcome: ContrastOutcome | null): string {
  if (outcome === 'intra-articular') return name.replace(either, 'MR arthrogram')
  return outcome === 'none' || (outcome !== null && isIntravenous(outcome)) ? name.replace(either, 'MRI') : name
}
