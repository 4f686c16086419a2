import { idParams } from '#shared/schemas/common'
import { noBodySchema } from '#shared/schemas/letters'
import { handOverLetter } from '#server/services/letter/hand-over-letter'
import { defineAuthedHandler, sendVersion } from '#server/utils/define-authed-handler'
import { parseInput, parseParams } from '#server/utils/parse-input'

export default defineAuthedHandler('letter.manage', async ({ event, ctx }) => {
  const { id } = parseParams(event, idParams)
  await parseInput(event, noBodySchema)
  const result = await handOverLetter({ ctx, input: { id } })
  sendVersion(event, result.version)
  return result
}, { idempotent: true })
