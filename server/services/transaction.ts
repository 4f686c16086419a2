import { and, eq, sql } from 'drizzle-orm'
import { drizzle } from 'drizzle-orm/node-postgres'
import type pg from 'pg'
import { schema } from '#server/database/client'
import type { Database } from '#server/database/client'
import { idempotencyKeys } from '#server/database/schema/trail'
import type { IdempotencyToken, ServiceContext } from './context'
import { BadRequest, Invalid } from './errors'

const pools = new WeakMap<Database, pg.Pool>()

/** Tells the helper which pool a database handle draws from. */
export function registerPool(db: Database, pool: pg.Pool): void {
  pools.set(db, pool)
}

/**
 * Runs `work` in one transaction, or joins the one already open. Where the call carries an idempotency key, an earlier
 * finished answer is given back instead, and the key is stored with the work: both commit or neither.
 *
 * The result must be plain JSON, since it may be answered again from the table.
 *
 * @param again runs before an earlier answer is given back, to ask whether this person may still have it.
 */
export async function inTransaction<T>(
  ctx: ServiceContext,
  work: (tx: Database) => Promise<T>,
  again: (tx: Database) => Promise<void> = () => Promise.resolve(),
): Promise<T> {
  const pool = pools.get(ctx.db)
  if (!pool) return await work(ctx.db)
  const client = await pool.connect()
  let broken: Error | undefined
  try {
    await client.query('begin')
    const tx: Database = drizzle(client, { schema })
    const token = ctx.idempotency
    if (token) {
      await tx.execute(sql`select pg_advisory_xact_lock(hashtextextended(${`${token.userId} ${token.route} ${token.key}`}, 0))`)
      const earlier = await findAnswer<T>(tx, token)
      if (earlier) {
        await again(tx)
        await client.query('commit')
        return earlier.response
      }
    }
    const result = await work(tx)
    if (token) {
      await tx.insert(idempotencyKeys).values({ ...token, status: 200, response: result })
    }
    await client.query('commit')
    return result
  }
  catch (error) {
    // A client that cannot even roll back must not return to the pool.
    await client.query('rollback').catch((rollbackError: Error) => {
      broken = rollbackError
    })
    throw error
  }
  finally {
    client.release(broken)
  }
}

/** The answer already given to this key, looked for before slow work outside the transaction. */
export async function earlierAnswer<T>(ctx: ServiceContext): Promise<{ response: T } | null> {
  return ctx.idempotency ? await findAnswer<T>(ctx.db, ctx.idempotency) : null
}

async function findAnswer<T>(db: Database, token: IdempotencyToken): Promise<{ response: T } | null> {
  const [row] = await db.select().from(idempotencyKeys).where(and(
    eq(idempotencyKeys.userId, token.userId),
    eq(idempotencyKeys.route, token.route),
    eq(idempotencyKeys.key, token.key),
  ))
  if (!row) return null
  if (row.fingerprint !== token.fingerprint) {
    throw new Invalid([], 'This Idempotency-Key was already used for another body.')
  }
  // Written by this very function from the same verb's result.
  return { response: row.response as T }
}

/** @throws BadRequest for a key no client of ours would make. */
export function assertIdempotencyKey(key: string | undefined): string {
  if (!key || !/^[\w-]{16,100}$/.test(key)) {
    throw new BadRequest('An Idempotency-Key header of 16 to 100 letters, digits, - or _ must name this write.')
  }
  return key
}
