import { undoSeconds } from '#shared/domain/request/lifecycle'
import type { WriteResult } from '#shared/types/views'
import { userOf } from '../context'
import type { ServiceContext } from '../context'
import { StateConflict } from '../errors'
import { changeRequest } from './change'
import { currentDecision } from './stored'

/** Takes one's own decision back within a minute; the decision stays on record, only no longer in force. */
export async function undoDecision({ ctx, input }: { ctx: ServiceContext, input: { id: string, version: number } }): Promise<WriteResult> {
  const actor = userOf(ctx)
  return await changeRequest(ctx, {
    id: input.id,
    version: input.version,
    action: 'request.undo',
    step: 'undo',
    apply: async (tx, { request }) => {
      const decision = await currentDecision(tx, request)
      if (!decision || decision.signedById !== actor.userId) throw new StateConflict('Only who signed the decision may take it back.')
      if (ctx.now.getTime() - decision.signedAt.getTime() > undoSeconds * 1000) {
        throw new StateConflict('The minute for taking it back is over. Reopen the request instead.')
      }
      return { set: { currentDecisionId: null, decidedAt: null }, audit: 'request.undo', detail: { decision: decision.id } }
    },
  })
}
