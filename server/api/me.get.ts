import { readMe } from '#server/services/session/read-me'
import { defineAuthedHandler } from '#server/utils/define-authed-handler'

export default defineAuthedHandler('me.read', ({ ctx }) => readMe({ ctx }))
