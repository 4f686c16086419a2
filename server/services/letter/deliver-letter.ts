import { and, desc, eq, gt, isNull, ne, sql } from 'drizzle-orm'
import { hashSecret } from '#server/auth/secrets'
import type { Database } from '#server/database/client'
import { decisions, letterLinks, letters } from '#server/database/schema/requests'
import { MailFailure } from '#server/mail/transport'
import type { Mailer } from '#server/mail/transport'
import type { ServiceContext } from '../context'
import { loadRequest } from '../request/load'
import { currentAssessment } from '../request/stored'
import { rulesInForce } from '../rules/in-force'
import { inTransaction } from '../transaction'
import { closeAfterLetter } from './close-after-letter'
import { auditLetter, holdLetter } from './hold-letter'
import type { HeldLetter } from './hold-letter'
import { prepareLetter, renderLetter } from './prepare-letter'
import type { PreparedLetter } from './prepare-letter'
import { queueLetter } from './queue-letter'

/** The way out for e-mail, and the address that its links begin with. */
export interface MailOut { mailer: Mailer, origin: string }

export type DeliveryOutcome = 'delivered' | 'skipped' | 'failed'

/**
 * Sends one letter. Its link is stored before, its delivery after the sending, each in a transaction of its own: a crash between
 * them sends it again under the same Message-ID, and never loses it.
 *
 * @throws MailFailure where trying again may help, and this was not the last try.
 */
export async function deliverLetter({ ctx, input, mail }: {
  ctx: ServiceContext
  input: { letterId: string, lastTry: boolean, signal?: AbortSignal }
  mail: MailOut
}): Promise<DeliveryOutcome> {
  const { policy } = (await rulesInForce(ctx.db, ctx.now)).rules
  const prepared = await prepareLetter(ctx, { letterId: input.letterId, policy })
  if (!prepared) return 'skipped'
  try {
    const rendered = await renderLetter(prepared, { origin: mail.origin, policy })
    const messageId = await mail.mailer.send({ ...rendered, to: prepared.to, id: `letter-${prepared.letter.id}` }, input.signal)
    await markDelivered(ctx, prepared, messageId)
    return 'delivered'
  }
  catch (error) {
    if (!(error instanceof MailFailure)) throw error
    const final = error.permanent || input.lastTry
    await markTrouble(ctx, prepared, error, final)
    if (final) return 'failed'
    throw error
  }
}

async function markDelivered(ctx: ServiceContext, { letter, detailed }: PreparedLetter, messageId: string): Promise<void> {
  await inTransaction(ctx, async (tx) => {
    const held = await holdLetter(tx, letter.id)
    const calledBack = held.letter.state === 'cancelled'
    await tx.update(letters).set({
      // Handed over meanwhile: that stays the last word on it.
      state: held.letter.state === 'handed-over' ? 'handed-over' : 'delivered',
      detailed, messageId, lastError: null, deliveredAt: sql`now()`,
    }).where(eq(letters.id, letter.id))
    await auditLetter(tx, ctx, held, 'letter.deliver', { detailed, attempts: held.letter.attempts, calledBack })
    if (calledBack) await correct(tx, ctx, held)
    else if (letter.kind === 'after' && held.request.state === 'done') await closeAfterLetter(tx, ctx, { requestId: letter.requestId, letterId: letter.id })
  })
}

/**
 * The letter was called back while it was on its way. Its link is closed; a patient who now knows of an exam that is off, and
 * gets no newer letter, is told.
 */
async function correct(tx: Database, ctx: ServiceContext, { letter, request }: HeldLetter): Promise<void> {
  await tx.update(letterLinks).set({ revokedAt: sql`now()` }).where(and(eq(letterLinks.letterId, letter.id), isNull(letterLinks.revokedAt)))
  const toldOfAPlan = letter.kind !== 'after' && letter.content.mark !== null
  const [newer] = await tx.select({ id: letters.id }).from(letters)
    .where(and(eq(letters.requestId, letter.requestId), ne(letters.id, letter.id), ne(letters.state, 'cancelled'), gt(letters.queuedAt, letter.queuedAt))).limit(1)
  if (!toldOfAPlan || newer) return
  const [decision] = await tx.select().from(decisions)
    .where(and(eq(decisions.requestId, request.id), eq(decisions.kind, 'approved'))).orderBy(desc(decisions.signedAt)).limit(1)
  const assessment = await currentAssessment(tx, request)
  if (!decision || !assessment) return
  await queueLetter(tx, { ...ctx, db: tx }, {
    loaded: await loadRequest(tx, request.id),
    decision,
    assessment: { inputs: assessment.row.inputs, inForce: assessment.inForce, result: assessment.row.result },
    letter: { kind: 'changed', change: 'called-off' },
  })
}

async function markTrouble(ctx: ServiceContext, { letter, token }: PreparedLetter, error: MailFailure, final: boolean): Promise<void> {
  await inTransaction(ctx, async (tx) => {
    const held = await holdLetter(tx, letter.id)
    // Where it may have arrived after all, its link stays good.
    if (error.refused) await tx.update(letterLinks).set({ revokedAt: sql`now()` }).where(eq(letterLinks.tokenHash, hashSecret(token)))
    if (held.letter.state !== 'queued') return
    await tx.update(letters).set({ lastError: error.message, ...(final ? { state: 'failed' as const } : {}) }).where(eq(letters.id, letter.id))
    if (final) await auditLetter(tx, ctx, held, 'letter.fail', { attempts: held.letter.attempts, permanent: error.permanent })
  })
}

/** For a letter whose job ended without a word, for instance because the server was cut off on the last try. */
export async function giveUpLetter({ ctx, input }: { ctx: ServiceContext, input: { letterId: string } }): Promise<void> {
  await inTransaction(ctx, async (tx) => {
    const held = await holdLetter(tx, input.letterId)
    if (held.letter.state !== 'queued') return
    await tx.update(letters).set({ state: 'failed', lastError: held.letter.lastError ?? 'It was tried many times without success.' }).where(eq(letters.id, held.letter.id))
    await auditLetter(tx, ctx, held, 'letter.fail', { attempts: held.letter.attempts, permanent: false })
  })
}
