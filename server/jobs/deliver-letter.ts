import { z } from 'zod'
import { deliverLetter } from '#server/services/letter/deliver-letter'
import { defineJob } from './job'

export default defineJob('deliver-letter', z.strictObject({ letterId: z.uuid() }), ({ payload, ctx, mail, lastTry, signal }) =>
  deliverLetter({ ctx, input: { letterId: payload.letterId, lastTry, signal }, mail }))
