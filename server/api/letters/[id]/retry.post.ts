import { idParams } from '#shared/schemas/common'
import { noBodySchema } from '#shared/schemas/letters'
import { retryLetter } from '#server/services/letter/retry-letter'
import { defineAuthedHandler } from '#server/utils/define-authed-handler'
import { parseInput, parseParams } from '#server/utils/parse-input'

export default defineAuthedHandler('letter.retry', async ({ event, ctx }) => {
  const { id } = parseParams(event, idParams)
  await parseInput(event, noBodySchema)
  return await retryLetter({ ctx, input: { letterId: id } })
}, { idempotent: true })
