import { idParams } from '#shared/schemas/common'
import { declineSchema } from '#shared/schemas/requests'
import { declineRequest } from '#server/services/request/decline'
import { defineAuthedHandler, sendVersion } from '#server/utils/define-authed-handler'
import { parseInput, parseParams } from '#server/utils/parse-input'

export default defineAuthedHandler('request.decline', async ({ event, ctx, version }) => {
  const { id } = parseParams(event, idParams)
  const result = await declineRequest({ ctx, input: { id, version, ...await parseInput(event, declineSchema) } })
  sendVersion(event, result.version)
  return result
}, { idempotent: true, ifMatch: true })
