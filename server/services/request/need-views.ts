import { assessDecision } from '#shared/domain/assessment/assess'
import type { Need } from '#shared/domain/assessment/needs'
import type { AssessmentInputs, AssessmentRules } from '#shared/domain/assessment/types'
import type { NeedView } from '#shared/types/views'
import type { needEvents } from '#server/database/schema/requests'
import type { DecisionRecord } from './stored'

export type NeedEvent = Pick<typeof needEvents.$inferSelect, 'kind' | 'state' | 'note' | 'at'> & { by: string | null }

/**
 * What the exam needs now, derived from its inputs and decision, with the newest word on each. `inputs` carry today's clock and
 * the slot, so that a result too old for a moved exam opens its need again by itself.
 */
export function needViews(facts: {
  inputs: AssessmentInputs
  rules: AssessmentRules
  decision: Pick<DecisionRecord, 'kind' | 'contrast' | 'agent'> | null
  suggested: readonly Need[]
  /** Newest first. */
  events: readonly NeedEvent[]
}): NeedView[] {
  const { decision, inputs } = facts
  if (decision?.kind === 'declined') return []
  const needs = decision?.contrast && decision.contrast !== 'discuss'
    ? assessDecision(inputs, facts.rules, { contrast: decision.contrast, agent: decision.agent }).needs
    : facts.suggested
  return needs.map((need) => {
    const event = facts.events.find(candidate => candidate.kind === need.kind)
    const state = event?.state ?? 'open'
    const settled = state === 'met' || state === 'waived'
    return {
      ...need,
      state,
      note: event?.note ?? '',
      by: event?.by ?? null,
      at: event?.at.toISOString() ?? null,
      overdue: !settled && need.dueAt !== null && need.dueAt < inputs.now,
    }
  })
}
