import { createHash } from 'node:crypto'
import { and, desc, eq, isNull, sql } from 'drizzle-orm'
import { afterAll, beforeAll, beforeEach, describe, expect, it, vi } from 'vitest'
import type { AuditView, Page, PracticeView, UserView } from '#shared/types/views'
import { demoPassPhrase } from '#server/database/seed/demo-users.mjs'
import { invitations, users } from '#server/database/schema/people'
import { auditEvents } from '#server/database/schema/trail'
import { startDemoServer } from '../../support/demo-server'
import type { DemoServer } from '../../support/demo-server'
import { createVisitor } from '../../support/visitor'
import type { Visitor } from '../../support/visitor'

const ruth = 'ruth.adler@northshore.example'
const sam = 'sam.whitfield@millbrook.example'
const leila = 'leila.farouk@northshore.example'
const goodPassword = 'three old bicycles in the attic'

let demo: DemoServer
let admin: Visitor
beforeAll(async () => {
  demo = await startDemoServer()
})
afterAll(async () => {
  await demo.close()
})
beforeEach(async () => {
  await demo.db.execute(sql`delete from rate_limits`)
  admin = await demo.signedIn(ruth)
})

async function read<T>(visitor: Visitor, path: string): Promise<T> {
  return await (await visitor.get(path)).json() as T
}

async function account(email: string): Promise<UserView> {
  const { rows } = await read<{ rows: UserView[] }>(admin, '/api/users')
  const user = rows.find(row => row.email === email)
  if (!user) throw new Error(`${email} is not listed`)
  return user
}

const bodyOf = (user: UserView) => ({
  name: user.name, role: user.role, maySign: user.maySign, guidanceLead: user.guidanceLead, practiceIds: user.practices.map(practice => practice.id), disabled: user.state === 'disabled',
})

const change = (user: UserView, body: object) => admin.send('PUT', `/api/users/${user.id}`, { ...bodyOf(user), ...body }, { version: user.version })

/** Waits until the job has written the message, then puts the hash of a token that the test knows in place of the message's own. */
async function mintLink(userId: string, token: string): Promise<string> {
  await untilSent(userId)
  await demo.db.update(invitations).set({ tokenHash: createHash('sha256').update(token).digest('hex') })
    .where(and(eq(invitations.userId, userId), isNull(invitations.acceptedAt)))
  return `/api/invitations/${token}`
}

/** @returns what the table keeps of the token in the message */
async function untilSent(userId: string): Promise<string> {
  return await vi.waitFor(async () => {
    const [row] = await demo.db.select({ tokenHash: invitations.tokenHash }).from(invitations)
      .where(and(eq(invitations.userId, userId), isNull(invitations.acceptedAt)))
    if (!row?.tokenHash) throw new Error('the message was not written yet')
    return row.tokenHash
  }, { timeout: 15_000, interval: 100 })
}

const invite = (email: string, key?: string) => admin.send('POST', '/api/users', { name: 'Noor Haddad', email, role: 'scheduler', maySign: false, guidanceLead: false, practiceIds: [] }, { key })

