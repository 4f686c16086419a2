import { idParams } from '#shared/schemas/common'
import { reasonSchema } from '#shared/schemas/requests'
import { refuseExam } from '#server/services/request/refuse'
import { defineAuthedHandler, sendVersion } from '#server/utils/define-authed-handler'
import { parseInput, parseParams } from '#server/utils/parse-input'

export default defineAuthedHandler('request.refuse', async ({ event, ctx, version }) => {
  const { id } = parseParams(event, idParams)
  const result = await refuseExam({ ctx, input: { id, version, ...await parseInput(event, reasonSchema) } })
  sendVersion(event, result.version)
  return result
}, { idempotent: true, ifMatch: true })
