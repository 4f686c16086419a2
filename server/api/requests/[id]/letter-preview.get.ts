import { letterPreviewQuery } from '#shared/schemas/letters'
import { requestKeyParams } from '#shared/schemas/requests'
import { previewLetter } from '#server/services/letter/preview-letter'
import { defineAuthedHandler } from '#server/utils/define-authed-handler'
import { parseParams, parseQuery } from '#server/utils/parse-input'

export default defineAuthedHandler('letter.read', async ({ event, ctx }) =>
  await previewLetter({ ctx, input: { ...parseParams(event, requestKeyParams), ...parseQuery(event, letterPreviewQuery) } }))
