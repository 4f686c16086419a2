import { randomUUID } from 'node:crypto'
import { eq, sql } from 'drizzle-orm'
import type { Runner } from 'graphile-worker'
import type pg from 'pg'
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { openWorkerPool } from '#server/database/worker-pool'
import { invitations, users } from '#server/database/schema/people'
import { letterLinks, letters, requests } from '#server/database/schema/requests'
import { startWorker } from '#server/jobs/worker'
import { createMailer } from '#server/mail/transport'
import { issueInvitation } from '#server/services/invitation/issue-invitation'
import { readInvitation } from '#server/services/invitation/read-invitation'
import { approveRequest } from '#server/services/request/approve'
import { inTransaction } from '#server/services/transaction'
import { queryRequest } from '#server/services/request/query'
import { sendRequest } from '#server/services/request/send'
import { createTestDepartment, typedCreatinine } from '../../support/department'
import type { TestDepartment } from '../../support/department'
import { bookedExam, doneExam, letterById, systemContext, tokenIn } from '../../support/exam'
import { startScriptedSmtp } from '../../support/smtp-server'
import type { ScriptedSmtp } from '../../support/smtp-server'

let department: TestDepartment
let smtp: ScriptedSmtp
let owner: pg.Pool
const running: { runner: Runner, pool: pg.Pool }[] = []

beforeAll(async () => {
  department = await createTestDepartment()
  owner = openWorkerPool(department.database.workerUrl, () => undefined)
})
afterAll(async () => {
  await owner.end()
  await department.close()
})
beforeEach(async () => {
  smtp = await startScriptedSmtp()
  await owner.query('delete from graphile_worker._private_jobs')
})
afterEach(async () => {
  await stopWorkers()
  await smtp.close()
})

async function startOne(): Promise<void> {
  const pool = openWorkerPool(department.database.workerUrl, () => undefined)
  const mailer = createMailer({ host: '127.0.0.1', port: smtp.port, user: '', password: '', tls: 'off', from: 'imaging@northshore.example' })
  const runner = await startWorker({ pool, tools: { db: department.db, ehr: null, mail: { mailer, origin: 'https://imaging.example.org' } } })
  running.push({ runner, pool })
}

async function stopWorkers(): Promise<void> {
  for (const { runner, pool } of running.splice(0)) {
    await runner.stop()
    await pool.end()
  }
}

async function until(what: () => Promise<boolean>, withinMs = 15_000): Promise<void> {
  const deadline = Date.now() + withinMs
  while (!await what()) {
    if (Date.now() > deadline) throw new Error('It did not come about in time.')
    await new Promise(resolve => setTimeout(resolve, 50))
  }
}

const stateOf = async (letterId: string) => (await letterById(department, letterId)).state
/** Jobs of the kinds that a test speaks of; others, such as word on a decision, wait beside them. */
const jobs = async (task = 'deliver-letter') => (await owner.query<{ task: string, attempts: number, error: string | null, key: string | null }>(
  'select task_identifier as task, attempts, last_error as error, key from graphile_worker.jobs where task_identifier = $1 order by id', [task])).rows
/** Makes what waits due at once. */
const hurry = () => owner.query('update graphile_worker._private_jobs set run_at = now() where locked_at is null')
/** Until the workers have looked at everything that is due: what was added last is done. */
async function idle(): Promise<void> {
  await owner.query('select graphile_worker.add_job(\'tend-queue\')')
  await until(async () => (await jobs('tend-queue')).length === 0)
}
const address = () => `${randomUUID()}@example.org`

