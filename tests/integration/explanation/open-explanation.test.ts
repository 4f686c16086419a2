import { randomUUID } from 'node:crypto'
import { and, eq, sql } from 'drizzle-orm'
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { starterPolicy } from '#shared/domain/policy/defaults'
import { explanationVisits, letterLinks } from '#server/database/schema/requests'
import { auditEvents } from '#server/database/schema/trail'
import { createMailer } from '#server/mail/transport'
import type { ServiceContext } from '#server/services/context'
import { ServiceError } from '#server/services/errors'
import { ExplanationClosed, WrongBirthDate } from '#server/services/explanation/closed'
import { openExplanation } from '#server/services/explanation/open-explanation'
import { readExplanation } from '#server/services/explanation/read-explanation'
import { deliverLetter } from '#server/services/letter/deliver-letter'
import { listFailedLetters } from '#server/services/letter/list-failed'
import { retryLetter } from '#server/services/letter/retry-letter'
import { bookExam } from '#server/services/request/book'
import { createTestDepartment } from '../../support/department'
import type { TestDepartment } from '../../support/department'
import { bookedExam, letterById, newestLetter, systemContext, tokenIn } from '../../support/exam'
import { startScriptedSmtp } from '../../support/smtp-server'
import type { ScriptedSmtp } from '../../support/smtp-server'

let department: TestDepartment
let smtp: ScriptedSmtp

beforeAll(async () => {
  department = await createTestDepartment()
})
afterAll(async () => {
  await department.close()
})
beforeEach(async () => {
  smtp = await startScriptedSmtp()
})
afterEach(async () => {
  await smtp.close()
})

const right = '1965-03-14'
const tries = starterPolicy.links.value.birthDateTries

const patient = (): ServiceContext => ({ ...systemContext(department), actor: { kind: 'patient' } })
const open = (token: string, birthDate: string) => openExplanation({ ctx: patient(), input: { token, birthDate } })

async function send(letterId: string): Promise<string> {
  const mailer = createMailer({ host: '127.0.0.1', port: smtp.port, user: '', password: '', tls: 'off', from: 'imaging@northshore.example' })
  await deliverLetter({ ctx: systemContext(department), input: { letterId, lastTry: false }, mail: { mailer, origin: 'https://imaging.example.org' } })
  return tokenIn((smtp.taken.at(-1)?.source ?? '').replace(/=\n/g, ''))
}

async function sentLetter(birthDate = right) {
  const exam = await bookedExam(department, { email: `${randomUUID()}@example.org`, birthDate })
  return { exam, token: await send(exam.letter.id) }
}

describe('the right date of birth', () => {
  it('opens the explanation for a quarter of an hour, and says so in the trail', async () => {
    const { exam, token } = await sentLetter()
    const { visit } = await open(token, right)
    const view = await readExplanation({ ctx: patient(), input: { visit } })
    expect(view.letter).toEqual(exam.letter.content)
    expect(view.department).toMatchObject({ name: starterPolicy.department.name, phone: starterPolicy.department.phone })
    const [row] = await department.db.select({ minutes: sql<number>`extract(epoch from ${explanationVisits.expiresAt} - now())::double precision / 60` })
      .from(explanationVisits).innerJoin(letterLinks, eq(letterLinks.tokenHash, explanationVisits.tokenHash)).where(eq(letterLinks.letterId, exam.letter.id))
    expect(row?.minutes).toBeGreaterThan(14)
    expect(row?.minutes).toBeLessThanOrEqual(15)
    const [event] = await department.db.select().from(auditEvents).where(and(eq(auditEvents.objectId, exam.letter.id), eq(auditEvents.action, 'explanation.open')))
    expect(event).toMatchObject({ actorKind: 'patient', patientId: exam.patientId })
  })

  it('opens it again and again while the link is good', async () => {
    const { token } = await sentLetter()
    const [first, second] = [await open(token, right), await open(token, right)]
    expect(first.visit).not.toBe(second.visit)
  })

  it.each([
    ['1965', '1965-12-31'],
    ['1965-03', '1965-03-02'],
  ])('is any that fits where the record knows only %s', async (recorded, given) => {
    const { token } = await sentLetter(recorded)
    await expect(open(token, '1964-03-02')).rejects.toBeInstanceOf(WrongBirthDate)
    await expect(open(token, given)).resolves.toHaveProperty('visit')
  })

  it('shows the newest letter on the exam, never an old time from an old link', async () => {
    const { exam, token } = await sentLetter()
    const { visit } = await open(token, right)
    await bookExam({
      ctx: department.as(department.people.scheduler),
      input: { id: exam.id, version: exam.version, scannerId: department.scanner, startsAt: new Date(Date.now() + 30 * 86_400_000).toISOString(), minutes: 40 },
    })
    const moved = await newestLetter(department, exam.id)
    expect(moved.kind).toBe('changed')
    expect((await readExplanation({ ctx: patient(), input: { visit } })).letter).toEqual(moved.content)
  })
})