describe('accounts', () => {
  it('are listed with their practices and when their owner was last here', async () => {
    const user = await account(sam)
    expect(user).toMatchObject({ name: 'Sam Whitfield', state: 'active', maySign: false, practices: [{ name: 'Millbrook Family Practice' }] })
    expect((await account(ruth)).lastSeenAt).toMatch(/Z$/)
  })

  it('change with the very next call: whoever loses a right is signed out at once', async () => {
    const person = await demo.signedIn(sam)
    const other = await demo.signedIn(sam)
    expect((await change(await account(sam), { maySign: true })).status).toBe(200)
    expect((await person.get('/api/me')).status).toBe(401)
    expect((await other.get('/api/me')).status).toBe(401)
    expect(await read(await demo.signedIn(sam), '/api/me')).toMatchObject({ actor: { maySign: true } })
    await change(await account(sam), { maySign: false })
  })

  it('keep their owner signed in when only the name changes', async () => {
    const person = await demo.signedIn(sam)
    expect((await change(await account(sam), { name: 'Samuel Whitfield' })).status).toBe(200)
    expect(await read(person, '/api/me')).toMatchObject({ actor: { name: 'Samuel Whitfield' } })
    await change(await account(sam), { name: 'Sam Whitfield' })
  })

  it('are closed to sign-in while disabled, and open again afterwards', async () => {
    const person = await demo.signedIn(leila)
    expect((await change(await account(leila), { disabled: true })).status).toBe(200)
    expect((await person.get('/api/me')).status).toBe(401)
    expect(await createVisitor(demo.server.origin).signIn(leila, demoPassPhrase)).toBe(401)
    expect((await change(await account(leila), { disabled: false })).status).toBe(200)
    expect(await createVisitor(demo.server.origin).signIn(leila, demoPassPhrase)).toBe(200)
  })

  it('refuse a change made from an old picture of them', async () => {
    const seen = await account(sam)
    await change(seen, { name: 'Sam W. Whitfield' })
    expect((await change(seen, { name: 'Somebody Else' })).status).toBe(412)
    expect((await account(sam)).name).toBe('Sam W. Whitfield')
    expect((await admin.send('PUT', `/api/users/${seen.id}`, bodyOf(seen))).status).toBe(428)
  })

  it('never leave the department without an administrator, not even when two remove each other at once', async () => {
    const mine = await account(ruth)
    expect((await change(mine, { disabled: true })).status).toBe(403)
    const promoted = await change(await account(leila), { role: 'administrator' })
    expect(promoted.status).toBe(200)
    const second = await demo.signedIn(leila)
    const [first, other] = [await account(ruth), await account(leila)]
    const results = await Promise.all([
      admin.send('PUT', `/api/users/${other.id}`, { ...bodyOf(other), role: 'scheduler' }, { version: other.version }),
      second.send('PUT', `/api/users/${first.id}`, { ...bodyOf(first), role: 'scheduler' }, { version: first.version }),
    ])
    expect(results.filter(result => result.status === 200).length).toBe(1)
    const left = await demo.db.select({ id: users.id }).from(users).where(eq(users.role, 'administrator'))
    expect(left).toHaveLength(1)
    await demo.db.update(users).set({ role: 'administrator' }).where(eq(users.email, ruth))
    await demo.db.update(users).set({ role: 'scheduler' }).where(eq(users.email, leila))
  })

  it('cannot be given fields that are not asked for, nor an ordering clinician without a practice', async () => {
    const user = await account(sam)
    expect((await change(user, { passwordHash: 'x' })).status).toBe(422)
    const answer = await change(user, { practiceIds: [] })
    expect(answer.status).toBe(422)
    expect(await answer.json()).toMatchObject({ errors: [{ path: 'practiceIds' }] })
  })
})

