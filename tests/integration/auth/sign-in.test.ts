import { desc, eq, sql } from 'drizzle-orm'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { hashPassword } from '#server/auth/password'
import { demoPassPhrase } from '#server/database/seed/demo-users.mjs'
import { sessions, users } from '#server/database/schema/people'
import { auditEvents } from '#server/database/schema/trail'
import { startDemoServer } from '../../support/demo-server'
import type { DemoServer } from '../../support/demo-server'
import { startTestServer } from '../../support/server'
import { createVisitor } from '../../support/visitor'

const ines = 'ines.okafor@millbrook.example'
const leila = 'leila.farouk@northshore.example'

let demo: DemoServer
beforeAll(async () => {
  demo = await startDemoServer()
})
afterAll(async () => {
  await demo.close()
})
beforeEach(async () => {
  await demo.db.execute(sql`delete from rate_limits`)
})

const visitor = () => createVisitor(demo.server.origin)

async function idOf(email: string): Promise<string> {
  const [user] = await demo.db.select({ id: users.id }).from(users).where(eq(users.email, email))
  if (!user) throw new Error(`${email} is not in the department`)
  return user.id
}

/** Moves the times of somebody's sessions into the past, as if that long had gone by. */
async function age(email: string, minutes: { seen?: number, begun?: number }): Promise<void> {
  const userId = await idOf(email)
  if (minutes.seen) await demo.db.update(sessions).set({ lastSeenAt: sql`now() - make_interval(mins => ${minutes.seen})` }).where(eq(sessions.userId, userId))
  if (minutes.begun) await demo.db.update(sessions).set({ expiresAt: sql`expires_at - make_interval(mins => ${minutes.begun})` }).where(eq(sessions.userId, userId))
}

