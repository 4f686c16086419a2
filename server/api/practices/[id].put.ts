import { idParams } from '#shared/schemas/common'
import { practiceSchema } from '#shared/schemas/people'
import { changePractice } from '#server/services/practice/save-practice'
import { defineAuthedHandler } from '#server/utils/define-authed-handler'
import { parseInput, parseParams } from '#server/utils/parse-input'

export default defineAuthedHandler('practice.change', async ({ event, ctx, version }) => {
  const { id } = parseParams(event, idParams)
  return await changePractice({ ctx, input: { id, version, ...await parseInput(event, practiceSchema) } })
}, { ifMatch: true })
