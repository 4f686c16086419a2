import { eq, sql } from 'drizzle-orm'
import { composeNeutral } from '#shared/domain/letter/compose'
import type { Policy } from '#shared/domain/policy/types'
import { hashSecret, newSecret } from '#server/auth/secrets'
import type { Database } from '#server/database/client'
import { letterLinks, letters } from '#server/database/schema/requests'
import { enqueue } from '#server/jobs/queue'
import { renderMail } from '#server/mail/render'
import type { RenderedMail } from '#server/mail/render'
import { detailedLetter, neutralLetter } from '#server/mail/templates/letter'
import type { ServiceContext } from '../context'
import { inTransaction } from '../transaction'
import { auditLetter, holdLetter } from './hold-letter'
import type { HeldLetter, LetterRecord } from './hold-letter'

/** A letter about to go out, with the one copy of its link's token. */
export interface PreparedLetter { letter: LetterRecord, to: string, detailed: boolean, token: string }

/**
 * Looks at the letter once more before it goes: called back ones stay, one to an address that is no longer the patient's is
 * replaced by one to the new address, and details go only to a patient who still agrees to them. Then mints its link.
 *
 * @returns null where nothing is to be sent.
 */
export async function prepareLetter(ctx: ServiceContext, input: { letterId: string, policy: Policy }): Promise<PreparedLetter | null> {
  return await inTransaction(ctx, async (tx) => {
    const held = await holdLetter(tx, input.letterId)
    const { letter, patient, request } = held
    if (letter.state !== 'queued') return null
    if (letter.toAddress === null || letter.toAddress !== patient.email) {
      await readdress(tx, ctx, held)
      return null
    }
    const token = newSecret()
    await tx.insert(letterLinks).values({
      tokenHash: hashSecret(token),
      letterId: letter.id,
      // An exam far ahead must not outlive the way to its explanation.
      expiresAt: sql`greatest(now(), ${request.slotStartsAt?.toISOString() ?? null}::timestamptz) + make_interval(days => ${input.policy.links.value.validDays})`,
    })
    await tx.update(letters).set({ attempts: sql`${letters.attempts} + 1` }).where(eq(letters.id, letter.id))
    return { letter, to: letter.toAddress, detailed: letter.detailed && patient.detailsByEmail === true, token }
  })
}

/** The letter stays as a trace that it was called back; the same words are queued for the address in force, or for paper. */
async function readdress(tx: Database, ctx: ServiceContext, held: HeldLetter): Promise<void> {
  const { letter, patient } = held
  await tx.update(letters).set({ state: 'cancelled', lastError: 'The patient\'s address was changed.' }).where(eq(letters.id, letter.id))
  await auditLetter(tx, ctx, held, 'letter.cancel', { addressChanged: true })
  const [next] = await tx.insert(letters).values({
    requestId: letter.requestId,
    patientId: letter.patientId,
    kind: letter.kind,
    content: letter.content,
    detailed: patient.detailsByEmail === true,
    toAddress: patient.email,
    state: patient.email ? 'queued' : 'no-address',
    createdById: letter.createdById,
  }).returning()
  if (!next) throw new Error('the letter was not stored')
  if (patient.email) await enqueue(tx, 'deliver-letter', { letterId: next.id }, { key: `letter-${next.id}` })
  await auditLetter(tx, ctx, { ...held, letter: next }, 'letter.queue', { detailed: next.detailed, address: patient.email !== null })
}

/** Details where agreed, else the neutral message. */
export async function renderLetter({ letter, detailed, token }: PreparedLetter, { origin, policy }: { origin: string, policy: Policy }): Promise<RenderedMail> {
  const href = `${new URL(origin).origin}/explanation/${token}`
  return await renderMail(detailed
    ? detailedLetter(letter.content, href)
    : neutralLetter(composeNeutral(policy), policy.department.name, href))
}
