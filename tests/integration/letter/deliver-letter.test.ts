import { randomUUID } from 'node:crypto'
import { and, eq, sql } from 'drizzle-orm'
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { starterPolicy } from '#shared/domain/policy/defaults'
import { letterLinks, letters, patients, requests } from '#server/database/schema/requests'
import { auditEvents } from '#server/database/schema/trail'
import { createMailer, MailFailure } from '#server/mail/transport'
import type { Mailer } from '#server/mail/transport'
import { deliverLetter } from '#server/services/letter/deliver-letter'
import { releaseSlot } from '#server/services/request/release-slot'
import { createTestDepartment } from '../../support/department'
import type { TestDepartment } from '../../support/department'
import { bookedExam, doneExam, letterById, newestLetter, systemContext, tokenIn } from '../../support/exam'
import { catcherPort, mailTo } from '../../support/mail-catcher'
import { startScriptedSmtp } from '../../support/smtp-server'
import type { ScriptedSmtp } from '../../support/smtp-server'

let department: TestDepartment
let smtp: ScriptedSmtp

const origin = 'https://imaging.example.org'
const settings = { host: '127.0.0.1', user: '', password: '', tls: 'off', from: 'Northshore Imaging <imaging@northshore.example>' } as const
const mailerTo = (port: number, sendWithinMs = 5_000): Mailer => createMailer({ ...settings, port }, { sendWithinMs })
const address = () => `${randomUUID()}@example.org`

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

function deliver(letterId: string, { mailer = mailerTo(smtp.port), lastTry = false } = {}) {
  return deliverLetter({ ctx: systemContext(department), input: { letterId, lastTry }, mail: { mailer, origin } })
}

async function actionsOn(letterId: string): Promise<string[]> {
  const rows = await department.db.select({ action: auditEvents.action }).from(auditEvents)
    .where(and(eq(auditEvents.objectType, 'letter'), eq(auditEvents.objectId, letterId))).orderBy(auditEvents.id)
  return rows.map(row => row.action)
}

describe('a letter on its way', () => {
  it('arrives once, with the explanation itself where the patient agreed to that', async () => {
    const email = address()
    const exam = await bookedExam(department, { email, detailsByEmail: true })
    const mailer = mailerTo(catcherPort())
    expect(await deliver(exam.letter.id, { mailer })).toBe('delivered')
    expect(await deliver(exam.letter.id, { mailer })).toBe('skipped')

    const [mail, ...more] = await mailTo(email)
    expect(more).toEqual([])
    const { content } = exam.letter
    expect(mail?.subject).toBe(content.detailedSubject)
    for (const line of [...content.opening, ...content.sections.flatMap(section => [...section.paragraphs, ...section.items]), content.caution]) {
      expect(mail?.text.replace(/\s+/g, ' ')).toContain(line)
    }
    expect(mail?.html).toContain('lang="en"')
    expect(mail?.text).toContain(`${origin}/explanation/`)
    const letter = await letterById(department, exam.letter.id)
    expect(letter).toMatchObject({ state: 'delivered', attempts: 1, lastError: null, messageId: `<letter-${letter.id}@northshore.example>` })
    expect(letter.deliveredAt).not.toBeNull()
    expect(await actionsOn(letter.id)).toEqual(['letter.queue', 'letter.deliver'])
  })

  it.each([false, null])('says only that there is a message where the patient did not agree (%s)', async (detailsByEmail) => {
    const email = address()
    const exam = await bookedExam(department, { email, detailsByEmail, displayName: 'Quentin Oyelaran' })
    await deliver(exam.letter.id, { mailer: mailerTo(catcherPort()) })
    const [mail] = await mailTo(email)
    const whole = JSON.stringify(mail)
    expect(whole).not.toMatch(/Quentin|Oyelaran|brain|contrast|seizure|gadolinium|kidney|MRI|your scan/i)
    expect(mail?.text).toContain(`${origin}/explanation/`)
  })

  it('holds no details once the agreement was taken back after queueing', async () => {
    const exam = await bookedExam(department, { email: address(), detailsByEmail: true })
    await department.db.update(patients).set({ detailsByEmail: false }).where(eq(patients.id, exam.patientId))
    await deliver(exam.letter.id)
    expect(smtp.taken[0]?.source).not.toMatch(/brain/i)
    expect((await letterById(department, exam.letter.id)).detailed).toBe(false)
  })

  it('has a link of at least 128 random bits whose token stands nowhere in the database', async () => {
    const exam = await bookedExam(department, { email: address() })
    await deliver(exam.letter.id)
    const token = tokenIn(decodeBody(smtp.taken[0]?.source ?? ''))
    expect(Buffer.from(token, 'base64url').length).toBeGreaterThanOrEqual(16)
    const [link] = await department.db.select().from(letterLinks).where(eq(letterLinks.letterId, exam.letter.id))
    expect(link?.tokenHash).toMatch(/^[0-9a-f]{64}$/)
    const [row] = await department.db.select({ slot: requests.slotStartsAt }).from(requests).where(eq(requests.id, exam.letter.requestId))
    expect(((link?.expiresAt.getTime() ?? 0) - (row?.slot?.getTime() ?? 0)) / 86_400_000).toBeCloseTo(starterPolicy.links.value.validDays, 1)
    for (const table of ['letters', 'letter_links', 'audit_events', 'requests', 'patients']) {
      const { rows } = await department.db.execute(sql`select 1 from ${sql.identifier(table)} t where strpos(t::text, ${token}) > 0`)
      expect(rows, table).toEqual([])
    }
  })

  it('stays where it is once called back', async () => {
    const exam = await bookedExam(department, { email: address() })
    await department.db.update(letters).set({ state: 'cancelled' }).where(eq(letters.id, exam.letter.id))
    expect(await deliver(exam.letter.id)).toBe('skipped')
    expect(smtp.connections()).toBe(0)
  })

  it('goes to the new address, never to the old, where that was changed after queueing', async () => {
    const [before, after] = [address(), address()]
    const exam = await bookedExam(department, { email: before })
    await department.db.update(patients).set({ email: after }).where(eq(patients.id, exam.patientId))
    expect(await deliver(exam.letter.id)).toBe('skipped')
    expect(await letterById(department, exam.letter.id)).toMatchObject({ state: 'cancelled' })
    const next = await newestLetter(department, exam.id)
    expect(next).toMatchObject({ state: 'queued', toAddress: after, content: exam.letter.content })
    await deliver(next.id)
    expect(smtp.taken.map(mail => mail.to)).toEqual([after])
  })
})

