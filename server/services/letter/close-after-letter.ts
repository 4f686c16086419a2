import type { WriteResult } from '#shared/types/views'
import type { Database } from '#server/database/client'
import type { ServiceContext } from '../context'
import { changeRequest } from '../request/change'

/** The last step of a request: the patient has the second letter. Nobody asks for it, so it is the system's own. */
export async function closeAfterLetter(tx: Database, ctx: ServiceContext, input: { requestId: string, letterId: string }): Promise<WriteResult> {
  const own: ServiceContext = { ...ctx, db: tx, actor: { kind: 'system', name: 'Wherefore' }, idempotency: null }
  return await changeRequest(own, {
    id: input.requestId,
    version: null,
    action: 'letter.manage',
    step: 'close',
    apply: async () => ({ set: { closedAt: ctx.now }, audit: 'request.close', detail: { letter: input.letterId } }),
  })
}