describe('invitations', () => {
  it('make one account however often the same invitation is sent', async () => {
    const key = crypto.randomUUID()
    const [first, second] = [await invite('noor.haddad@northshore.example', key), await invite('noor.haddad@northshore.example', key)]
    expect([first.status, second.status]).toEqual([200, 200])
    expect(await first.json()).toEqual(await second.json())
    expect((await invite('Noor.Haddad@Northshore.example')).status).toBe(422)
    expect((await account('noor.haddad@northshore.example')).state).toBe('invited')
  })

  it('are sent, and the database keeps only the hash of what the link holds', async () => {
    const user = await account('noor.haddad@northshore.example')
    expect(await untilSent(user.id)).toMatch(/^[0-9a-f]{64}$/)
  })

  it('let their owner choose a password once, and sign in with it', async () => {
    const user = await account('noor.haddad@northshore.example')
    const link = await mintLink(user.id, 'a'.repeat(43))
    const guest = createVisitor(demo.server.origin)
    expect(await read(guest, link)).toEqual({ name: 'Noor Haddad', email: 'noor.haddad@northshore.example', department: 'Northshore Imaging', again: false })
    const weak = await guest.send('POST', link, { password: 'passwordpassword' })
    expect(weak.status).toBe(422)
    expect(await weak.text()).not.toContain('passwordpassword')
    expect((await guest.send('POST', link, { password: goodPassword })).status).toBe(200)
    expect((await guest.get('/api/me')).status).toBe(401)
    expect((await guest.send('POST', link, { password: goodPassword })).status).toBe(404)
    expect(await guest.signIn('noor.haddad@northshore.example', goodPassword)).toBe(200)
  })

  it('end every session of an account that gets a new password', async () => {
    const user = await account('noor.haddad@northshore.example')
    const person = createVisitor(demo.server.origin)
    await person.signIn(user.email, goodPassword)
    expect((await admin.send('POST', `/api/users/${user.id}/invitation`, {})).status).toBe(200)
    expect((await person.get('/api/me')).status).toBe(200)
    const link = await mintLink(user.id, 'b'.repeat(43))
    expect((await createVisitor(demo.server.origin).send('POST', link, { password: 'four green kettles on a shelf' })).status).toBe(200)
    expect((await person.get('/api/me')).status).toBe(401)
    expect(await createVisitor(demo.server.origin).signIn(user.email, goodPassword)).toBe(401)
  })

  it('look the same when unknown, used up, run out or replaced', async () => {
    const user = await account('noor.haddad@northshore.example')
    await admin.send('POST', `/api/users/${user.id}/invitation`, {})
    const old = await mintLink(user.id, 'c'.repeat(43))
    await admin.send('POST', `/api/users/${user.id}/invitation`, {})
    const expired = await mintLink(user.id, 'd'.repeat(43))
    await demo.db.update(invitations).set({ expiresAt: new Date(Date.now() - 1000) }).where(eq(invitations.userId, user.id))
    const guest = createVisitor(demo.server.origin)
    const answers = await Promise.all([old, expired, `/api/invitations/${'a'.repeat(43)}`, `/api/invitations/${'z'.repeat(43)}`, '/api/invitations/short'].map(async (path) => {
      const answer = await guest.get(path)
      const { requestId: _requestId, detail: _detail, ...body } = await answer.json() as Record<string, unknown>
      return body
    }))
    for (const answer of answers) expect(answer).toEqual(answers[0])
    expect(answers[0]).toMatchObject({ status: 404 })
  })

  it('are not used up by a mail scanner that opens the link', async () => {
    const user = await account('noor.haddad@northshore.example')
    await admin.send('POST', `/api/users/${user.id}/invitation`, {})
    const link = await mintLink(user.id, 'e'.repeat(43))
    for (let looks = 0; looks < 3; looks++) expect((await fetch(`${demo.server.origin}${link}`)).status).toBe(200)
    expect((await createVisitor(demo.server.origin).send('POST', link, { password: 'five quiet rivers and a mill' })).status).toBe(200)
  })

  it('can be opened only so often from one address', async () => {
    const statuses: number[] = []
    for (let tries = 0; tries < 12; tries++) statuses.push((await fetch(`${demo.server.origin}/api/invitations/${'q'.repeat(43)}`)).status)
    expect(statuses.slice(0, 10)).toEqual(Array(10).fill(404))
    const refused = await fetch(`${demo.server.origin}/api/invitations/${'q'.repeat(43)}`)
    expect(refused.status).toBe(429)
    expect(Number(refused.headers.get('retry-after'))).toBeGreaterThan(0)
  })
})

describe('practices', () => {
  it('are added once, renamed from their newest version, and keep their names apart', async () => {
    const added = await (await admin.send('POST', '/api/practices', { name: 'Lakeside Clinic', phone: '555 0155', disabled: false })).json() as PracticeView
    expect(added).toMatchObject({ name: 'Lakeside Clinic', users: 0, disabled: false })
    expect((await admin.send('POST', '/api/practices', { name: 'lakeside clinic', phone: '', disabled: false })).status).toBe(422)
    const body = { name: 'Lakeside Medicine', phone: '', disabled: false }
    expect((await admin.send('PUT', `/api/practices/${added.id}`, body, { version: added.version })).status).toBe(200)
    expect((await admin.send('PUT', `/api/practices/${added.id}`, body, { version: added.version })).status).toBe(412)
  })

  it('show nothing to their people from the moment they are closed', async () => {
    const person = await demo.signedIn('amara.diallo@northgate.example')
    const { rows } = await read<{ rows: PracticeView[] }>(admin, '/api/practices')
    const practice = rows.find(row => row.name === 'Northgate Orthopaedics')
    if (!practice) throw new Error('the practice is not listed')
    await admin.send('PUT', `/api/practices/${practice.id}`, { name: practice.name, phone: practice.phone, disabled: true }, { version: practice.version })
    expect(await read(person, '/api/me')).toMatchObject({ practices: [], actor: { practiceIds: [] } })
  })
})