describe('a wrong date of birth', () => {
  it('may be put right until the tries are used up, then the link is dead even for the right one', async () => {
    const { exam, token } = await sentLetter()
    for (let count = 1; count < tries; count += 1) await expect(open(token, '1999-09-09')).rejects.toBeInstanceOf(WrongBirthDate)
    await expect(open(token, '1999-09-09')).rejects.toBeInstanceOf(ExplanationClosed)
    await expect(open(token, right)).rejects.toBeInstanceOf(ExplanationClosed)
    const events = await department.db.select().from(auditEvents).where(and(eq(auditEvents.objectId, exam.letter.id), eq(auditEvents.action, 'explanation.refuse')))
    expect(events).toHaveLength(tries)
    expect(JSON.stringify(events)).not.toContain('1999')
  })

  it('counts one by one when many come at once', async () => {
    const { exam, token } = await sentLetter()
    const results = await Promise.allSettled(Array.from({ length: 20 }, () => open(token, '1999-09-09')))
    const wrong = results.filter(result => result.status === 'rejected' && result.reason instanceof WrongBirthDate)
    const closed = results.filter(result => result.status === 'rejected' && result.reason instanceof ExplanationClosed)
    expect([wrong.length, closed.length]).toEqual([tries - 1, 20 - tries + 1])
    const [link] = await department.db.select().from(letterLinks).where(eq(letterLinks.letterId, exam.letter.id))
    expect(link).toMatchObject({ wrongTries: tries })
    expect(link?.revokedAt).not.toBeNull()
  })

  it('too often ends a visit already open, and puts the letter on the desk\'s list, from where a new link can be sent', async () => {
    const { exam, token } = await sentLetter()
    const { visit } = await open(token, right)
    for (let count = 0; count < tries; count += 1) await open(token, '1999-09-09').catch(() => undefined)
    await expect(readExplanation({ ctx: patient(), input: { visit } })).rejects.toBeInstanceOf(ExplanationClosed)
    const { rows } = await listFailedLetters({ ctx: department.as(department.people.scheduler) })
    expect(rows.find(row => row.id === exam.letter.id)?.lastError).toBe('Its link was closed after too many wrong dates of birth.')
    await retryLetter({ ctx: department.as(department.people.scheduler), input: { letterId: exam.letter.id } })
    await expect(open(await send(exam.letter.id), right)).resolves.toHaveProperty('visit')
    expect((await letterById(department, exam.letter.id)).state).toBe('delivered')
  })
})

describe('a link that does not open', () => {
  it('answers the same whether it is unknown, expired, revoked or used up', async () => {
    const facts = async (token: string) => {
      const error = await open(token, right).catch((caught: unknown) => caught)
      if (!(error instanceof ServiceError)) throw new Error('it opened')
      return { code: error.code, status: error.status, title: error.title, detail: error.detail, extra: error.extra }
    }
    const [expired, revoked, used] = [await sentLetter(), await sentLetter(), await sentLetter()]
    await department.db.update(letterLinks).set({ expiresAt: sql`now() - interval '1 second'` }).where(eq(letterLinks.letterId, expired.exam.letter.id))
    await department.db.update(letterLinks).set({ revokedAt: sql`now()` }).where(eq(letterLinks.letterId, revoked.exam.letter.id))
    for (let count = 0; count < tries; count += 1) await open(used.token, '1999-09-09').catch(() => undefined)
    const answers = [await facts('never-was-a-link'), await facts(''), await facts(expired.token), await facts(revoked.token), await facts(used.token)]
    expect(new Set(answers.map(answer => JSON.stringify(answer))).size).toBe(1)
    expect(answers[0]).toMatchObject({ status: 404, detail: expect.stringContaining(starterPolicy.department.phone) })
  })

  it('shows nothing without a visit, or after it', async () => {
    const { exam, token } = await sentLetter()
    const { visit } = await open(token, right)
    await department.db.update(explanationVisits).set({ expiresAt: sql`now() - interval '1 second'` })
      .where(sql`${explanationVisits.tokenHash} in (select token_hash from letter_links where letter_id = ${exam.letter.id})`)
    for (const value of [null, 'made-up', visit]) await expect(readExplanation({ ctx: patient(), input: { visit: value } })).rejects.toBeInstanceOf(ExplanationClosed)
  })
})
