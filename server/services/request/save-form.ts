import { priorityRank } from '#shared/domain/request/priority'
import type { RequestForm } from '#shared/domain/request/form'
import type { WriteResult } from '#shared/types/views'
import type { ServiceContext } from '../context'
import { changeRequest, conflictError } from './change'

/** Saves a draft as typed. Two tabs never overwrite each other: the second is told. */
export async function saveForm({ ctx, input }: { ctx: ServiceContext, input: { id: string, version: number, form: RequestForm } }): Promise<WriteResult> {
  return await changeRequest(ctx, {
    id: input.id,
    version: input.version,
    action: 'request.edit',
    step: null,
    apply: async (_tx, loaded) => {
      if (loaded.request.state !== 'draft') throw conflictError(loaded)
      return {
        set: { form: input.form, priority: input.form.priority, priorityRank: priorityRank[input.form.priority], questionId: input.form.questionId, region: input.form.region },
        audit: 'request.edit',
      }
    },
  })
}