describe('signing in', () => {
  it('lets the right pass phrase in and says who it is', async () => {
    const someone = visitor()
    expect((await someone.get('/api/me')).status).toBe(401)
    expect(await someone.signIn(ines, demoPassPhrase)).toBe(200)
    const me = await (await someone.get('/api/me')).json() as { actor: { name: string, role: string }, practices: { name: string }[] }
    expect(me.actor).toMatchObject({ name: 'Dr Ines Okafor', role: 'orderer' })
    expect(me.practices.map(practice => practice.name)).toEqual(['Millbrook Family Practice'])
  })

  it('takes the address in any case and with spaces around', async () => {
    expect(await visitor().signIn('  Ines.Okafor@Millbrook.example ', demoPassPhrase)).toBe(200)
  })

  it('answers alike for a wrong password, an unknown address, a disabled account and one not yet accepted', async () => {
    await demo.db.insert(users).values([
      { name: 'Gone', email: 'gone@northshore.example', role: 'scheduler', passwordHash: await hashPassword(demoPassPhrase), disabledAt: new Date() },
      { name: 'New', email: 'new@northshore.example', role: 'scheduler' },
    ])
    const answers = []
    for (const [email, password] of [[ines, 'wrong'], ['nobody@northshore.example', demoPassPhrase], ['gone@northshore.example', demoPassPhrase], ['new@northshore.example', demoPassPhrase]] as const) {
      const { csrfToken } = await (await fetch(`${demo.server.origin}/api/auth/csrf`)).json() as { csrfToken: string }
      const someone = visitor()
      answers.push(await someone.signIn(email, password))
      expect(someone.cookie()).not.toContain('session')
      expect(csrfToken).toHaveLength(64)
    }
    expect(answers).toEqual([401, 401, 401, 401])
  })

  it('needs the forgery token of its own page', async () => {
    const someone = visitor()
    await someone.get('/api/auth/csrf')
    const answer = await fetch(`${demo.server.origin}/api/auth/callback/credentials`, {
      method: 'POST',
      redirect: 'manual',
      headers: { 'content-type': 'application/x-www-form-urlencoded', 'cookie': someone.cookie(), 'origin': demo.server.origin },
      body: new URLSearchParams({ email: ines, password: demoPassPhrase, csrfToken: 'guessed', json: 'true' }),
    })
    expect(answer.headers.getSetCookie().join()).not.toContain('session')
  })

  it('refuses a sign-in form sent from another site', async () => {
    expect(await visitor().signIn(ines, demoPassPhrase, { origin: 'https://elsewhere.example' })).toBe(403)
    expect(await visitor().signIn(ines, demoPassPhrase, { 'sec-fetch-site': 'cross-site' })).toBe(403)
  })

  it('accepts a password typed on a keyboard that composes letters differently', async () => {
    const composed = 'caf\u00e9 au lait in the morning'
    await demo.db.insert(users).values({ name: 'Zoe Tan', email: 'zoe.tan@northshore.example', role: 'scheduler', passwordHash: await hashPassword(composed) })
    expect(await visitor().signIn('zoe.tan@northshore.example', composed.normalize('NFD'))).toBe(200)
  })

  it('hides the session from scripts and keeps names out of it', async () => {
    const someone = visitor()
    await someone.signIn(ines, demoPassPhrase)
    const answer = await someone.get('/api/auth/session')
    const line = answer.headers.getSetCookie().find(cookie => cookie.startsWith('wherefore-session='))
    expect(line).toMatch(/HttpOnly/)
    expect(line).toMatch(/SameSite=Lax/)
    expect(await answer.json()).toEqual({ expires: expect.any(String), user: {} })
  })

  it('sends nobody to another site afterwards', async () => {
    const answer = await fetch(`${demo.server.origin}/api/auth/session?callbackUrl=${encodeURIComponent('https://elsewhere.example/')}`)
    expect(answer.headers.getSetCookie().join()).not.toContain('elsewhere')
  })

  it('offers none of the library\'s own pages or collectors', async () => {
    for (const path of ['/api/auth/_log', '/api/auth/verify-request', '/api/auth/signin/github']) {
      expect((await visitor().send('POST', path, {})).status, path).toBe(404)
    }
  })

  it('writes each try into the trail, with the reason but never the password', async () => {
    await visitor().signIn(leila, 'a wrong pass phrase')
    await visitor().signIn(leila, demoPassPhrase)
    const rows = await demo.db.select().from(auditEvents).where(eq(auditEvents.objectId, await idOf(leila))).orderBy(desc(auditEvents.id)).limit(2)
    expect(rows.map(row => [row.action, row.outcome, row.actorName])).toEqual([['session.begin', 'ok', 'Leila Farouk'], ['session.refuse', 'refused', 'nobody']])
    expect(JSON.stringify(rows)).not.toContain('pass phrase')
    expect(demo.server.output()).not.toContain('a wrong pass phrase')
  })
})

describe('guessing', () => {
  it('closes the door to an address after ten wrong tries, even for the right password', async () => {
    for (let tries = 0; tries < 10; tries++) await visitor().signIn(leila, `wrong ${tries}`)
    expect(await visitor().signIn(leila, demoPassPhrase)).toBe(401)
  })

  it('counts tries that are sent at the same moment', async () => {
    await Promise.all(Array.from({ length: 20 }, () => visitor().signIn(leila, 'wrong')))
    const rows = await demo.db.select({ detail: auditEvents.detail }).from(auditEvents)
      .where(eq(auditEvents.objectId, await idOf(leila))).orderBy(desc(auditEvents.id)).limit(20)
    expect(rows.filter(row => row.detail.why === 'wrong password').length).toBeLessThanOrEqual(10)
    expect(await visitor().signIn(leila, demoPassPhrase)).toBe(401)
  })

  it('leaves other people alone', async () => {
    for (let tries = 0; tries < 12; tries++) await visitor().signIn(leila, 'wrong')
    expect(await visitor().signIn(ines, demoPassPhrase)).toBe(200)
  })

  it('forgets wrong tries after a right one', async () => {
    for (let tries = 0; tries < 4; tries++) await visitor().signIn(leila, 'wrong')
    expect(await visitor().signIn(leila, demoPassPhrase)).toBe(200)
    for (let tries = 0; tries < 8; tries++) await visitor().signIn(leila, 'wrong')
    expect(await visitor().signIn(leila, demoPassPhrase)).toBe(200)
  })
})

