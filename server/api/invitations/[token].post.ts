import { acceptInvitationSchema, secretParams } from '#shared/schemas/people'
import { createSignInThrottle } from '#server/auth/throttle'
import { acceptInvitation } from '#server/services/invitation/accept-invitation'
import { useApp } from '#server/utils/app'
import { clientAddress } from '#server/utils/client-address'
import { definePublicHandler } from '#server/utils/define-authed-handler'
import { parseInput, parseParams } from '#server/utils/parse-input'
import { limitRate } from '#server/utils/rate-limit'

export default definePublicHandler('nobody', async ({ event, ctx }) => {
  const { token } = parseParams(event, secretParams)
  const { config, pool } = useApp()
  await limitRate('invitation-accept', clientAddress(event, config.trustedProxies))
  const { password } = await parseInput(event, acceptInvitationSchema)
  return await acceptInvitation({ ctx, input: { token, password, throttle: createSignInThrottle(pool) } })
})
