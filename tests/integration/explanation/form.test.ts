import { randomUUID } from 'node:crypto'
import { eq } from 'drizzle-orm'
import pg from 'pg'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { letters } from '#server/database/schema/requests'
import { createTestDepartment } from '../../support/department'
import type { TestDepartment } from '../../support/department'
import { bookedExam, letterById, tokenIn } from '../../support/exam'
import { startTestServer } from '../../support/server'
import type { TestServer } from '../../support/server'
import { startScriptedSmtp } from '../../support/smtp-server'
import type { ScriptedSmtp } from '../../support/smtp-server'

/** The whole way against the built server: its own queue sends the letter, its pages take the date of birth. */
let department: TestDepartment
let smtp: ScriptedSmtp
let server: TestServer

const right = { month: '3', day: '14', year: '1965' }

beforeAll(async () => {
  department = await createTestDepartment()
  smtp = await startScriptedSmtp()
  server = await startTestServer(department.database, { NUXT_SMTP_PORT: String(smtp.port), NUXT_TRUSTED_PROXIES: '1' })
})
afterAll(async () => {
  await server.stop()
  await smtp.close()
  await department.close()
})

async function until(what: () => Promise<boolean>): Promise<void> {
  const deadline = Date.now() + 20_000
  while (!await what()) {
    if (Date.now() > deadline) throw new Error(`It did not come about in time.\n${server.output()}`)
    await new Promise(resolve => setTimeout(resolve, 100))
  }
}

async function sentLetter() {
  const email = `${randomUUID()}@example.org`
  const exam = await bookedExam(department, { email })
  await until(async () => (await letterById(department, exam.letter.id)).state === 'delivered')
  return { exam, token: tokenIn((smtp.taken.find(mail => mail.to === email)?.source ?? '').replace(/=\n/g, '')) }
}

/** Each caller from an address of its own, so that the limit on one does not meet another. */
let callers = 0
function post(path: string, body: string, headers: Record<string, string>): Promise<Response> {
  callers += 1
  return fetch(`${server.origin}${path}`, { method: 'POST', body, redirect: 'manual', headers: { 'x-forwarded-for': `192.0.2.${callers}`, ...headers } })
}
const form = (token: string, fields: Record<string, string>, headers: Record<string, string> = { 'sec-fetch-site': 'same-origin' }) =>
  post(`/explanation-form/${token}`, new URLSearchParams(fields).toString(), { 'content-type': 'application/x-www-form-urlencoded', ...headers })
const json = (token: string, birthDate: string) =>
  post(`/api/explanations/${token}`, JSON.stringify({ birthDate }), { 'content-type': 'application/json', 'origin': server.origin })
/** The cookies that a browser would send to this path. */
const cookiesFor = (answer: Response, path: string) => answer.headers.getSetCookie()
  .filter(line => path.startsWith(/path=([^;]+)/i.exec(line)?.[1] ?? '?')).map(line => line.split(';')[0]).join('; ')

