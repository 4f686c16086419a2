import { preferencesSchema } from '#shared/schemas/people'
import { changePreferences } from '#server/services/user/change-preferences'
import { defineAuthedHandler } from '#server/utils/define-authed-handler'
import { parseInput } from '#server/utils/parse-input'

export default defineAuthedHandler('me.change', async ({ event, ctx }) =>
  changePreferences({ ctx, input: await parseInput(event, preferencesSchema) }))
