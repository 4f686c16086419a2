import { viewGuidance } from '#server/services/rules/view'
import { defineAuthedHandler } from '#server/utils/define-authed-handler'

export default defineAuthedHandler('guidance.read', async ({ ctx }) => await viewGuidance({ ctx }))
