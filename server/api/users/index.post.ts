import { inviteSchema } from '#shared/schemas/people'
import { inviteUser } from '#server/services/user/invite-user'
import { defineAuthedHandler } from '#server/utils/define-authed-handler'
import { parseInput } from '#server/utils/parse-input'

export default defineAuthedHandler('user.invite', async ({ event, ctx }) =>
  inviteUser({ ctx, input: await parseInput(event, inviteSchema) }), { idempotent: true })
