import { z } from 'zod'
import { deliverInvitation } from '#server/services/notice/deliver-invitation'
import { defineJob } from './job'

/** Tried until the invitation runs out; a refused address shows to the administrator as a failing job. */
export default defineJob('deliver-invitation', z.strictObject({ invitationId: z.uuid() }), ({ payload, ctx, mail, attempt, signal }) =>
  deliverInvitation({ ctx, input: { invitationId: payload.invitationId, attempt, signal }, mail }))
