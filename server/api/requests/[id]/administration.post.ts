import { idParams } from '#shared/schemas/common'
import { administrationSchema } from '#shared/schemas/requests'
import { recordGiven } from '#server/services/request/record-given'
import { defineAuthedHandler, sendVersion } from '#server/utils/define-authed-handler'
import { parseInput, parseParams } from '#server/utils/parse-input'

export default defineAuthedHandler('request.record-given', async ({ event, ctx, version }) => {
  const { id } = parseParams(event, idParams)
  const result = await recordGiven({ ctx, input: { id, version, ...await parseInput(event, administrationSchema) } })
  sendVersion(event, result.version)
  return result
}, { idempotent: true, ifMatch: true })
