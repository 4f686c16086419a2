import { and, eq, exists, gt, lt, sql } from 'drizzle-orm'
import { alias } from 'drizzle-orm/pg-core'
import { sessions } from '#server/database/schema/people'
import { explanationVisits } from '#server/database/schema/requests'
import { idempotencyKeys } from '#server/database/schema/trail'
import type { ServiceContext } from '../context'

/** Hours for which the answer to a finished write is kept, in case it is sent again. */
const keyHours = 24

/** Days for which a session that is over is kept; the trail remembers signing in and out for good. */
const sessionDays = 30

/**
 * Removes what has run out by the database's clock: answers kept for repeats, visits to explanations, and sessions long over. An
 * account's newest session stays, since it says when the person was seen last.
 */
export async function eraseExpired({ ctx }: { ctx: ServiceContext }): Promise<{ keys: number, visits: number, sessions: number }> {
  const keys = await ctx.db.delete(idempotencyKeys).where(lt(idempotencyKeys.createdAt, sql`now() - make_interval(hours => ${keyHours})`))
  const visits = await ctx.db.delete(explanationVisits).where(lt(explanationVisits.expiresAt, sql`now()`))
  const newer = alias(sessions, 'newer')
  const over = await ctx.db.delete(sessions).where(and(
    lt(sessions.expiresAt, sql`now() - make_interval(days => ${sessionDays})`),
    exists(ctx.db.select({ one: sql`1` }).from(newer).where(and(eq(newer.userId, sessions.userId), gt(newer.lastSeenAt, sessions.lastSeenAt)))),
  ))
  return { keys: keys.rowCount ?? 0, visits: visits.rowCount ?? 0, sessions: over.rowCount ?? 0 }
}
