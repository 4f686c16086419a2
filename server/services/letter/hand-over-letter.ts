import { and, desc, eq, ne } from 'drizzle-orm'
import type { WriteResult } from '#shared/types/views'
import { letters } from '#server/database/schema/requests'
import type { ServiceContext } from '../context'
import { StateConflict } from '../errors'
import { changeRequest, permitRepeat } from '../request/change'
import { inTransaction } from '../transaction'
import { closeAfterLetter } from './close-after-letter'

/**
 * Notes that the newest letter was handed over on paper or told by other means. The second letter closes the request, as its
 * delivery would.
 *
 * @throws StateConflict where there is none to hand over, or it is still on its way by e-mail.
 */
export async function handOverLetter({ ctx, input }: { ctx: ServiceContext, input: { id: string } }): Promise<WriteResult> {
  return await inTransaction(ctx, async (tx) => {
    const closing: { letterId: string | null } = { letterId: null }
    const noted = await changeRequest({ ...ctx, db: tx, idempotency: null }, {
      id: input.id,
      version: null,
      action: 'letter.manage',
      step: null,
      apply: async (inner, { request }) => {
        const [letter] = await inner.select().from(letters)
          .where(and(eq(letters.requestId, request.id), ne(letters.state, 'cancelled')))
          .orderBy(desc(letters.queuedAt)).limit(1).for('update')
        if (!letter) throw new StateConflict('There is no letter to hand over yet.')
        if (letter.state === 'queued') throw new StateConflict('The letter is still on its way by e-mail. Hand it over once that has failed.')
        if (letter.state === 'handed-over') throw new StateConflict('The letter was handed over already.')
        await inner.update(letters).set({ state: 'handed-over' }).where(eq(letters.id, letter.id))
        if (letter.kind === 'after' && request.state === 'done') closing.letterId = letter.id
        return { audit: 'letter.hand-over', detail: { letter: letter.id, kind: letter.kind, was: letter.state } }
      },
    })
    return closing.letterId === null ? noted : await closeAfterLetter(tx, ctx, { requestId: noted.id, letterId: closing.letterId })
  }, tx => permitRepeat(tx, ctx, { id: input.id, action: 'letter.manage' }))
}
