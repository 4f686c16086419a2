import { idParams } from '#shared/schemas/common'
import { unbookSchema } from '#shared/schemas/requests'
import { releaseSlot } from '#server/services/request/release-slot'
import { defineAuthedHandler, sendVersion } from '#server/utils/define-authed-handler'
import { parseInput, parseParams } from '#server/utils/parse-input'

export default defineAuthedHandler('request.unbook', async ({ event, ctx, version }) => {
  const { id } = parseParams(event, idParams)
  const result = await releaseSlot({ ctx, input: { id, version, ...await parseInput(event, unbookSchema) } })
  sendVersion(event, result.version)
  return result
}, { idempotent: true, ifMatch: true })
