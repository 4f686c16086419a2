import { readExplanation } from '#server/services/explanation/read-explanation'
import { definePublicHandler } from '#server/utils/define-authed-handler'
import { readVisit } from '#server/utils/explanation-visit'

export default definePublicHandler('patient', ({ event, ctx }) => readExplanation({ ctx, input: { visit: readVisit(event) } }))
