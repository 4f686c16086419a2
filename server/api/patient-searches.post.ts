import { patientSearchSchema } from '#shared/schemas/requests'
import { userOf } from '#server/services/context'
import { searchForPatient } from '#server/services/patient/search'
import { defineAuthedHandler } from '#server/utils/define-authed-handler'
import { parseInput } from '#server/utils/parse-input'
import { limitRate } from '#server/utils/rate-limit'

export default defineAuthedHandler('patient.search', async ({ event, ctx }) => {
  await limitRate('patient-search', userOf(ctx).userId)
  const input = await parseInput(event, patientSearchSchema)
  return await searchForPatient({ ctx, input })
})
