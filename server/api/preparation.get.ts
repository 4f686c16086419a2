import { preparationQuery } from '#shared/schemas/requests'
import { listPreparation } from '#server/services/request/preparation-list'
import { defineAuthedHandler } from '#server/utils/define-authed-handler'
import { parseQuery } from '#server/utils/parse-input'

export default defineAuthedHandler('preparation.list', async ({ event, ctx }) => {
  return await listPreparation({ ctx, input: parseQuery(event, preparationQuery) })
})
