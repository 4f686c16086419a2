import { asc, eq, inArray, sql } from 'drizzle-orm'
import { hashSecret, newSecret } from '#server/auth/secrets'
import type { Database } from '#server/database/client'
import { explanationVisits, letterLinks, letters } from '#server/database/schema/requests'
import type { ServiceContext } from '../context'
import { auditLetter, holdLetter } from '../letter/hold-letter'
import type { HeldLetter } from '../letter/hold-letter'
import { rulesInForce } from '../rules/in-force'
import { inTransaction } from '../transaction'
import { ExplanationClosed, WrongBirthDate } from './closed'

/** Minutes for which a right date of birth shows the explanation. */
export const visitMinutes = 15

type Try = { result: 'open', visit: string } | { result: 'wrong' } | { result: 'closed' }

/**
 * Opens an explanation with the link's token and the date of birth. Tries are counted under the row's lock, over all links of the
 * letter, so that tries at once count one by one; with the last one the links are dead and the letter stands among the failed.
 *
 * @returns the value of the visit's cookie, kept nowhere else.
 * @throws ExplanationClosed, WrongBirthDate
 */
export async function openExplanation({ ctx, input }: { ctx: ServiceContext, input: { token: string, birthDate: string } }): Promise<{ visit: string }> {
  const { policy } = (await rulesInForce(ctx.db, ctx.now)).rules
  const tokenHash = hashSecret(input.token)
  const outcome = await inTransaction(ctx, async (tx): Promise<Try> => {
    const [known] = await tx.select({ letterId: letterLinks.letterId }).from(letterLinks).where(eq(letterLinks.tokenHash, tokenHash))
    if (!known) return { result: 'closed' }
    const held = await holdLetter(tx, known.letterId)
    const links = await tx.select({
      hash: letterLinks.tokenHash, wrongTries: letterLinks.wrongTries, alive: sql<boolean>`${letterLinks.revokedAt} is null and ${letterLinks.expiresAt} > now()`,
    }).from(letterLinks).where(eq(letterLinks.letterId, known.letterId)).orderBy(asc(letterLinks.tokenHash)).for('update')
    if (!links.find(link => link.hash === tokenHash)?.alive) return { result: 'closed' }
    if (fits(input.birthDate, held.patient.birthDate)) return { result: 'open', visit: await beginVisit(tx, ctx, held, tokenHash) }

    const living = links.filter(link => link.alive)
    const tries = living.reduce((sum, link) => sum + link.wrongTries, 1)
    await tx.update(letterLinks).set({ wrongTries: sql`${letterLinks.wrongTries} + 1` }).where(eq(letterLinks.tokenHash, tokenHash))
    const dead = tries >= policy.links.value.birthDateTries
    if (dead) await killLinks(tx, held, living.map(link => link.hash))
    await auditLetter(tx, ctx, held, 'explanation.refuse', { tries, dead })
    return { result: dead ? 'closed' : 'wrong' }
  })
  if (outcome.result === 'closed') throw new ExplanationClosed(policy.department)
  if (outcome.result === 'wrong') throw new WrongBirthDate(policy.department)
  return { visit: outcome.visit }
}

/** The record may know the year or the month alone; a date within it fits. */
function fits(given: string, recorded: string): boolean {
  return given === recorded || given.startsWith(`${recorded}-`)
}

async function beginVisit(tx: Database, ctx: ServiceContext, held: HeldLetter, tokenHash: string): Promise<string> {
  const visit = newSecret()
  await tx.insert(explanationVisits).values({ idHash: hashSecret(visit), tokenHash, expiresAt: sql`now() + make_interval(mins => ${visitMinutes})` })
  await tx.update(letterLinks).set({ openedAt: sql`coalesce(${letterLinks.openedAt}, now())` }).where(eq(letterLinks.tokenHash, tokenHash))
  await auditLetter(tx, ctx, held, 'explanation.open')
  return visit
}

/** A letter that nobody can open any more is work for the desk: it counts as failed, and may be sent again with a new link. */
async function killLinks(tx: Database, { letter }: HeldLetter, hashes: string[]): Promise<void> {
  await tx.update(letterLinks).set({ revokedAt: sql`now()` }).where(inArray(letterLinks.tokenHash, hashes))
  if (letter.state !== 'delivered') return
  await tx.update(letters).set({ state: 'failed', lastError: 'Its link was closed after too many wrong dates of birth.' }).where(eq(letters.id, letter.id))
}
