import { listPractices } from '#server/services/practice/list-practices'
import { defineAuthedHandler } from '#server/utils/define-authed-handler'

export default defineAuthedHandler('practice.list', ({ ctx }) => listPractices({ ctx }))
