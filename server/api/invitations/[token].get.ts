import { secretParams } from '#shared/schemas/people'
import { readInvitation } from '#server/services/invitation/read-invitation'
import { useApp } from '#server/utils/app'
import { clientAddress } from '#server/utils/client-address'
import { definePublicHandler } from '#server/utils/define-authed-handler'
import { parseParams } from '#server/utils/parse-input'
import { limitRate } from '#server/utils/rate-limit'

export default definePublicHandler('nobody', async ({ event, ctx }) => {
  const { token } = parseParams(event, secretParams)
  await limitRate('link', clientAddress(event, useApp().config.trustedProxies))
  return await readInvitation({ ctx, input: { token } })
})
