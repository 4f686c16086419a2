import type { WriteResult } from '#shared/types/views'
import type { ServiceContext } from '../context'
import { changeRequest } from './change'

/** Puts a draft away: out of every list, erased later by policy. */
export async function discardDraft({ ctx, input }: { ctx: ServiceContext, input: { id: string, version: number } }): Promise<WriteResult> {
  return await changeRequest(ctx, {
    id: input.id, version: input.version, action: 'request.discard', step: 'discard',
    apply: async () => ({ set: { closedAt: ctx.now }, audit: 'request.discard' }),
  })
}
