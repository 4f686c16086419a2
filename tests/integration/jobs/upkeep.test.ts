import { randomUUID } from 'node:crypto'
import { eq, sql } from 'drizzle-orm'
import pg from 'pg'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { sessions } from '#server/database/schema/people'
import { auditEvents, auditSeals, idempotencyKeys } from '#server/database/schema/trail'
import { findBrokenSeal, sealDays } from '#server/services/audit/seal-days'
import { eraseExpired } from '#server/services/upkeep/erase-expired'
import { createTestDepartment } from '../../support/department'
import type { TestDepartment } from '../../support/department'
import { systemContext } from '../../support/exam'

let department: TestDepartment
let owner: pg.Client

beforeAll(async () => {
  department = await createTestDepartment()
  owner = new pg.Client({ connectionString: department.database.ownerUrl })
  await owner.connect()
})
afterAll(async () => {
  await owner.end()
  await department.close()
})

/** Only the owner of the table may write a past time; the application cannot. */
async function eventAt(at: string, name = 'Ruth Adler'): Promise<void> {
  await owner.query(`insert into audit_events (at, actor_kind, actor_name, action, object_type, request_id) values (${at}, 'user', $1, 'session.begin', 'session', 'r1')`, [name])
}
/** What somebody with the owner's password could do: the trigger aside, the row changed. */
async function tamper(statement: string): Promise<void> {
  await owner.query('alter table audit_events disable trigger audit_events_append_only')
  await owner.query(statement)
  await owner.query('alter table audit_events enable always trigger audit_events_append_only')
}
const seals = () => department.db.select().from(auditSeals).orderBy(auditSeals.day)
const day = (ago: number) => new Date(Date.now() - ago * 86_400_000).toISOString().slice(0, 10)
const noonOf = (ago: number) => `'${day(ago)}T12:00:00Z'::timestamptz`

describe('sealing the trail', () => {
  it('seals every day that is over, quiet ones too, and never today', async () => {
    await eventAt(noonOf(5))
    await eventAt(noonOf(5), 'Somebody Else')
    await eventAt(noonOf(3))
    await eventAt('now()')
    const done = await sealDays({ ctx: systemContext(department) })
    expect(done.slice(0, 3)).toEqual([day(5), day(4), day(3)])
    expect(done).not.toContain(day(0))
    const rows = await seals()
    expect(rows.slice(0, 3).map(row => row.rows)).toEqual([2, 0, 1])
    expect(rows[1]?.previousHash).toBe(rows[0]?.hash)
    expect(await findBrokenSeal(department.db)).toBeNull()
    const [event] = await department.db.select().from(auditEvents).where(eq(auditEvents.action, 'audit.seal')).orderBy(auditEvents.id).limit(1)
    expect(event).toMatchObject({ actorKind: 'system', objectId: day(5) })
  })

  it('seals a day once, with two at it', async () => {
    const before = await seals()
    const done = await Promise.all([sealDays({ ctx: systemContext(department) }), sealDays({ ctx: systemContext(department) })])
    expect(done.flat()).toEqual([])
    expect(await seals()).toEqual(before)
  })

  it('notices a row that was changed afterwards, to the microsecond', async () => {
    const [row] = (await owner.query<{ id: string }>('select id from audit_events order by id limit 1')).rows
    await tamper(`update audit_events set at = at + interval '1 microsecond' where id = ${row?.id}`)
    expect(await findBrokenSeal(department.db)).toBe(day(5))
    await tamper(`update audit_events set at = at - interval '1 microsecond' where id = ${row?.id}`)
    expect(await findBrokenSeal(department.db)).toBeNull()
  })

  it('notices a row that was slipped in or taken out', async () => {
    await eventAt(noonOf(4))
    expect(await findBrokenSeal(department.db)).toBe(day(4))
    await tamper(`delete from audit_events where at = ${noonOf(4)}`)
    expect(await findBrokenSeal(department.db)).toBeNull()
    await tamper(`delete from audit_events where at = ${noonOf(3)}`)
    expect(await findBrokenSeal(department.db)).toBe(day(3))
  })
})

describe('erasing what has run out', () => {
  it('keeps an answer for a day in case its write is repeated, then lets it go', async () => {
    const key = (createdAt: string) => ({
      userId: department.people.orderer.userId, route: 'POST /api/requests', key: randomUUID(), fingerprint: 'f', status: 200, response: {}, createdAt: sql`${sql.raw(createdAt)}`,
    })
    const [old, fresh] = [key('now() - interval \'25 hours\''), key('now() - interval \'23 hours\'')]
    await department.db.insert(idempotencyKeys).values([old, fresh])
    expect(await eraseExpired({ ctx: systemContext(department) })).toMatchObject({ keys: 1, visits: 0 })
    expect((await department.db.select().from(idempotencyKeys)).map(row => row.key)).toEqual([fresh.key])
  })

  it('lets sessions long over go, but for the one that says when somebody was seen last', async () => {
    const session = (userId: string, idHash: string, daysAgo: number) => ({
      idHash, userId, createdAt: ago(daysAgo), lastSeenAt: ago(daysAgo), expiresAt: ago(daysAgo - 0.5),
    })
    const ago = (days: number) => sql`now() - make_interval(secs => ${days * 86_400})`
    const { orderer, scheduler } = department.people
    await department.db.insert(sessions).values([
      session(orderer.userId, 'long over', 200), session(orderer.userId, 'over', 10), session(scheduler.userId, 'only one', 200),
    ])
    expect(await eraseExpired({ ctx: systemContext(department) })).toMatchObject({ sessions: 1 })
    expect((await department.db.select().from(sessions)).map(row => row.idHash).sort()).toEqual(['only one', 'over'])
  })
})