describe('a mail server in trouble', () => {
  it('that puts it off leaves the letter queued, to be tried again', async () => {
    const exam = await bookedExam(department, { email: address() })
    smtp.follow({ recipient: to => `451 4.3.0 try later ${to}` })
    const error = await deliver(exam.letter.id).catch((caught: unknown) => caught)
    expect(error).toBeInstanceOf(MailFailure)
    expect(error instanceof Error && error.message).toBe('The mail server put the message off (451).')
    expect(await letterById(department, exam.letter.id)).toMatchObject({ state: 'queued', attempts: 1, lastError: 'The mail server put the message off (451).' })

    smtp.follow({})
    expect(await deliver(exam.letter.id)).toBe('delivered')
    expect(await letterById(department, exam.letter.id)).toMatchObject({ state: 'delivered', attempts: 2, lastError: null })
    expect(smtp.taken).toHaveLength(1)
  })

  it('that is not there leaves the letter queued', async () => {
    const exam = await bookedExam(department, { email: address() })
    const gone = await startScriptedSmtp()
    await gone.close()
    await expect(deliver(exam.letter.id, { mailer: mailerTo(gone.port) })).rejects.toThrow('could not be reached')
    expect(await letterById(department, exam.letter.id)).toMatchObject({ state: 'queued', attempts: 1 })
  })

  it('that refuses the address for good fails this letter at once and says so in the trail, while others flow', async () => {
    const [bad, good] = [await bookedExam(department, { email: 'nobody@refused.example' }), await bookedExam(department, { email: address() })]
    smtp.follow({ recipient: to => to.endsWith('refused.example') ? '550 5.1.1 no such user nobody@refused.example' : '250 ok' })
    expect(await deliver(bad.letter.id)).toBe('failed')
    expect(await deliver(good.letter.id)).toBe('delivered')
    const failed = await letterById(department, bad.letter.id)
    expect(failed).toMatchObject({ state: 'failed', lastError: 'The mail server refused the address (550).' })
    expect(failed.lastError).not.toContain('@')
    expect(await actionsOn(failed.id)).toEqual(['letter.queue', 'letter.fail'])
    const [request] = await department.db.select().from(requests).where(eq(requests.id, bad.id))
    expect(request?.state).toBe('booked')
  })

  it('that refuses the sender, or itself, is no fault of the address', async () => {
    const exam = await bookedExam(department, { email: address() })
    smtp.follow({ greeting: '554 5.3.2 not today' })
    await expect(deliver(exam.letter.id)).rejects.toBeInstanceOf(MailFailure)
    expect((await letterById(department, exam.letter.id)).state).toBe('queued')
  })

  it('that falls silent is left after the deadline', async () => {
    const exam = await bookedExam(department, { email: address() })
    smtp.follow({ message: 'silence' })
    await expect(deliver(exam.letter.id, { mailer: mailerTo(smtp.port, 300) })).rejects.toThrow('The mail server took too long to answer.')
    expect(await letterById(department, exam.letter.id)).toMatchObject({ state: 'queued', lastError: 'The mail server took too long to answer.' })
  })

  it('on the last try fails the letter', async () => {
    const exam = await bookedExam(department, { email: address() })
    smtp.follow({ recipient: () => '451 try later' })
    expect(await deliver(exam.letter.id, { lastTry: true })).toBe('failed')
    expect((await letterById(department, exam.letter.id)).state).toBe('failed')
  })

  it('closes the link of a message that was refused, and keeps that of one that may have arrived', async () => {
    const exam = await bookedExam(department, { email: address() })
    const link = async () => (await department.db.select().from(letterLinks).where(eq(letterLinks.letterId, exam.letter.id)).orderBy(letterLinks.createdAt)).map(row => row.revokedAt !== null)
    smtp.follow({ recipient: () => '451 try later' })
    await deliver(exam.letter.id).catch(() => undefined)
    expect(await link()).toEqual([true])
    smtp.follow({ message: 'silence' })
    await deliver(exam.letter.id, { mailer: mailerTo(smtp.port, 300) }).catch(() => undefined)
    expect(await link()).toEqual([true, false])
  })
})

