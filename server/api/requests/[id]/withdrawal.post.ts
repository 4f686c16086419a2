import { idParams } from '#shared/schemas/common'
import { reasonSchema } from '#shared/schemas/requests'
import { withdrawRequest } from '#server/services/request/withdraw'
import { defineAuthedHandler, sendVersion } from '#server/utils/define-authed-handler'
import { parseInput, parseParams } from '#server/utils/parse-input'

export default defineAuthedHandler('request.withdraw', async ({ event, ctx, version }) => {
  const { id } = parseParams(event, idParams)
  const result = await withdrawRequest({ ctx, input: { id, version, ...await parseInput(event, reasonSchema) } })
  sendVersion(event, result.version)
  return result
}, { idempotent: true, ifMatch: true })
