import type { WriteResult } from '#shared/types/views'
import { messages } from '#server/database/schema/requests'
import { enqueue } from '#server/jobs/queue'
import { userOf } from '../context'
import type { ServiceContext } from '../context'
import { changeRequest } from './change'

/** A radiologist opens a signed decision again. Contrast waits until it is signed anew; a slot is kept, but flagged. */
export async function reopenRequest({ ctx, input }: { ctx: ServiceContext, input: { id: string, version: number, reason: string } }): Promise<WriteResult> {
  const actor = userOf(ctx)
  return await changeRequest(ctx, {
    id: input.id,
    version: input.version,
    action: 'request.reopen',
    step: 'reopen',
    apply: async (tx, { request }) => {
      await tx.insert(messages).values({ requestId: request.id, kind: 'note', side: 'imaging', authorId: actor.userId, body: `Reopened: ${input.reason}`, createdAt: ctx.now })
      await enqueue(tx, 'notify-clinician', { requestId: request.id, event: 'reopened' }, { key: `notify-${request.id}-reopened` })
      return { set: {}, audit: 'request.reopen' }
    },
  })
}