describe('a crash between the mail server\'s yes and the mark', () => {
  it('sends the letter at most twice, under one Message-ID', async () => {
    const exam = await bookedExam(department, { email: address() })
    const real = mailerTo(smtp.port)
    const crashing: Mailer = {
      ...real,
      send: async (message, signal) => {
        await real.send(message, signal)
        throw new Error('the process was killed')
      },
    }
    await expect(deliver(exam.letter.id, { mailer: crashing })).rejects.toThrow('the process was killed')
    expect((await letterById(department, exam.letter.id)).state).toBe('queued')
    expect(await deliver(exam.letter.id)).toBe('delivered')
    const ids = smtp.taken.map(mail => /^Message-ID:\s+(.+)$/im.exec(mail.source)?.[1])
    expect(ids).toEqual([`<letter-${exam.letter.id}@northshore.example>`, `<letter-${exam.letter.id}@northshore.example>`])
    const links = await department.db.select().from(letterLinks).where(eq(letterLinks.letterId, exam.letter.id))
    expect(links.map(link => link.revokedAt)).toEqual([null, null])
  })
})

describe('the letter after the exam', () => {
  it('closes the request once delivered', async () => {
    const exam = await doneExam(department, { email: address() })
    expect(exam.letter.kind).toBe('after')
    await deliver(exam.letter.id)
    const [request] = await department.db.select().from(requests).where(eq(requests.id, exam.id))
    expect(request).toMatchObject({ state: 'closed', version: exam.version + 1 })
    expect(request?.closedAt).not.toBeNull()
    const [event] = await department.db.select().from(auditEvents).where(and(eq(auditEvents.objectId, exam.id), eq(auditEvents.action, 'request.close')))
    expect(event).toMatchObject({ actorKind: 'system', detail: expect.objectContaining({ from: 'done', to: 'closed' }) })
  })

  it('leaves it open while it could not be delivered', async () => {
    const exam = await doneExam(department, { email: address() })
    smtp.follow({ recipient: () => '550 no such user' })
    await deliver(exam.letter.id)
    const [request] = await department.db.select().from(requests).where(eq(requests.id, exam.id))
    expect(request?.state).toBe('done')
  })
})

describe('a letter called back while it was on its way', () => {
  it('is followed by word that the exam is off, and its link is closed', async () => {
    const exam = await bookedExam(department, { email: address(), detailsByEmail: true })
    const real = mailerTo(smtp.port)
    const slow: Mailer = {
      ...real,
      send: async (message, signal) => {
        const id = await real.send(message, signal)
        await releaseSlot({ ctx: department.as(department.people.scheduler), input: { id: exam.id, version: exam.version, cause: 'moved-by-us', note: '' } })
        return id
      },
    }
    await deliver(exam.letter.id, { mailer: slow })
    expect(await letterById(department, exam.letter.id)).toMatchObject({ state: 'delivered' })
    const [link] = await department.db.select().from(letterLinks).where(eq(letterLinks.letterId, exam.letter.id))
    expect(link?.revokedAt).not.toBeNull()
    const next = await newestLetter(department, exam.id)
    expect(next).toMatchObject({ kind: 'changed', state: 'queued' })
    expect(next.content.title).toContain('will not take place as planned')
    await deliver(next.id)
    expect(smtp.taken).toHaveLength(2)
  })
})

/** Quoted-printable as the wire carries it, for looking at links. */
function decodeBody(source: string): string {
  return source.replace(/=\n/g, '').replace(/=3D/g, '=')
}
