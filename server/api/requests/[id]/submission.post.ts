import { idParams } from '#shared/schemas/common'
import { sendRequestSchema } from '#shared/schemas/requests'
import { userOf } from '#server/services/context'
import { sendRequest } from '#server/services/request/send'
import { defineAuthedHandler, sendVersion } from '#server/utils/define-authed-handler'
import { parseInput, parseParams } from '#server/utils/parse-input'
import { limitRate } from '#server/utils/rate-limit'

export default defineAuthedHandler('request.send', async ({ event, ctx, version }) => {
  const { id } = parseParams(event, idParams)
  await limitRate('submit', userOf(ctx).userId)
  const result = await sendRequest({ ctx, input: { id, version, ...await parseInput(event, sendRequestSchema) } })
  sendVersion(event, result.version)
  return result
}, { idempotent: true, ifMatch: true })
