import { idParams } from '#shared/schemas/common'
import { approvalSchema } from '#shared/schemas/requests'
import { approveRequest } from '#server/services/request/approve'
import { defineAuthedHandler, sendVersion } from '#server/utils/define-authed-handler'
import { parseInput, parseParams } from '#server/utils/parse-input'

export default defineAuthedHandler('request.approve', async ({ event, ctx, version }) => {
  const { id } = parseParams(event, idParams)
  const result = await approveRequest({ ctx, input: { id, version, ...await parseInput(event, approvalSchema) } })
  sendVersion(event, result.version)
  return result
}, { idempotent: true, ifMatch: true })
