import { idParams } from '#shared/schemas/common'
import { refreshAssessment } from '#server/services/request/refresh-assessment'
import { defineAuthedHandler } from '#server/utils/define-authed-handler'
import { parseParams } from '#server/utils/parse-input'

export default defineAuthedHandler('request.assess', async ({ event, ctx }) => {
  return await refreshAssessment({ ctx, input: parseParams(event, idParams) })
})
