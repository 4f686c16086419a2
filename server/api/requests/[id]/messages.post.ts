import { idParams } from '#shared/schemas/common'
import { messageSchema } from '#shared/schemas/requests'
import { postMessage } from '#server/services/request/post-message'
import { defineAuthedHandler, sendVersion } from '#server/utils/define-authed-handler'
import { parseInput, parseParams } from '#server/utils/parse-input'

export default defineAuthedHandler('message.post', async ({ event, ctx }) => {
  const { id } = parseParams(event, idParams)
  const result = await postMessage({ ctx, input: { id, ...await parseInput(event, messageSchema) } })
  sendVersion(event, result.version)
  return result
}, { idempotent: true })
