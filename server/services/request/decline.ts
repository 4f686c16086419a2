import type { WriteResult } from '#shared/types/views'
import { decisions } from '#server/database/schema/requests'
import { enqueue } from '#server/jobs/queue'
import { userOf } from '../context'
import type { ServiceContext } from '../context'
import { StateConflict } from '../errors'
import { callOffLetters } from '../letter/queue-letter'
import { changeRequest } from './change'
import { noSlot } from './slot'

/** Declines with a reason and what would help instead; a held slot is given back, and who had been told is told. */
export async function declineRequest({ ctx, input }: {
  ctx: ServiceContext
  input: { id: string, version: number, reason: string, helpInstead: string }
}): Promise<WriteResult> {
  const actor = userOf(ctx)
  return await changeRequest(ctx, {
    id: input.id,
    version: input.version,
    action: 'request.decline',
    step: 'decline',
    apply: async (tx, loaded) => {
      const { request } = loaded
      if (!request.currentAssessmentId) throw new StateConflict('A request without an assessment cannot be decided.')
      const [decision] = await tx.insert(decisions).values({
        requestId: request.id,
        kind: 'declined',
        declineReason: input.reason,
        helpInstead: input.helpInstead || null,
        assessmentId: request.currentAssessmentId,
        signedById: actor.userId,
        signedAt: ctx.now,
        supersedesId: request.currentDecisionId,
      }).returning({ id: decisions.id })
      if (!decision) throw new Error('the decision was not stored')
      await callOffLetters(tx, ctx, loaded)
      await enqueue(tx, 'notify-clinician', { requestId: request.id, event: 'decision' }, { key: `notify-${request.id}-decision`, runAt: new Date(ctx.now.getTime() + 60_000) })
      return {
        set: { currentDecisionId: decision.id, decidedAt: ctx.now, replyWaiting: false, awaiting: null, ...noSlot },
        audit: 'request.decline',
        detail: { hadSlot: request.slotStartsAt !== null },
      }
    },
  })
}
