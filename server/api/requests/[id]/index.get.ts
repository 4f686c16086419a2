import { requestKeyParams } from '#shared/schemas/requests'
import { viewRequest } from '#server/services/request/view'
import { defineAuthedHandler, sendVersion } from '#server/utils/define-authed-handler'
import { parseParams } from '#server/utils/parse-input'

export default defineAuthedHandler('request.read', async ({ event, ctx }) => {
  const view = await viewRequest({ ctx, input: parseParams(event, requestKeyParams) })
  sendVersion(event, view.version)
  return view
})
