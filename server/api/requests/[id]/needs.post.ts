import { idParams } from '#shared/schemas/common'
import { needMarkSchema } from '#shared/schemas/requests'
import { markNeed } from '#server/services/request/mark-need'
import { defineAuthedHandler, sendVersion } from '#server/utils/define-authed-handler'
import { parseInput, parseParams } from '#server/utils/parse-input'

export default defineAuthedHandler('need.mark', async ({ event, ctx }) => {
  const { id } = parseParams(event, idParams)
  const result = await markNeed({ ctx, input: { id, ...await parseInput(event, needMarkSchema) } })
  sendVersion(event, result.version)
  return result
}, { idempotent: true })
