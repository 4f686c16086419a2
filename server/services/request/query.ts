import type { WriteResult } from '#shared/types/views'
import { messages } from '#server/database/schema/requests'
import { enqueue } from '#server/jobs/queue'
import { userOf } from '../context'
import type { ServiceContext } from '../context'
import { changeRequest } from './change'

/** A radiologist asks the ordering side; the request waits for the answer, a booked slot is kept. */
export async function queryRequest({ ctx, input }: { ctx: ServiceContext, input: { id: string, version: number, body: string } }): Promise<WriteResult> {
  const actor = userOf(ctx)
  return await changeRequest(ctx, {
    id: input.id,
    version: input.version,
    action: 'request.query',
    step: 'query',
    apply: async (tx, { request }) => {
      await tx.insert(messages).values({ requestId: request.id, kind: 'query', side: 'imaging', authorId: actor.userId, body: input.body, createdAt: ctx.now })
      await enqueue(tx, 'notify-clinician', { requestId: request.id, event: 'query' }, { key: `notify-${request.id}-query` })
      return { set: { awaiting: 'ordering', replyWaiting: false }, audit: 'request.query' }
    },
  })
}
