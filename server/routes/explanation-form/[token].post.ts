import { readRawBody, sendRedirect } from 'h3'
import { explanationFormSchema } from '#shared/schemas/explanations'
import { linkParams } from '#shared/schemas/letters'
import { TooMany } from '#server/services/errors'
import { ExplanationClosed, WrongBirthDate } from '#server/services/explanation/closed'
import { openExplanation } from '#server/services/explanation/open-explanation'
import { useApp } from '#server/utils/app'
import { clientAddress } from '#server/utils/client-address'
import { definePublicHandler } from '#server/utils/define-authed-handler'
import { sendVisit } from '#server/utils/explanation-visit'
import { parseParams } from '#server/utils/parse-input'
import { limitRate } from '#server/utils/rate-limit'

/** What the page puts into words above the form, `?refused=`. */
type Refused = 'wrong' | 'ended' | 'slow'

function refusalOf(error: unknown): Refused {
  if (error instanceof WrongBirthDate) return 'wrong'
  if (error instanceof ExplanationClosed) return 'ended'
  if (error instanceof TooMany) return 'slow'
  throw error
}

/** The birth date from a page whose scripts do not run. Leads on to the explanation, or back to the form with what went wrong. */
export default definePublicHandler('patient', async ({ event, ctx }) => {
  const { token } = parseParams(event, linkParams)
  const back = (refused: Refused) => sendRedirect(event, `/explanation/${encodeURIComponent(token)}?refused=${refused}`, 303)
  try {
    await limitRate('link', clientAddress(event, useApp().config.trustedProxies))
    const form = explanationFormSchema.safeParse(Object.fromEntries(new URLSearchParams((await readRawBody(event)) ?? '')))
    if (!form.success) return await back('wrong')
    const { visit } = await openExplanation({ ctx, input: { token, birthDate: form.data.birthDate } })
    sendVisit(event, visit)
  }
  catch (error) {
    return await back(refusalOf(error))
  }
  return await sendRedirect(event, '/explanation/current', 303)
})
