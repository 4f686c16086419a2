import { createHash } from 'node:crypto'
import type { Hash } from 'node:crypto'
import { asc, desc, sql } from 'drizzle-orm'
import type { Database } from '#server/database/client'
import { auditSeals } from '#server/database/schema/trail'
import type { ServiceContext } from '../context'
import { inTransaction } from '../transaction'
import { recordAudit } from './record'

/** What the first day's seal builds on. */
const genesis = '0'.repeat(64)

/** Rows read at once; a department writes some ten thousand a day. */
const batch = 5_000

/** Any fixed number: one sealer at a time. */
const sealLock = 7_305_119

/**
 * Seals every past day (UTC) that has no seal yet: SHA-256 over the day before's hash and each row's text, in order. Whoever
 * changes a row afterwards must change every later seal too.
 *
 * @returns the days sealed now, as YYYY-MM-DD.
 */
export async function sealDays({ ctx }: { ctx: ServiceContext }): Promise<string[]> {
  const sealed: string[] = []
  for (;;) {
    const day = await inTransaction(ctx, async (tx) => {
      await tx.execute(sql`select pg_advisory_xact_lock(${sealLock})`)
      const next = await nextDay(tx)
      if (!next) return null
      const seal = await hashDay(tx, next.day, next.previousHash)
      await tx.insert(auditSeals).values({ day: next.day, previousHash: next.previousHash, ...seal })
      await recordAudit(tx, ctx, { action: 'audit.seal', objectType: 'audit', objectId: next.day, detail: { rows: seal.rows } })
      return next.day
    })
    if (!day) return sealed
    sealed.push(day)
  }
}

/** Compares the trail with its seals. @returns the first day whose rows or seal were changed, or null. */
export async function findBrokenSeal(db: Database): Promise<string | null> {
  let previousHash = genesis
  for (const seal of await db.select().from(auditSeals).orderBy(asc(auditSeals.day))) {
    const now = await hashDay(db, seal.day, previousHash)
    if (seal.previousHash !== previousHash || seal.hash !== now.hash || seal.rows !== now.rows) return seal.day
    previousHash = seal.hash
  }
  return null
}

/** The day after the last seal, or the first with rows; null once none is over. A day is over an hour after its end: whatever began in it is written by then. */
async function nextDay(tx: Database): Promise<{ day: string, previousHash: string } | null> {
  const [last] = await tx.select().from(auditSeals).orderBy(desc(auditSeals.day)).limit(1)
  const today = sql`(now() at time zone 'UTC' - interval '1 hour')::date`
  const { rows } = await tx.execute<{ day: string | null }>(last
    ? sql`select (${last.day}::date + 1)::text as day where ${last.day}::date + 1 < ${today}`
    : sql`select min(at at time zone 'UTC')::date::text as day from audit_events having min(at at time zone 'UTC')::date < ${today}`)
  const day = rows[0]?.day
  return day ? { day, previousHash: last?.hash ?? genesis } : null
}

async function hashDay(db: Database, day: string, previousHash: string): Promise<{ rows: number, lastId: number | null, hash: string }> {
  const hash = createHash('sha256').update(previousHash)
  let [rows, lastId] = [0, 0]
  for (;;) {
    const found = await readRows(db, day, lastId)
    for (const row of found) addRow(hash, row.text)
    rows += found.length
    lastId = Number(found.at(-1)?.id ?? lastId)
    if (found.length < batch) return { rows, lastId: rows === 0 ? null : lastId, hash: hash.digest('hex') }
  }
}

/** A row's text is written by the database, so that no rounding of a driver changes it: instants to the microsecond, in UTC. */
async function readRows(db: Database, day: string, afterId: number): Promise<{ id: string, text: string }[]> {
  const { rows } = await db.execute<{ id: string, text: string }>(sql`
    select id::text as id, jsonb_build_array(
      id, to_char(at at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.US"Z"'), actor_kind, actor_id, actor_name, actor_role, action, object_type, object_id,
      reference, patient_id, practice_id, detail, outcome, request_id)::text as text
    from audit_events
    where at >= ${day}::timestamp at time zone 'UTC' and at < (${day}::timestamp + interval '1 day') at time zone 'UTC' and id > ${afterId}
    order by id limit ${batch}`)
  return rows
}

/** Length first, so that no two sequences of rows make one text. */
function addRow(hash: Hash, text: string): void {
  hash.update(`${Buffer.byteLength(text)}:`).update(text)
}
