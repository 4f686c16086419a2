import type { Assessment } from '../assessment/types'
import type { DecidableOutcome } from '../contrast/outcome'
import type { AgentId } from '../contrast/types'
import type { SafetyFinding } from '../safety/types'
import { outcomeWords, usesContrast } from '../contrast/outcome'

/** What a radiologist is about to sign. */
export interface DecisionDraft {
  contrast: DecidableOutcome
  agent: AgentId | null
  /** mmol per kg body weight; null without contrast and for a joint. */
  doseMmolPerKg: number | null
}

/** What must be said before the draft may be signed. */
export interface DecisionWeight {
  /** Each way in which the draft leaves the suggestion, as a sentence. */
  differs: string[]
  /** Findings that bar contrast or hold it for a radiologist, where the draft uses contrast. */
  against: SafetyFinding[]
  /** Why the chosen agent is left out for this patient; empty where it is eligible. */
  agentBarred: string[]
  /** A reason must be written: the draft differs from the suggestion or takes a barred or held choice. */
  reasonNeeded: boolean
  /** The radiologist's word must be given by name. */
  wordNeeded: boolean
  /** Signing asks once more, with everything above in view. */
  confirmNeeded: boolean
}

/**
 * Weighs a decision against the assessment. `suggestion` is the frozen suggestion; `found` holds findings and agents for the
 * contrast chosen, which are those of the suggestion only while the draft follows it.
 */
export function weighDecision(
  suggestion: Assessment['suggestion'],
  found: Pick<Assessment, 'findings' | 'agents' | 'asksRadiologist'>,
  draft: DecisionDraft,
): DecisionWeight {
  const used = usesContrast(draft.contrast)
  const ranked = found.agents?.ranked.find(candidate => candidate.agent === draft.agent) ?? null
  const differs: string[] = []
  if (suggestion !== null && suggestion !== 'discuss' && suggestion !== draft.contrast) {
    differs.push(`Suggested is ${outcomeWords[suggestion].phrase}, chosen ${outcomeWords[draft.contrast].phrase}.`)
  }
  const usual = ranked?.dose?.doseMmolPerKg ?? null
  if (used && usual !== null && draft.doseMmolPerKg !== null && draft.doseMmolPerKg !== usual) {
    differs.push(`The suggested dose is ${usual} mmol/kg, chosen ${draft.doseMmolPerKg} mmol/kg.`)
  }
  const agentBarred = used && ranked !== null && !ranked.eligible ? ranked.reasons : []
  const against = used ? found.findings.filter(item => item.severity === 'stop' || item.severity === 'hold') : []
  const wordNeeded = used && (suggestion === 'discuss' || found.asksRadiologist)
  return {
    differs,
    against,
    agentBarred,
    reasonNeeded: differs.length > 0 || against.length > 0 || agentBarred.length > 0,
    wordNeeded,
    confirmNeeded: against.length > 0 || agentBarred.length > 0 || wordNeeded,
  }
}
