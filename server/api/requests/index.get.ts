import { requestListQuery } from '#shared/schemas/requests'
import { listRequests } from '#server/services/request/list'
import { defineAuthedHandler } from '#server/utils/define-authed-handler'
import { parseQuery } from '#server/utils/parse-input'

export default defineAuthedHandler('request.list', async ({ event, ctx }) => {
  return await listRequests({ ctx, input: parseQuery(event, requestListQuery) })
})
