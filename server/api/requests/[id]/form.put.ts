import { idParams } from '#shared/schemas/common'
import { saveRequestSchema } from '#shared/schemas/requests'
import { saveForm } from '#server/services/request/save-form'
import { defineAuthedHandler, sendVersion } from '#server/utils/define-authed-handler'
import { parseInput, parseParams } from '#server/utils/parse-input'

export default defineAuthedHandler('request.edit', async ({ event, ctx, version }) => {
  const { id } = parseParams(event, idParams)
  const { form } = await parseInput(event, saveRequestSchema)
  const result = await saveForm({ ctx, input: { id, version, form } })
  sendVersion(event, result.version)
  return result
}, { ifMatch: true })
