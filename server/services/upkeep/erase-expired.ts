import { lt, sql } from 'drizzle-orm'
import { explanationVisits } from '#server/database/schema/requests'
import { idempotencyKeys } from '#server/database/schema/trail'
import type { ServiceContext } from '../context'

/** Hours for which the answer to a finished write is kept, in case it is sent again. */
const keyHours = 24

/** Removes what has run out by the database's clock: answers kept for repeats, and visits to explanations. */
export async function eraseExpired({ ctx }: { ctx: ServiceContext }): Promise<{ keys: number, visits: number }> {
  const keys = await ctx.db.delete(idempotencyKeys).where(lt(idempotencyKeys.createdAt, sql`now() - make_interval(hours => ${keyHours})`))
  const visits = await ctx.db.delete(explanationVisits).where(lt(explanationVisits.expiresAt, sql`now()`))
  return { keys: keys.rowCount ?? 0, visits: visits.rowCount ?? 0 }
}