describe('the audit trail', () => {
  it('holds who changed what, and can be asked by person, kind and day', async () => {
    const byKind = await read<Page<AuditView>>(admin, '/api/audit?action=user.disable&limit=5')
    expect(byKind.rows[0]).toMatchObject({ who: 'Ruth Adler', sentence: 'disabled a user', outcome: 'ok' })
    const byPerson = await read<Page<AuditView>>(admin, '/api/audit?actor=leila&limit=100')
    expect(byPerson.rows.length).toBeGreaterThan(0)
    expect(new Set(byPerson.rows.map(row => row.who))).toEqual(new Set(['Leila Farouk']))
    expect((await read<Page<AuditView>>(admin, '/api/audit?actor=%25')).rows).toEqual([])
    const today = new Date(Date.now() - 86_400_000).toISOString().slice(0, 10)
    expect((await read<Page<AuditView>>(admin, `/api/audit?from=${today}&limit=5`)).rows).toHaveLength(5)
    expect((await read<Page<AuditView>>(admin, '/api/audit?to=2020-01-01')).rows).toEqual([])
  })

  it('is read page by page without a gap or a double', async () => {
    const seen: number[] = []
    let after = ''
    for (let pages = 0; pages < 4; pages++) {
      const page = await read<Page<AuditView>>(admin, `/api/audit?action=session.begin&limit=3${after}`)
      seen.push(...page.rows.map(row => row.id))
      if (!page.next) break
      after = `&after=${page.next}`
    }
    expect(seen).toEqual([...new Set(seen)].sort((a, b) => b - a))
    expect(seen.length).toBeGreaterThan(6)
    expect((await admin.get('/api/audit?after=elsewhere')).status).toBe(422)
  })

  it('notes each look at itself, and each refusal', async () => {
    await admin.get('/api/audit?reference=WF-26-000001')
    await (await demo.signedIn(sam)).get('/api/audit')
    const [refusal, look] = await demo.db.select().from(auditEvents).where(sql`${auditEvents.action} in ('audit.read', 'access.refuse')`).orderBy(desc(auditEvents.id)).limit(2)
    expect(look).toMatchObject({ action: 'audit.read', actorName: 'Ruth Adler', reference: 'WF-26-000001' })
    expect(refusal).toMatchObject({ action: 'access.refuse', outcome: 'refused', detail: { action: 'audit.read' } })
  })

  it('cannot be changed or emptied by the application', async () => {
    await expect(demo.db.execute(sql`update audit_events set actor_name = 'x' where false`)).rejects.toThrow()
    await expect(demo.db.execute(sql`delete from audit_events where false`)).rejects.toThrow()
    await expect(demo.db.execute(sql`insert into audit_events (id, at, actor_kind, actor_name, action, object_type, request_id) overriding system value values (1, now(), 'system', 'x', 'x', 'x', 'x')`)).rejects.toThrow()
  })

  it('takes the change back with it when it cannot be written', async () => {
    const user = await account(sam)
    const { pool } = await import('#server/database/client').then(({ openDatabase }) => openDatabase(demo.database.ownerUrl, () => undefined))
    await pool.query('alter table audit_events add constraint no_changes check (action <> \'user.change\') not valid')
    expect((await change(user, { name: 'Not Written' })).status).toBeGreaterThanOrEqual(400)
    await pool.query('alter table audit_events drop constraint no_changes')
    await pool.end()
    expect((await account(sam)).name).toBe(user.name)
  })
})

describe('the operational log', () => {
  it('holds no address, name, password or link of all that was done here', () => {
    const said = demo.server.output()
    for (const canary of ['northshore.example', 'Whitfield', 'Haddad', goodPassword, demoPassPhrase, 'a'.repeat(43), 'Lakeside']) expect(said, canary).not.toContain(canary)
  })
})
