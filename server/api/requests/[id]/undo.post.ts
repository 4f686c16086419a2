import { idParams } from '#shared/schemas/common'
import { sendRequestSchema } from '#shared/schemas/requests'
import { undoDecision } from '#server/services/request/undo'
import { defineAuthedHandler, sendVersion } from '#server/utils/define-authed-handler'
import { parseInput, parseParams } from '#server/utils/parse-input'

export default defineAuthedHandler('request.undo', async ({ event, ctx, version }) => {
  const { id } = parseParams(event, idParams)
  const result = await undoDecision({ ctx, input: { id, version, ...await parseInput(event, sendRequestSchema) } })
  sendVersion(event, result.version)
  return result
}, { idempotent: true, ifMatch: true })
