import type { WriteResult } from '#shared/types/views'
import { messages } from '#server/database/schema/requests'
import { userOf } from '../context'
import type { ServiceContext } from '../context'
import { callOffLetters } from '../letter/queue-letter'
import { changeRequest } from './change'
import { noSlot } from './slot'

/** The ordering side takes the request back; the slot is freed, and a patient already written to is told. */
export async function withdrawRequest({ ctx, input }: { ctx: ServiceContext, input: { id: string, version: number, reason: string } }): Promise<WriteResult> {
  const actor = userOf(ctx)
  return await changeRequest(ctx, {
    id: input.id,
    version: input.version,
    action: 'request.withdraw',
    step: 'withdraw',
    apply: async (tx, loaded) => {
      await tx.insert(messages).values({ requestId: loaded.request.id, kind: 'note', side: 'ordering', authorId: actor.userId, body: `Withdrawn: ${input.reason}`, createdAt: ctx.now })
      await callOffLetters(tx, ctx, loaded)
      return { set: { awaiting: null, replyWaiting: false, closedAt: ctx.now, ...noSlot }, audit: 'request.withdraw' }
    },
  })
}
