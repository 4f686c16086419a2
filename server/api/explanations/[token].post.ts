import { explanationSchema } from '#shared/schemas/explanations'
import { linkParams } from '#shared/schemas/letters'
import { openExplanation } from '#server/services/explanation/open-explanation'
import { readExplanation } from '#server/services/explanation/read-explanation'
import { useApp } from '#server/utils/app'
import { clientAddress } from '#server/utils/client-address'
import { definePublicHandler } from '#server/utils/define-authed-handler'
import { sendVisit } from '#server/utils/explanation-visit'
import { parseInput, parseParams } from '#server/utils/parse-input'
import { limitRate } from '#server/utils/rate-limit'

export default definePublicHandler('patient', async ({ event, ctx }) => {
  const { token } = parseParams(event, linkParams)
  await limitRate('link', clientAddress(event, useApp().config.trustedProxies))
  const { birthDate } = await parseInput(event, explanationSchema)
  const { visit } = await openExplanation({ ctx, input: { token, birthDate } })
  sendVisit(event, visit)
  return await readExplanation({ ctx, input: { visit } })
})
