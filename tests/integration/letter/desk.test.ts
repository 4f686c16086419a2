import { randomUUID } from 'node:crypto'
import { and, eq } from 'drizzle-orm'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { letters, patients, requests } from '#server/database/schema/requests'
import { auditEvents } from '#server/database/schema/trail'
import { Forbidden, NotFound, StateConflict } from '#server/services/errors'
import { handOverLetter } from '#server/services/letter/hand-over-letter'
import { listFailedLetters } from '#server/services/letter/list-failed'
import { previewLetter } from '#server/services/letter/preview-letter'
import { retryLetter } from '#server/services/letter/retry-letter'
import { createTestDepartment } from '../../support/department'
import type { TestDepartment } from '../../support/department'
import { approvedExam, bookedExam, doneExam, letterById } from '../../support/exam'

let department: TestDepartment

beforeAll(async () => {
  department = await createTestDepartment()
})
afterAll(async () => {
  await department.close()
})

const scheduler = () => department.as(department.people.scheduler)
const fail = (id: string) => department.db.update(letters).set({ state: 'failed', attempts: 3, lastError: 'The mail server refused the address (550).' }).where(eq(letters.id, id))

async function stateOf(requestId: string): Promise<string | undefined> {
  const [row] = await department.db.select().from(requests).where(eq(requests.id, requestId))
  return row?.state
}

describe('the letter shown before it goes', () => {
  it('is word for word what was queued', async () => {
    const exam = await bookedExam(department, { email: 'reader@example.org', detailsByEmail: true })
    expect(await previewLetter({ ctx: scheduler(), input: { id: exam.id } })).toEqual({ letter: exam.letter.content, detailed: true, toAddress: 'reader@example.org', kind: 'before' })
    const [event] = await department.db.select().from(auditEvents).where(and(eq(auditEvents.objectId, exam.id), eq(auditEvents.action, 'letter.read')))
    expect(event?.actorName).toBe('Sam Scheduler')
  })

  it('cannot name a time that was not set yet', async () => {
    const exam = await approvedExam(department)
    const error = await previewLetter({ ctx: scheduler(), input: { id: exam.id, kind: 'before' } }).catch((caught: unknown) => caught)
    expect(error).toBeInstanceOf(StateConflict)
    expect(error instanceof Error && error.message).toContain('Book the exam')
  })

  it('says after the exam what was used, and not before', async () => {
    const booked = await bookedExam(department)
    await expect(previewLetter({ ctx: scheduler(), input: { id: booked.id, kind: 'after' } })).rejects.toBeInstanceOf(StateConflict)
    const done = await doneExam(department)
    expect(await previewLetter({ ctx: scheduler(), input: { id: done.id } })).toMatchObject({ kind: 'after', letter: { title: expect.stringContaining('Contrast was used') } })
  })

  it('is not shown to another practice', async () => {
    const exam = await bookedExam(department)
    await expect(previewLetter({ ctx: department.as(department.people.stranger), input: { id: exam.id } })).rejects.toBeInstanceOf(NotFound)
  })
})

describe('handing over on paper', () => {
  it('closes the request with the second letter, as its delivery would', async () => {
    const exam = await doneExam(department, { email: null })
    expect(exam.letter.state).toBe('no-address')
    const result = await handOverLetter({ ctx: scheduler(), input: { id: exam.id } })
    expect(result.state).toBe('closed')
    expect(await stateOf(exam.id)).toBe('closed')
    expect((await letterById(department, exam.letter.id)).state).toBe('handed-over')
  })

  it('of the first letter leaves the exam booked', async () => {
    const exam = await bookedExam(department, { email: null })
    expect((await handOverLetter({ ctx: scheduler(), input: { id: exam.id } })).state).toBe('booked')
  })

  it('counts once, however often it is sent', async () => {
    const exam = await doneExam(department, { email: null })
    const key = randomUUID()
    const results = await Promise.all(Array.from({ length: 5 }, () => handOverLetter({ ctx: department.as(department.people.scheduler, { key }), input: { id: exam.id } })))
    for (const result of results) expect(result).toEqual(results[0])
    await expect(handOverLetter({ ctx: scheduler(), input: { id: exam.id } })).rejects.toBeInstanceOf(StateConflict)
  })

  it('waits while the letter is on its way', async () => {
    const exam = await bookedExam(department, { email: 'reader@example.org' })
    await expect(handOverLetter({ ctx: scheduler(), input: { id: exam.id } })).rejects.toThrow('still on its way')
  })

  it('is for the booking desk alone', async () => {
    const exam = await bookedExam(department, { email: null })
    await expect(handOverLetter({ ctx: department.as(department.people.orderer), input: { id: exam.id } })).rejects.toBeInstanceOf(Forbidden)
  })
})

describe('letters that failed', () => {
  it('stand on a list with why, and tell an administrator no patient', async () => {
    const exam = await bookedExam(department, { email: 'quentin.oyelaran@refused.example', displayName: 'Quentin Oyelaran' })
    await fail(exam.letter.id)
    const find = (rows: Awaited<ReturnType<typeof listFailedLetters>>['rows']) => rows.find(row => row.id === exam.letter.id)
    const desk = find((await listFailedLetters({ ctx: scheduler() })).rows)
    expect(desk).toMatchObject({
      requestId: exam.id, requestReference: exam.reference, patient: 'Quentin Oyelaran', toAddress: 'quentin.oyelaran@refused.example', attempts: 3,
      lastError: 'The mail server refused the address (550).',
    })
    const office = find((await listFailedLetters({ ctx: department.as(department.people.administrator) })).rows)
    expect(office).toMatchObject({ patient: null, toAddress: '…@refused.example' })
    expect(JSON.stringify(office)).not.toMatch(/quentin/i)
  })

  it('go again to the address that is right now', async () => {
    const exam = await bookedExam(department, { email: 'typo@exmaple.org' })
    await fail(exam.letter.id)
    await department.db.update(patients).set({ email: 'right@example.org' }).where(eq(patients.id, exam.patientId))
    expect(await retryLetter({ ctx: scheduler(), input: { letterId: exam.letter.id } })).toEqual({ id: exam.letter.id, state: 'queued' })
    expect(await letterById(department, exam.letter.id)).toMatchObject({ state: 'queued', toAddress: 'right@example.org', lastError: null })
  })

  it('are the only ones that go again', async () => {
    const exam = await bookedExam(department, { email: 'reader@example.org' })
    await expect(retryLetter({ ctx: scheduler(), input: { letterId: exam.letter.id } })).rejects.toBeInstanceOf(StateConflict)
    await expect(retryLetter({ ctx: scheduler(), input: { letterId: randomUUID() } })).rejects.toBeInstanceOf(NotFound)
  })

  it('need an address to go to', async () => {
    const exam = await bookedExam(department, { email: 'reader@example.org' })
    await fail(exam.letter.id)
    await department.db.update(patients).set({ email: null }).where(eq(patients.id, exam.patientId))
    await expect(retryLetter({ ctx: scheduler(), input: { letterId: exam.letter.id } })).rejects.toThrow('on paper')
  })
})