describe('the queue', () => {
  it('sends what a decision queued, and closes the request after the last letter', async () => {
    await startOne()
    const exam = await doneExam(department, { email: address() })
    await until(async () => (await department.db.select().from(requests).where(eq(requests.id, exam.id)))[0]?.state === 'closed')
    expect(smtp.taken.filter(mail => mail.to === exam.letter.toAddress).length).toBeGreaterThanOrEqual(1)
  })

  it('knows nothing of a letter whose change was rolled back', async () => {
    const exam = await bookedExam(department, { email: address() })
    await owner.query('delete from graphile_worker._private_jobs')
    await expect(inTransaction(systemContext(department), async (tx) => {
      await tx.execute(sql`select wherefore_queue.enqueue('deliver-letter', ${JSON.stringify({ letterId: exam.letter.id })}::json, now(), null)`)
      throw new Error('the change failed')
    })).rejects.toThrow('the change failed')
    expect(await jobs()).toEqual([])
    await startOne()
    await idle()
    expect(await stateOf(exam.letter.id)).toBe('queued')
    expect(smtp.taken).toEqual([])
  })

  it('keeps what is queued while no worker runs', async () => {
    await startOne()
    await stopWorkers()
    const exams = [await bookedExam(department, { email: address() }), await bookedExam(department, { email: address() })]
    expect(await stateOf(exams[0]?.letter.id ?? '')).toBe('queued')
    await startOne()
    await until(async () => smtp.taken.length === 2)
    expect(smtp.taken.map(mail => mail.to).sort()).toEqual(exams.map(exam => exam.letter.toAddress).sort())
  })

  it('sends each letter once with two workers', async () => {
    await Promise.all([startOne(), startOne()])
    const exams = await Promise.all(Array.from({ length: 6 }, () => bookedExam(department, { email: address() })))
    await until(async () => (await Promise.all(exams.map(exam => stateOf(exam.letter.id)))).every(state => state === 'delivered'))
    expect(smtp.taken).toHaveLength(6)
    expect(new Set(smtp.taken.map(mail => mail.to)).size).toBe(6)
  })

  it('tries again after trouble, and counts', async () => {
    smtp.follow({ recipient: to => `451 4.3.0 later ${to}` })
    const exam = await bookedExam(department, { email: address() })
    await startOne()
    await until(async () => (await jobs())[0]?.error != null)
    expect(await letterById(department, exam.letter.id)).toMatchObject({ state: 'queued', attempts: 1 })
    expect((await jobs())[0]).toMatchObject({ attempts: 1, error: expect.not.stringContaining('@example.org') })
    smtp.follow({})
    await hurry()
    await until(async () => await stateOf(exam.letter.id) === 'delivered')
    expect(await letterById(department, exam.letter.id)).toMatchObject({ attempts: 2, lastError: null })
    await until(async () => (await jobs()).length === 0)
  })

  it('fails a letter with the last of its tries', async () => {
    smtp.follow({ recipient: () => '451 later' })
    const exam = await bookedExam(department, { email: address() })
    await owner.query('update graphile_worker._private_jobs set attempts = max_attempts - 1')
    await startOne()
    await until(async () => await stateOf(exam.letter.id) === 'failed')
    await until(async () => (await jobs()).length === 0)
  })

  it('stops in seconds while a mail server is silent, and sends later', async () => {
    smtp.follow({ greeting: 'silence' })
    const exam = await bookedExam(department, { email: address() })
    await startOne()
    await until(async () => smtp.connections() > 0)
    const began = Date.now()
    await stopWorkers()
    expect(Date.now() - began).toBeLessThan(9_000)
    expect(await stateOf(exam.letter.id)).toBe('queued')
    smtp.follow({})
    await hurry()
    await startOne()
    await until(async () => await stateOf(exam.letter.id) === 'delivered')
  })
})

describe('tending the queue', () => {
  const tend = () => owner.query('select graphile_worker.add_job(\'tend-queue\')')

  it('gives the job of a worker that was cut off to another', async () => {
    const exam = await bookedExam(department, { email: address() })
    await owner.query('update graphile_worker._private_jobs set locked_by = \'gone\', locked_at = now() - interval \'4 minutes\', attempts = 1')
    await startOne()
    await tend()
    await until(async () => await stateOf(exam.letter.id) === 'delivered')
  })

  it('leaves a job alone that somebody has just taken', async () => {
    const exam = await bookedExam(department, { email: address() })
    await owner.query('update graphile_worker._private_jobs set locked_by = \'busy\', locked_at = now(), attempts = 1')
    await startOne()
    await idle()
    expect(await stateOf(exam.letter.id)).toBe('queued')
  })

  it('lets no letter stay queued whose tries are used up', async () => {
    const exam = await bookedExam(department, { email: address() })
    await owner.query('update graphile_worker._private_jobs set attempts = max_attempts')
    await startOne()
    await tend()
    await until(async () => await stateOf(exam.letter.id) === 'failed')
    await until(async () => (await jobs()).length === 0)
  })
})