describe('the patient\'s form without scripts', () => {
  it('leads to the explanation, with a cookie that scripts cannot read and other pages do not get', async () => {
    const { exam, token } = await sentLetter()
    const answer = await form(token, right)
    expect([answer.status, answer.headers.get('location')]).toEqual([303, '/explanation/current'])
    const cookies = answer.headers.getSetCookie()
    expect(cookies.length).toBeGreaterThan(0)
    for (const cookie of cookies) expect(cookie).toMatch(/Max-Age=900;.*Path=\/(explanation|api\/explanations);.*HttpOnly;.*SameSite=Lax/)
    expect(answer.headers.get('cache-control')).toBe('no-store')
    const view = await fetch(`${server.origin}/api/explanations/current`, { headers: { cookie: cookiesFor(answer, '/api/explanations/current') } })
    expect(await view.json()).toMatchObject({ letter: { title: exam.letter.content.title } })
    const page = await fetch(`${server.origin}/explanation/current`, { headers: { cookie: cookiesFor(answer, '/explanation/current') } })
    expect(await page.text()).toContain(exam.letter.content.title)
  })

  it.each([
    ['another date', { ...right, year: '1964' }, 'wrong'],
    ['a day that the month does not have', { month: '2', day: '30', year: '1965' }, 'wrong'],
    ['nothing', {}, 'wrong'],
  ])('goes back to itself with the reason after %s', async (_what, fields, refused) => {
    const { token } = await sentLetter()
    const answer = await form(token, fields)
    expect([answer.status, answer.headers.get('location')]).toEqual([303, `/explanation/${token}?refused=${refused}`])
    expect(answer.headers.getSetCookie()).toEqual([])
  })

  it('says of a link that never was what it says of one that is over', async () => {
    const answer = await form('never-was-a-link', right)
    expect(answer.headers.get('location')).toBe('/explanation/never-was-a-link?refused=ended')
  })

  it('is not taken from another site, nor in another dress', async () => {
    const { token } = await sentLetter()
    expect((await form(token, right, { 'sec-fetch-site': 'cross-site' })).status).toBe(403)
    expect((await form(token, right, { origin: 'https://elsewhere.example' })).status).toBe(403)
    expect((await form(token, right, {})).status).toBe(403)
    expect((await post(`/explanation-form/${token}`, 'month=3', { 'content-type': 'text/plain', 'sec-fetch-site': 'same-origin' })).status).toBe(415)
    expect((await post(`/api/explanations/${token}`, new URLSearchParams({ birthDate: '1965-03-14' }).toString(), {
      'content-type': 'application/x-www-form-urlencoded', 'sec-fetch-site': 'same-origin',
    })).status).toBe(415)
  })

  it('is taken from an older browser that hides where it comes from', async () => {
    const { token } = await sentLetter()
    expect((await form(token, right, { origin: 'null' })).headers.get('location')).toBe('/explanation/current')
  })

  it('is slowed down for one address, and for it alone', async () => {
    const statuses: (string | null)[] = []
    for (let count = 0; count < 12; count += 1) statuses.push((await form('guess', right, { 'sec-fetch-site': 'same-origin', 'x-forwarded-for': '198.51.100.7' })).headers.get('location'))
    expect(statuses.at(-1)).toBe('/explanation/guess?refused=slow')
    expect((await form('guess', right)).headers.get('location')).toBe('/explanation/guess?refused=ended')
  })
})

describe('the patient\'s page with scripts', () => {
  it('answers the explanation itself', async () => {
    const { exam, token } = await sentLetter()
    const answer = await json(token, '1965-03-14')
    expect(answer.status).toBe(200)
    expect(await answer.json()).toMatchObject({ letter: { title: exam.letter.content.title }, department: { phone: expect.any(String) } })
  })

  it('is told of a wrong date by field, and whom to call', async () => {
    const { token } = await sentLetter()
    const answer = await json(token, '1964-03-14')
    expect(answer.status).toBe(422)
    expect(await answer.json()).toMatchObject({ errors: [{ path: 'birthDate' }], department: { phone: expect.any(String) } })
  })

  it('opening the link changes nothing: a mail scanner neither uses it up nor counts as a try', async () => {
    const { exam, token } = await sentLetter()
    for (let count = 0; count < 8; count += 1) expect((await fetch(`${server.origin}/explanation/${token}`)).status).toBe(200)
    expect((await letterById(department, exam.letter.id)).state).toBe('delivered')
    expect((await json(token, '1965-03-14')).status).toBe(200)
  })

  it('leaves no token, address or name in the log', async () => {
    const { exam, token } = await sentLetter()
    await json(token, '1964-03-14')
    expect(server.output()).not.toContain(token)
    expect(server.output()).not.toContain(exam.letter.toAddress)
    expect(server.output()).not.toContain('Lindqvist')
  })
})

describe('the server\'s own queue', () => {
  it('goes on after the database cut its connections', async () => {
    const client = new pg.Client({ connectionString: department.database.workerUrl })
    await client.connect()
    await client.query('select pg_terminate_backend(pid) from pg_stat_activity where datname = current_database() and usename = current_user and pid <> pg_backend_pid()')
    await client.end()
    await sentLetter()
    expect(server.exitCode()).toBeNull()
  })

  it('stops with the server, in seconds, while the mail server is silent', async () => {
    smtp.follow({ greeting: 'silence' })
    const exam = await bookedExam(department, { email: `${randomUUID()}@example.org` })
    const before = smtp.connections()
    await until(async () => smtp.connections() > before || (await letterById(department, exam.letter.id)).attempts > 0)
    const began = Date.now()
    expect(await server.stop()).toBe(0)
    expect(Date.now() - began).toBeLessThan(10_000)
    expect((await department.db.select().from(letters).where(eq(letters.id, exam.letter.id)))[0]?.state).toBe('queued')
  })
})
