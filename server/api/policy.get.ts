import { viewPolicy } from '#server/services/rules/view'
import { defineAuthedHandler } from '#server/utils/define-authed-handler'

export default defineAuthedHandler('policy.read', async ({ ctx }) => await viewPolicy({ ctx }))
