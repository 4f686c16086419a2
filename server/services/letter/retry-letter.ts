import { eq } from 'drizzle-orm'
import type { LetterState } from '#shared/domain/letter/kinds'
import { letters } from '#server/database/schema/requests'
import { enqueue } from '#server/jobs/queue'
import type { ServiceContext } from '../context'
import { StateConflict } from '../errors'
import { inTransaction } from '../transaction'
import { auditLetter, holdLetter } from './hold-letter'

/**
 * Queues a failed letter again, to the address and in the form that the patient agrees to now.
 *
 * @throws NotFound, StateConflict where it did not fail, or there is no address.
 */
export async function retryLetter({ ctx, input }: { ctx: ServiceContext, input: { letterId: string } }): Promise<{ id: string, state: LetterState }> {
  return await inTransaction(ctx, async (tx) => {
    const held = await holdLetter(tx, input.letterId)
    const { letter, patient } = held
    if (letter.state !== 'failed') throw new StateConflict('Only a letter that could not be delivered is sent again.', { state: letter.state })
    if (!patient.email) throw new StateConflict('The patient has no e-mail address now. Hand the letter over on paper.')
    await tx.update(letters).set({ state: 'queued', lastError: null, toAddress: patient.email, detailed: patient.detailsByEmail === true }).where(eq(letters.id, letter.id))
    await enqueue(tx, 'deliver-letter', { letterId: letter.id }, { key: `letter-${letter.id}` })
    await auditLetter(tx, ctx, held, 'letter.retry', { attempts: letter.attempts })
    return { id: letter.id, state: 'queued' }
  })
}