describe('a session', () => {
  it('dies on the server at sign-out: a copy of the cookie opens nothing', async () => {
    const someone = await demo.signedIn(ines)
    const copy = someone.cookie()
    await someone.signOut()
    someone.setCookie(copy)
    expect((await someone.get('/api/me')).status).toBe(401)
    expect(await (await someone.get('/api/auth/session')).json()).toEqual({})
  })

  it('ends after 15 minutes without anybody\'s doing', async () => {
    const someone = await demo.signedIn(ines)
    await age(ines, { seen: 14 })
    expect((await someone.get('/api/me')).status).toBe(200)
    await age(ines, { seen: 16 })
    expect((await someone.get('/api/me')).status).toBe(401)
  })

  it('is kept alive by a person, not by polling', async () => {
    const someone = await demo.signedIn(ines)
    await age(ines, { seen: 10 })
    await someone.get('/api/me', { 'x-wherefore-background': '1' })
    const [polled] = await demo.db.select({ idle: sql<number>`extract(epoch from now() - max(${sessions.lastSeenAt}))::integer` }).from(sessions).where(eq(sessions.userId, await idOf(ines)))
    expect(polled?.idle).toBeGreaterThan(590)
    await someone.get('/api/me')
    const [active] = await demo.db.select({ idle: sql<number>`extract(epoch from now() - max(${sessions.lastSeenAt}))::integer` }).from(sessions).where(eq(sessions.userId, await idOf(ines)))
    expect(active?.idle).toBeLessThan(60)
  })

  it('ends after 12 hours however busy', async () => {
    const someone = await demo.signedIn(ines)
    await age(ines, { begun: 12 * 60 })
    expect((await someone.get('/api/me')).status).toBe(401)
  })

  it('is not opened by a bearer header', async () => {
    const someone = await demo.signedIn(ines)
    const token = /wherefore-session=([^;]+)/.exec(someone.cookie())?.[1] ?? ''
    expect((await fetch(`${demo.server.origin}/api/me`, { headers: { authorization: `Bearer ${token}` } })).status).toBe(401)
  })

  it('lives on at a second server on the same database', async () => {
    const secret = 'Zq8v1Yt3Lk5Nw7Rb9Xc2Hd4Jf6Pg0Ms-UaVe_iOoTz'
    const first = await startTestServer(demo.database, { NUXT_AUTH_SECRET: secret })
    const second = await startTestServer(demo.database, { NUXT_AUTH_SECRET: secret })
    try {
      const someone = createVisitor(first.origin)
      expect(await someone.signIn(ines, demoPassPhrase)).toBe(200)
      const elsewhere = createVisitor(second.origin)
      elsewhere.setCookie(someone.cookie())
      expect((await elsewhere.get('/api/me')).status).toBe(200)
    }
    finally {
      await Promise.all([first.stop(), second.stop()])
    }
  })
})

describe('without the demo setting', () => {
  it('demo accounts are refused, and their open sessions too', async () => {
    const secret = 'Kw7Rb9Xc2Hd4Jf6Pg0Ms-UaVe_iOoTzZq8v1Yt3Lk5N'
    const withDemo = await startTestServer(demo.database, { NUXT_AUTH_SECRET: secret })
    const without = await startTestServer(demo.database, { NUXT_AUTH_SECRET: secret, NUXT_DEMO: 'off' })
    try {
      const someone = createVisitor(withDemo.origin)
      await someone.signIn(ines, demoPassPhrase)
      expect(await createVisitor(without.origin).signIn(ines, demoPassPhrase)).toBe(401)
      const elsewhere = createVisitor(without.origin)
      elsewhere.setCookie(someone.cookie())
      expect((await elsewhere.get('/api/me')).status).toBe(401)
    }
    finally {
      await Promise.all([withDemo.stop(), without.stop()])
    }
  })
})
