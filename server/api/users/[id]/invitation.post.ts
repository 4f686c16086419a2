import { idParams } from '#shared/schemas/common'
import { inviteAgain } from '#server/services/user/change-user'
import { defineAuthedHandler } from '#server/utils/define-authed-handler'
import { parseParams } from '#server/utils/parse-input'

export default defineAuthedHandler('user.change', ({ event, ctx }) => inviteAgain({ ctx, input: parseParams(event, idParams) }), { idempotent: true })
