import { idParams } from '#shared/schemas/common'
import { changeUserSchema } from '#shared/schemas/people'
import { changeUser } from '#server/services/user/change-user'
import { defineAuthedHandler } from '#server/utils/define-authed-handler'
import { parseInput, parseParams } from '#server/utils/parse-input'

export default defineAuthedHandler('user.change', async ({ event, ctx, version }) => {
  const { id } = parseParams(event, idParams)
  return await changeUser({ ctx, input: { id, version, ...await parseInput(event, changeUserSchema) } })
}, { ifMatch: true })
