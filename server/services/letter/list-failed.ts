import { desc, eq, sql } from 'drizzle-orm'
import type { FailedLetterView } from '#shared/types/views'
import { letters, patients, requests } from '#server/database/schema/requests'
import { userOf } from '../context'
import type { ServiceContext } from '../context'

/** More than this many open failures is an outage, not a list of work. */
const mostListed = 200

/**
 * Letters that could not be delivered, newest first. An administrator, who may see no patient, gets the mail domain alone: what it
 * takes to find the fault.
 */
export async function listFailedLetters({ ctx }: { ctx: ServiceContext }): Promise<{ rows: FailedLetterView[] }> {
  const sees = userOf(ctx).role === 'scheduler'
  const rows = await ctx.db.select({
    letter: letters,
    reference: requests.reference,
    patient: patients.displayName,
    openedAt: sql<string | null>`(select max(l.opened_at) from letter_links l where l.letter_id = ${letters.id})`,
  }).from(letters)
    .innerJoin(requests, eq(requests.id, letters.requestId))
    .innerJoin(patients, eq(patients.id, letters.patientId))
    .where(eq(letters.state, 'failed'))
    .orderBy(desc(letters.queuedAt), desc(letters.id)).limit(mostListed)
  return {
    rows: rows.map(({ letter, reference, patient, openedAt }) => ({
      id: letter.id,
      kind: letter.kind,
      state: letter.state,
      detailed: letter.detailed,
      toAddress: sees ? letter.toAddress : domainOf(letter.toAddress),
      attempts: letter.attempts,
      lastError: letter.lastError,
      queuedAt: letter.queuedAt.toISOString(),
      deliveredAt: letter.deliveredAt?.toISOString() ?? null,
      openedAt: openedAt === null ? null : new Date(openedAt).toISOString(),
      requestId: letter.requestId,
      requestReference: reference ?? '',
      patient: sees ? patient : null,
    })),
  }
}

function domainOf(address: string | null): string | null {
  return address === null ? null : `…@${address.split('@').at(-1) ?? ''}`
}
