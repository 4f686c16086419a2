import { and, desc, eq, gte, ilike, inArray, lt, or, sql } from 'drizzle-orm'
import type { SQL } from 'drizzle-orm'
import { DateTime } from 'luxon'
import type { z } from 'zod'
import { auditActions, auditSentences } from '#shared/domain/access/audit'
import type { AuditAction } from '#shared/domain/access/audit'
import type { auditQuery } from '#shared/schemas/people'
import type { AuditView, Page } from '#shared/types/views'
import type { Database } from '#server/database/client'
import { users } from '#server/database/schema/people'
import { auditEvents } from '#server/database/schema/trail'
import type { ServiceContext } from '../context'
import { Invalid } from '../errors'
import { rulesInForce } from '../rules/in-force'
import { inTransaction } from '../transaction'
import { recordAudit } from './record'

type AuditQuery = z.output<typeof auditQuery>

/** People whose name fits what was typed; more than this and the name must be typed out. */
const mostPeople = 50

/**
 * One page of the trail, newest first. Every filter has an index of its own, and looking is itself written into the trail.
 *
 * @throws Invalid for a mark that no page of ours ended with.
 */
export async function listAudit({ ctx, input }: { ctx: ServiceContext, input: AuditQuery }): Promise<Page<AuditView>> {
  const mark = input.after === undefined ? null : Number(input.after)
  if (mark !== null && !Number.isSafeInteger(mark)) throw new Invalid([{ path: 'after', message: 'This page does not exist.' }])
  const filter = await filterOf(ctx, input)
  return await inTransaction(ctx, async (tx) => {
    const rows = filter === 'nobody'
      ? []
      : await tx.select().from(auditEvents)
          .where(and(...filter, mark === null ? undefined : lt(auditEvents.id, mark)))
          .orderBy(desc(auditEvents.id)).limit(input.limit + 1)
    const filters = (['actor', 'action', 'reference', 'from', 'to'] as const).filter(name => input[name])
    await recordAudit(tx, ctx, { action: 'audit.read', objectType: 'audit', objectId: null, reference: input.reference ?? null, detail: { filters } })
    const shown = rows.slice(0, input.limit)
    return { rows: shown.map(viewOf), next: rows.length > input.limit ? String(shown.at(-1)?.id) : null }
  })
}

async function filterOf(ctx: ServiceContext, input: AuditQuery): Promise<SQL[] | 'nobody'> {
  const filter: SQL[] = []
  if (input.actor) {
    const people = await peopleNamed(ctx.db, input.actor)
    if (people.length === 0) return 'nobody'
    filter.push(inArray(auditEvents.actorId, people))
  }
  if (input.action) filter.push(eq(auditEvents.action, input.action))
  if (input.reference) filter.push(eq(auditEvents.reference, input.reference.toUpperCase()))
  if (input.from || input.to) {
    const { rules } = await rulesInForce(ctx.db, ctx.now)
    const zone = rules.policy.department.timeZone
    if (input.from) filter.push(...notBefore(DateTime.fromISO(input.from, { zone }).toJSDate()))
    if (input.to) filter.push(...before(DateTime.fromISO(input.to, { zone }).plus({ days: 1 }).toJSDate()))
  }
  return filter
}

/**
 * The trail is read in order of `id`, so a date becomes a bound on it, found through the index on `at`: without one, a page of an
 * old week would walk through everything since. Rows written at the same moment may lie a few ids apart, hence the margin.
 */
const margin = 200

function notBefore(instant: Date): SQL[] {
  return [
    gte(auditEvents.at, instant),
    sql`${auditEvents.id} >= (select min(near.id) from (select id from audit_events where at >= ${instant} order by at limit ${margin}) near)`,
  ]
}

function before(instant: Date): SQL[] {
  return [
    lt(auditEvents.at, instant),
    sql`${auditEvents.id} <= (select max(near.id) from (select id from audit_events where at < ${instant} order by at desc limit ${margin}) near)`,
  ]
}

async function peopleNamed(db: Database, words: string): Promise<string[]> {
  const pattern = `%${words.replace(/[\\%_]/g, sign => `\\${sign}`)}%`
  const found = await db.select({ id: users.id }).from(users)
    .where(or(ilike(users.name, pattern), ilike(users.email, pattern), eq(sql`${users.id}::text`, words))).limit(mostPeople)
  return found.map(row => row.id)
}

function viewOf(row: typeof auditEvents.$inferSelect): AuditView {
  const action = isAction(row.action) ? row.action : null
  return {
    id: row.id,
    at: row.at.toISOString(),
    who: row.actorName,
    role: row.actorRole,
    action: action ?? 'access.refuse',
    sentence: action ? auditSentences[action] : row.action,
    reference: row.reference,
    objectType: row.objectType,
    objectId: row.objectId,
    detail: withoutClinicalFacts(row.detail),
    outcome: row.outcome === 'refused' ? 'refused' : 'ok',
  }
}

/** Kept in the trail, not shown with it: whoever administers accounts has no need of what a patient was given. */
const clinicalFacts = new Set(['contrast', 'agent', 'suggestion', 'outcome', 'given', 'reaction', 'extravasation', 'need'])

function withoutClinicalFacts(detail: Record<string, unknown>): Record<string, unknown> {
  return Object.fromEntries(Object.entries(detail).filter(([name]) => !clinicalFacts.has(name)))
}

function isAction(text: string): text is AuditAction {
  return (auditActions as string[]).includes(text)
}
