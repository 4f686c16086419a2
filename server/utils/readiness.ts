import type { Pool } from 'pg'
import journal from '#server/database/migrations/meta/_journal.json'

/** Migrations that this build knows and needs. A database may be ahead of it, never behind. */
const needed = journal.entries.length

export interface DatabaseLevel { applied: number, needed: number }

/** How many migrations the database has had. @throws Error where it cannot be reached */
export async function databaseLevel(pool: Pool): Promise<DatabaseLevel> {
  const { rows } = await pool.query<{ applied: number }>('select count(*)::integer as applied from drizzle.__drizzle_migrations')
  return { applied: rows[0]?.applied ?? 0, needed }
}

/** Whether the database answers and knows every table this build uses. */
export async function isReady(pool: Pool): Promise<boolean> {
  try {
    const level = await databaseLevel(pool)
    return level.applied >= level.needed
  }
  catch {
    return false
  }
}

/**
 * A committed write must survive a power cut: the server refuses a database that was told otherwise.
 *
 * @throws Error naming the settings.
 */
export async function assertDurable(pool: Pool): Promise<void> {
  const { rows } = await pool.query<{ name: string }>(
    `select name from pg_settings where name in ('fsync', 'full_page_writes', 'synchronous_commit') and setting = 'off' order by name`)
  if (rows.length > 0) {
    throw new Error(`Wherefore cannot start. PostgreSQL would lose finished work in a power cut; turn on: ${rows.map(row => row.name).join(', ')}`)
  }
}

let start: Promise<void> | undefined

/** The start-up plugin says what starting means; everything else waits with `whenReady`. */
export function beginStart(work: () => Promise<void>): Promise<void> {
  start ??= work()
  return start
}

/** Settles once configuration and database are in order. */
export function whenReady(): Promise<void> {
  return start ?? Promise.reject(new Error('The server has not begun to start.'))
}
