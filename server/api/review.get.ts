import { reviewQuery } from '#shared/schemas/requests'
import { listReview } from '#server/services/request/review-list'
import { defineAuthedHandler } from '#server/utils/define-authed-handler'
import { parseQuery } from '#server/utils/parse-input'

export default defineAuthedHandler('review.list', async ({ event, ctx }) => {
  return await listReview({ ctx, input: parseQuery(event, reviewQuery) })
})
