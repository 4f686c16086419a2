import type { z } from 'zod'
import type { needMarkSchema } from '#shared/schemas/requests'
import type { WriteResult } from '#shared/types/views'
import { addedNeedEvents } from '#server/database/append'
import { userOf } from '../context'
import type { ServiceContext } from '../context'
import { changeRequest, conflictError } from './change'

/** Says what was done about a need. Only added: the newest word counts, the earlier ones stay. */
export async function markNeed({ ctx, input }: { ctx: ServiceContext, input: { id: string } & z.output<typeof needMarkSchema> }): Promise<WriteResult> {
  const actor = userOf(ctx)
  return await changeRequest(ctx, {
    id: input.id,
    version: null,
    action: 'need.mark',
    step: null,
    apply: async (tx, loaded) => {
      const { request } = loaded
      if (!['sent', 'queried', 'reopened', 'approved', 'booked'].includes(request.state)) throw conflictError(loaded)
      await tx.insert(addedNeedEvents).values({ requestId: request.id, kind: input.kind, state: input.state, note: input.note, byId: actor.userId })
      return { audit: 'need.mark', detail: { need: input.kind, state: input.state } }
    },
  })
}
