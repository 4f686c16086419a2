import { idParams } from '#shared/schemas/common'
import { userOf } from '#server/services/context'
import { refreshAssessment } from '#server/services/request/refresh-assessment'
import { defineAuthedHandler } from '#server/utils/define-authed-handler'
import { parseParams } from '#server/utils/parse-input'
import { limitRate } from '#server/utils/rate-limit'

export default defineAuthedHandler('request.assess', async ({ event, ctx }) => {
  const input = parseParams(event, idParams)
  // By person and request: nobody may use up another's readings.
  await limitRate('record-reading', `${userOf(ctx).userId}:${input.id}`)
  return await refreshAssessment({ ctx, input })
})
