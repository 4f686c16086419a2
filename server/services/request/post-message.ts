import type { z } from 'zod'
import { roleSide } from '#shared/domain/request/messages'
import type { messageSchema } from '#shared/schemas/requests'
import type { WriteResult } from '#shared/types/views'
import { messages } from '#server/database/schema/requests'
import { userOf } from '../context'
import type { ServiceContext } from '../context'
import { Forbidden } from '../errors'
import { rulesInForce } from '../rules/in-force'
import { gatherInputs, runAssessment, storeAssessment } from './assess-request'
import { changeRequest, conflictError } from './change'
import { enqueue } from '#server/jobs/queue'

/**
 * Adds to the thread: a question to imaging, an answer to whoever asked, or a note. Answering a radiologist's query gives the
 * request back to the queue, assessed anew.
 */
export async function postMessage({ ctx, input }: { ctx: ServiceContext, input: { id: string } & z.output<typeof messageSchema> }): Promise<WriteResult> {
  const actor = userOf(ctx)
  const side = roleSide(actor.role)
  if (input.internal && side !== 'imaging') throw new Forbidden('Only imaging writes internal notes.')
  if (input.kind === 'question' && side !== 'ordering') throw new Forbidden('Imaging asks with a query.')
  const inForce = await rulesInForce(ctx.db, ctx.now)
  return await changeRequest(ctx, {
    id: input.id,
    version: null,
    action: 'message.post',
    step: ({ request }) => input.kind === 'answer' && request.state === 'queried' && request.awaiting === side ? 'answer' : null,
    apply: async (tx, loaded) => {
      const { request, patient } = loaded
      if (request.state === 'draft' || request.state === 'discarded') throw conflictError(loaded)
      const answers = input.kind === 'answer'
      if (answers && request.awaiting !== side) throw conflictError(loaded)
      if (input.kind === 'question' && !['sent', 'approved', 'booked', 'reopened'].includes(request.state)) throw conflictError(loaded)
      await tx.insert(messages).values({ requestId: request.id, kind: input.kind, side, authorId: actor.userId, body: input.body, internal: input.internal, createdAt: ctx.now })
      if (input.kind === 'note') return { audit: 'request.note', detail: { internal: input.internal } }
      if (input.kind === 'question') return { set: { awaiting: 'imaging' }, audit: 'request.question' }
      if (side === 'imaging') {
        await enqueue(tx, 'notify-clinician', { requestId: request.id, event: 'answer' }, { key: `notify-${request.id}-answer` })
        return { set: { awaiting: null }, audit: 'request.answer' }
      }
      const inputs = await gatherInputs(tx, ctx.now, { form: request.form, record: request.record, patient, plannedAt: request.slotStartsAt })
      const stored = await storeAssessment(tx, ctx, { ...runAssessment(inputs, inForce), requestId: request.id, cause: 'answer', inForce })
      return { set: { ...stored, awaiting: null, replyWaiting: true }, audit: 'request.answer' }
    },
  })
}
