import { z } from 'zod'
import { MailFailure } from '#server/mail/transport'
import { notifyClinician } from '#server/services/notice/notify-clinician'
import { defineJob } from './job'

const payloadSchema = z.strictObject({ requestId: z.uuid(), event: z.enum(['query', 'answer', 'decision', 'reopened']) })

/** The request's own list shows the same news, so a message that is refused for good is let go. */
export default defineJob('notify-clinician', payloadSchema, async ({ payload, ctx, mail, jobId, signal }) => {
  try {
    return await notifyClinician({ ctx, input: { ...payload, messageId: `notice-${jobId}`, signal }, mail })
  }
  catch (error) {
    if (error instanceof MailFailure && error.permanent) return 'refused'
    throw error
  }
})
