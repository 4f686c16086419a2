import type { WriteResult } from '#shared/types/views'
import { messages } from '#server/database/schema/requests'
import { enqueue } from '#server/jobs/queue'
import { userOf } from '../context'
import type { ServiceContext } from '../context'
import { callOffLetters } from '../letter/queue-letter'
import { changeRequest } from './change'
import { noSlot } from './slot'

/** The patient does not want the exam: the clinician is told, the slot is free. */
export async function refuseExam({ ctx, input }: { ctx: ServiceContext, input: { id: string, version: number, reason: string } }): Promise<WriteResult> {
  const actor = userOf(ctx)
  return await changeRequest(ctx, {
    id: input.id,
    version: input.version,
    action: 'request.refuse',
    step: 'refuse',
    apply: async (tx, loaded) => {
      const { request } = loaded
      await tx.insert(messages).values({ requestId: request.id, kind: 'note', side: 'imaging', authorId: actor.userId, body: `The patient does not want the exam: ${input.reason}`, createdAt: ctx.now })
      await callOffLetters(tx, ctx, loaded)
      await enqueue(tx, 'notify-clinician', { requestId: request.id, event: 'decision' }, { key: `notify-${request.id}-refused` })
      return { set: { awaiting: null, closedAt: ctx.now, ...noSlot }, audit: 'request.refuse' }
    },
  })
}
