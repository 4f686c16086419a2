import { practiceSchema } from '#shared/schemas/people'
import { createPractice } from '#server/services/practice/save-practice'
import { defineAuthedHandler } from '#server/utils/define-authed-handler'
import { parseInput } from '#server/utils/parse-input'

export default defineAuthedHandler('practice.change', async ({ event, ctx }) =>
  createPractice({ ctx, input: await parseInput(event, practiceSchema) }), { idempotent: true })
