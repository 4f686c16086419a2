import type { z } from 'zod'
import type { unbookSchema } from '#shared/schemas/requests'
import type { WriteResult } from '#shared/types/views'
import { messages } from '#server/database/schema/requests'
import { userOf } from '../context'
import type { ServiceContext } from '../context'
import { callOffLetters } from '../letter/queue-letter'
import { changeRequest } from './change'
import { noSlot } from './slot'

const causeWords = {
  'moved-by-us': 'Slot given up by imaging.',
  'patient-cancelled': 'The patient cancelled the slot.',
  'did-not-come': 'The patient did not come.',
} as const

/** Gives a slot up; the exam stays approved and comes back to the booking desk's first list. */
export async function releaseSlot({ ctx, input }: { ctx: ServiceContext, input: { id: string, version: number } & z.output<typeof unbookSchema> }): Promise<WriteResult> {
  const actor = userOf(ctx)
  return await changeRequest(ctx, {
    id: input.id,
    version: input.version,
    action: 'request.unbook',
    step: 'unbook',
    apply: async (tx, loaded) => {
      await tx.insert(messages).values({
        requestId: loaded.request.id, kind: 'note', side: 'imaging', authorId: actor.userId,
        body: [causeWords[input.cause], input.note].filter(Boolean).join(' '), createdAt: ctx.now,
      })
      await callOffLetters(tx, ctx, loaded)
      return { set: noSlot, audit: 'request.unbook', detail: { cause: input.cause } }
    },
  })
}
