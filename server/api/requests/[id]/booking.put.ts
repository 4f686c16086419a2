import { idParams } from '#shared/schemas/common'
import { bookingSchema } from '#shared/schemas/requests'
import { bookExam } from '#server/services/request/book'
import { defineAuthedHandler, sendVersion } from '#server/utils/define-authed-handler'
import { parseInput, parseParams } from '#server/utils/parse-input'

export default defineAuthedHandler('request.book', async ({ event, ctx, version }) => {
  const { id } = parseParams(event, idParams)
  const result = await bookExam({ ctx, input: { id, version, ...await parseInput(event, bookingSchema) } })
  sendVersion(event, result.version)
  return result
}, { ifMatch: true })
