import { idParams } from '#shared/schemas/common'
import { querySchema } from '#shared/schemas/requests'
import { queryRequest } from '#server/services/request/query'
import { defineAuthedHandler, sendVersion } from '#server/utils/define-authed-handler'
import { parseInput, parseParams } from '#server/utils/parse-input'

export default defineAuthedHandler('request.query', async ({ event, ctx, version }) => {
  const { id } = parseParams(event, idParams)
  const result = await queryRequest({ ctx, input: { id, version, ...await parseInput(event, querySchema) } })
  sendVersion(event, result.version)
  return result
}, { idempotent: true, ifMatch: true })
