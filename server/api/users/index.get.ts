import { listUsers } from '#server/services/user/list-users'
import { defineAuthedHandler } from '#server/utils/define-authed-handler'

export default defineAuthedHandler('user.list', ({ ctx }) => listUsers({ ctx }))
