import { createRequestSchema } from '#shared/schemas/requests'
import { createDraft } from '#server/services/request/create-draft'
import { defineAuthedHandler, sendVersion } from '#server/utils/define-authed-handler'
import { parseInput } from '#server/utils/parse-input'

export default defineAuthedHandler('request.create', async ({ event, ctx }) => {
  const result = await createDraft({ ctx, input: await parseInput(event, createRequestSchema) })
  sendVersion(event, result.version)
  return result
}, { idempotent: true })
