import { idParams } from '#shared/schemas/common'
import { consentSchema } from '#shared/schemas/requests'
import { recordConsent } from '#server/services/request/record-consent'
import { defineAuthedHandler, sendVersion } from '#server/utils/define-authed-handler'
import { parseInput, parseParams } from '#server/utils/parse-input'

export default defineAuthedHandler('consent.record', async ({ event, ctx }) => {
  const { id } = parseParams(event, idParams)
  const result = await recordConsent({ ctx, input: { id, ...await parseInput(event, consentSchema) } })
  sendVersion(event, result.version)
  return result
})