describe('an invitation', () => {
  async function invite(): Promise<{ id: string, email: string }> {
    const email = address()
    const [user] = await department.db.insert(users).values({ name: 'Robin Okafor', email, role: 'scheduler' }).returning()
    if (!user) throw new Error('no user')
    await inTransaction(department.as(department.people.administrator), tx => issueInvitation(tx, { ...department.as(department.people.administrator), db: tx }, { userId: user.id, first: true }))
    return { id: user.id, email }
  }

  it('arrives with a link that opens it, of which the database keeps a hash', async () => {
    await startOne()
    const { id, email } = await invite()
    await until(async () => smtp.taken.length === 1)
    const [mail] = smtp.taken
    expect(mail?.to).toBe(email)
    expect(mail?.source).toContain('3 days')
    const token = tokenIn((mail?.source ?? '').replace(/=\n/g, ''))
    expect(await readInvitation({ ctx: systemContext(department), input: { token } })).toMatchObject({ name: 'Robin Okafor', email, again: false })
    const [row] = await department.db.select().from(invitations).where(eq(invitations.userId, id))
    expect(row?.tokenHash).toMatch(/^[0-9a-f]{64}$/)
    expect(JSON.stringify(row)).not.toContain(token)
  })

  it('that ran out is not sent', async () => {
    const { id } = await invite()
    await department.db.update(invitations).set({ expiresAt: sql`now() - interval '1 minute'` }).where(eq(invitations.userId, id))
    await startOne()
    await until(async () => (await jobs('deliver-invitation')).length === 0)
    expect(smtp.taken).toEqual([])
  })
})

describe('word to the clinician', () => {
  async function sent() {
    const id = await department.makeDraft({ form: { typedReadings: [typedCreatinine(0.94, 19)] } })
    return await sendRequest({ ctx: department.as(department.people.orderer), input: { id, version: 1 } })
  }
  const emailOf = async (userId: string) => (await department.db.select().from(users).where(eq(users.id, userId)))[0]?.email

  it('names the request and its link, and neither patient nor exam', async () => {
    const request = await sent()
    await startOne()
    await queryRequest({ ctx: department.as(department.people.radiologist), input: { id: request.id, version: request.version, body: 'Was there fever?' } })
    await until(async () => smtp.taken.length === 1)
    const [mail] = smtp.taken
    expect(mail?.to).toBe(await emailOf(department.people.orderer.userId))
    const source = (mail?.source ?? '').replace(/=\n/g, '')
    expect(source).toContain(`https://imaging.example.org/requests/${request.reference}`)
    expect(source).not.toMatch(/Lindqvist|Marta|brain|seizure|fever|contrast/i)
  })

  it('of a decision waits out the minute for taking it back, and is not sent once it was', async () => {
    const request = await sent()
    await approveRequest({
      ctx: department.as(department.people.radiologist),
      input: {
        id: request.id, version: request.version, contrast: 'iv-with-and-without', agent: 'gadobutrol', doseMmolPerKg: 0.1, weightKg: 74, volumeMl: null, note: '',
        differsReason: null, wordGiven: false, waivedNeeds: [],
      },
    })
    await startOne()
    await idle()
    expect(smtp.taken).toEqual([])
    await department.db.update(requests).set({ state: 'sent', currentDecisionId: null }).where(eq(requests.id, request.id))
    await hurry()
    await until(async () => (await jobs('notify-clinician')).length === 0)
    expect(smtp.taken).toEqual([])
  })

  it('goes to who prepared the request where the signer\'s account is closed', async () => {
    const id = await department.makeDraft({ preparedBy: department.people.preparer, form: { typedReadings: [typedCreatinine(0.94, 19)] } })
    const request = await sendRequest({ ctx: department.as(department.people.colleague), input: { id, version: 1 } })
    await department.db.update(users).set({ disabledAt: new Date() }).where(eq(users.id, department.people.colleague.userId))
    await startOne()
    await queryRequest({ ctx: department.as(department.people.radiologist), input: { id: request.id, version: request.version, body: 'Was there fever?' } })
    await until(async () => smtp.taken.length === 1)
    expect(smtp.taken[0]?.to).toBe(await emailOf(department.people.preparer.userId))
  })

  it('refused for good is let go', async () => {
    smtp.follow({ recipient: () => '550 no such user' })
    const request = await sent()
    await startOne()
    await queryRequest({ ctx: department.as(department.people.radiologist), input: { id: request.id, version: request.version, body: 'Was there fever?' } })
    await until(async () => smtp.connections() > 0)
    await until(async () => (await jobs('notify-clinician')).length === 0)
  })
})

describe('what the queue stores', () => {
  it('is ids alone', async () => {
    await bookedExam(department, { email: address(), displayName: 'Quentin Oyelaran' })
    const { rows } = await owner.query<{ payload: unknown }>('select payload from graphile_worker._private_jobs')
    for (const { payload } of rows) expect(Object.values(payload ?? {}).join(' ')).toMatch(/^[0-9a-f-]{36}( decision)?$/)
    await department.db.update(letters).set({ state: 'cancelled' }).where(eq(letters.state, 'queued'))
    expect(await department.db.select().from(letterLinks)).toEqual(expect.not.arrayContaining([expect.objectContaining({ tokenHash: expect.stringContaining('-') })]))
  })
})
