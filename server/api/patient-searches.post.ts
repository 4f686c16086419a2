import { patientSearchSchema } from '#shared/schemas/requests'
import { searchForPatient } from '#server/services/patient/search'
import { defineAuthedHandler } from '#server/utils/define-authed-handler'
import { parseInput } from '#server/utils/parse-input'

export default defineAuthedHandler('patient.search', async ({ event, ctx }) => {
  const input = await parseInput(event, patientSearchSchema)
  return await searchForPatient({ ctx, input })
})
