import { priorityRank } from '#shared/domain/request/priority'
import type { RequestForm } from '#shared/domain/request/form'
import type { WriteResult } from '#shared/types/views'
import type { Database } from '#server/database/client'
import type { ServiceContext } from '../context'
import { rulesInForce } from '../rules/in-force'
import { changeRequest, conflictError } from './change'

/** Saves a draft as typed. Two tabs never overwrite each other: the second is told. */
export async function saveForm({ ctx, input }: { ctx: ServiceContext, input: { id: string, version: number, form: RequestForm } }): Promise<WriteResult> {
  return await changeRequest(ctx, {
    id: input.id,
    version: input.version,
    action: 'request.edit',
    step: null,
    apply: async (tx, loaded) => {
      if (loaded.request.state !== 'draft') throw conflictError(loaded)
      const { questionId } = input.form
      // A list names the draft by its exam; looked up only when another question was chosen.
      const examName = questionId === loaded.request.questionId ? loaded.request.examName : await examOf(tx, ctx, questionId)
      return {
        set: { examName, form: input.form, priority: input.form.priority, priorityRank: priorityRank[input.form.priority], questionId, region: input.form.region },
        audit: 'request.edit',
      }
    },
  })
}

async function examOf(db: Database, ctx: ServiceContext, questionId: string | null): Promise<string | null> {
  if (questionId === null) return null
  const { rules } = await rulesInForce(db, ctx.now)
  return rules.guidance.questions.find(question => question.id === questionId)?.exam ?? null
}
