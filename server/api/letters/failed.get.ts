import { listFailedLetters } from '#server/services/letter/list-failed'
import { defineAuthedHandler } from '#server/utils/define-authed-handler'

export default defineAuthedHandler('letter.list-failed', ({ ctx }) => listFailedLetters({ ctx }))
