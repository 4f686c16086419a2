import { drizzle } from 'drizzle-orm/node-postgres'
import type { NodePgDatabase } from 'drizzle-orm/node-postgres'
import pg from 'pg'
import * as people from './schema/people'
import * as requests from './schema/requests'
import * as rules from './schema/rules'
import * as trail from './schema/trail'

export const schema = { ...people, ...rules, ...requests, ...trail }

/** Both the pool's database and an open transaction: queries don't care which they run in. */
export type Database = NodePgDatabase<typeof schema>

export interface DatabaseHandle { db: Database, pool: pg.Pool }

/**
 * Opens the pool. Waiting for a connection, a lock or an answer is bounded, so that trouble shows as an error instead of
 * a hanging page.
 */
export function openDatabase(url: string, onError: (error: Error) => void): DatabaseHandle {
  const pool = new pg.Pool({
    connectionString: url,
    max: 20,
    connectionTimeoutMillis: 3_000,
    statement_timeout: 10_000,
    lock_timeout: 3_000,
    idle_in_transaction_session_timeout: 15_000,
    application_name: 'wherefore',
  })
  // Without a listener a lost connection ends the process.
  pool.on('error', onError)
  pool.on('connect', client => client.on('error', onError))
  return { db: drizzle(pool, { schema }), pool }
}
