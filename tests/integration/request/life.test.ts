import { randomUUID } from 'node:crypto'
import { and, desc, eq, sql } from 'drizzle-orm'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { administrations, assessments, decisions, letters, requests } from '#server/database/schema/requests'
import { auditEvents } from '#server/database/schema/trail'
import { Forbidden, Invalid, NotFound, Stale, StateConflict } from '#server/services/errors'
import { approveRequest } from '#server/services/request/approve'
import { bookExam } from '#server/services/request/book'
import { declineRequest } from '#server/services/request/decline'
import { markNeed } from '#server/services/request/mark-need'
import { postMessage } from '#server/services/request/post-message'
import { listPreparation } from '#server/services/request/preparation-list'
import { queryRequest } from '#server/services/request/query'
import { recordGiven } from '#server/services/request/record-given'
import { releaseSlot } from '#server/services/request/release-slot'
import { reopenRequest } from '#server/services/request/reopen'
import { listReview } from '#server/services/request/review-list'
import { saveForm } from '#server/services/request/save-form'
import { sendRequest } from '#server/services/request/send'
import { undoDecision } from '#server/services/request/undo'
import { viewRequest } from '#server/services/request/view'
import { withdrawRequest } from '#server/services/request/withdraw'
import { createTestDepartment, readyForm, typedCreatinine } from '../../support/department'
import type { TestDepartment } from '../../support/department'

let department: TestDepartment

beforeAll(async () => {
  department = await createTestDepartment()
})
afterAll(async () => {
  await department.close()
})

const approval = {
  contrast: 'iv-with-and-without', agent: 'gadobutrol', doseMmolPerKg: 0.1, weightKg: 74, volumeMl: null, note: '', differsReason: null, wordGiven: false, waivedNeeds: [],
} as const satisfies Omit<Parameters<typeof approveRequest>[0]['input'], 'id' | 'version'>

const tomorrow = () => new Date(Date.now() + 26 * 3_600_000).toISOString()

async function sent(form: Partial<typeof readyForm> = {}): Promise<{ id: string, version: number }> {
  const id = await department.makeDraft({ form: { typedReadings: [typedCreatinine(0.94, 19)], ...form } })
  return await sendRequest({ ctx: department.as(department.people.orderer), input: { id, version: 1 } })
}

async function approved(form: Partial<typeof readyForm> = {}) {
  const request = await sent(form)
  return await approveRequest({ ctx: department.as(department.people.radiologist), input: { ...request, ...approval } })
}

async function booked(startsAt = tomorrow()) {
  const request = await approved()
  return await bookExam({ ctx: department.as(department.people.scheduler), input: { id: request.id, version: request.version, scannerId: department.scanner, startsAt, minutes: 40 } })
}

async function release(request: { id: string, version: number }) {
  return await releaseSlot({ ctx: department.as(department.people.scheduler), input: { ...request, cause: 'moved-by-us', note: '' } })
}

describe('sending', () => {
  it('numbers the request, freezes its assessment and names who signed it', async () => {
    const result = await sent()
    expect(result).toMatchObject({ state: 'sent', version: 2 })
    expect(result).toHaveProperty('reference', expect.stringMatching(/^WF-\d{2}-\d{6}$/))
    const [row] = await department.db.select().from(requests).where(eq(requests.id, result.id))
    expect(row).toMatchObject({ signedById: department.people.orderer.userId, outcome: 'iv-with-and-without', priorityRank: 2, kidneyLine: 'eGFR 69' })
    expect(row?.sentence).toMatch(/^MRI brain, .* without and with contrast, because /)
    const [stored] = await department.db.select().from(assessments).where(eq(assessments.requestId, result.id))
    expect(stored?.inputs.readings).toHaveLength(1)
  })

  it('names every missing answer by its path and changes nothing', async () => {
    const id = await department.makeDraft({ form: { history: '  ', screening: { ...readyForm.screening, earlierReaction: null }, screeningConfirmed: false } })
    const error = await sendRequest({ ctx: department.as(department.people.orderer), input: { id, version: 1 } }).catch((caught: unknown) => caught)
    expect(error).toBeInstanceOf(Invalid)
    expect(error instanceof Invalid && error.problems.map(problem => problem.path)).toEqual(['history', 'screening.earlierReaction', 'screeningConfirmed'])
    const [row] = await department.db.select().from(requests).where(eq(requests.id, id))
    expect(row).toMatchObject({ state: 'draft', version: 1, reference: null })
  })

  it('is refused to staff without the right to sign', async () => {
    const id = await department.makeDraft({ preparedBy: department.people.preparer })
    await expect(sendRequest({ ctx: department.as(department.people.preparer), input: { id, version: 1 } })).rejects.toBeInstanceOf(Forbidden)
  })

  it('does not show another practice that the draft exists', async () => {
    const id = await department.makeDraft()
    await expect(sendRequest({ ctx: department.as(department.people.stranger), input: { id, version: 1 } })).rejects.toBeInstanceOf(NotFound)
  })

  it('makes one request of twenty identical sends', async () => {
    const id = await department.makeDraft()
    const key = randomUUID()
    const results = await Promise.all(Array.from({ length: 20 }, () =>
      sendRequest({ ctx: department.as(department.people.orderer, { key }), input: { id, version: 1 } })))
    expect(new Set(results.map(result => result.reference)).size).toBe(1)
    const events = await department.db.select().from(auditEvents).where(and(eq(auditEvents.objectId, id), eq(auditEvents.action, 'request.send')))
    expect(events).toHaveLength(1)
  })

  it('refuses a key that was used for another body', async () => {
    const [first, second] = [await department.makeDraft(), await department.makeDraft()]
    const key = randomUUID()
    await sendRequest({ ctx: department.as(department.people.orderer, { key }), input: { id: first, version: 1 } })
    const ctx = department.as(department.people.orderer, { key })
    ctx.idempotency = ctx.idempotency && { ...ctx.idempotency, fingerprint: 'another' }
    await expect(sendRequest({ ctx, input: { id: second, version: 1 } })).rejects.toBeInstanceOf(Invalid)
  })
})

describe('a draft', () => {
  it('saved from two tabs tells the second instead of overwriting', async () => {
    const id = await department.makeDraft()
    const first = await saveForm({ ctx: department.as(department.people.orderer), input: { id, version: 1, form: { ...readyForm, history: 'First tab' } } })
    expect(first.version).toBe(2)
    const error = await saveForm({ ctx: department.as(department.people.colleague), input: { id, version: 1, form: { ...readyForm, history: 'Second tab' } } }).catch((caught: unknown) => caught)
    expect(error).toBeInstanceOf(Stale)
    expect(error instanceof Stale && error.extra).toMatchObject({ version: 2, changedBy: 'Dr Orderer' })
    const [row] = await department.db.select().from(requests).where(eq(requests.id, id))
    expect(row?.form.history).toBe('First tab')
  })
})

describe('deciding', () => {
  it('signs the decision with dose and volume worked out from the weight', async () => {
    const result = await approved()
    expect(result.state).toBe('approved')
    const view = await viewRequest({ ctx: department.as(department.people.radiologist), input: { id: result.id } })
    expect(view.decision).toMatchObject({ contrast: 'iv-with-and-without', agent: 'gadobutrol', signedBy: 'Dr Radiologist' })
    expect(view.decision?.amountMmol).toBeCloseTo(7.4)
    expect(view.decision?.volumeMl).toBeCloseTo(7.4)
    expect(view.may).toContain('request.undo')
  })

  it('asks for a reason where it differs from the suggestion', async () => {
    const request = await sent()
    const other = { ...approval, contrast: 'none', agent: null, doseMmolPerKg: null } as const
    const ctx = () => department.as(department.people.radiologist)
    const error = await approveRequest({ ctx: ctx(), input: { ...request, ...other } }).catch((caught: unknown) => caught)
    expect(error instanceof Invalid && error.problems).toEqual([expect.objectContaining({ path: 'differsReason' })])
    await expect(approveRequest({ ctx: ctx(), input: { ...request, ...other, differsReason: 'Seen on an outside scan last week.' } })).resolves.toMatchObject({ state: 'approved' })
  })

  it('waits for a radiologist\'s word below an eGFR of 30', async () => {
    const request = await sent({ typedReadings: [typedCreatinine(2.6, 2)] })
    const ctx = () => department.as(department.people.radiologist)
    await expect(approveRequest({ ctx: ctx(), input: { ...request, ...approval } })).rejects.toBeInstanceOf(Invalid)
    const view = await viewRequest({ ctx: ctx(), input: { id: request.id } })
    expect(view.assessment?.asksRadiologist).toBe(true)
    await expect(approveRequest({ ctx: ctx(), input: { ...request, ...approval, wordGiven: true, differsReason: 'The information is essential; a group II agent at the labelled dose.' } })).resolves.toMatchObject({ state: 'approved' })
  })

  it('lets exactly one of two radiologists decide and tells the other who did', async () => {
    const request = await sent()
    const results = await Promise.allSettled([
      approveRequest({ ctx: department.as(department.people.radiologist), input: { ...request, ...approval } }),
      declineRequest({ ctx: department.as(department.people.secondRadiologist), input: { ...request, reason: 'Done last week.', helpInstead: '' } }),
    ])
    expect(results.filter(result => result.status === 'fulfilled')).toHaveLength(1)
    const loser = results.find(result => result.status === 'rejected')
    expect(loser?.status === 'rejected' && loser.reason).toBeInstanceOf(Stale)
    expect(loser?.status === 'rejected' && loser.reason.detail).toMatch(/^Dr (?:Radiologist|Second) changed it/)
    expect(await department.db.select().from(decisions).where(eq(decisions.requestId, request.id))).toHaveLength(1)
  })

  it('is not for whoever asked for the exam', async () => {
    const request = await sent()
    const self = { ...department.people.radiologist, userId: department.people.orderer.userId }
    await expect(approveRequest({ ctx: department.as(self), input: { ...request, ...approval } })).rejects.toBeInstanceOf(Forbidden)
  })

  it('may be taken back for a minute, by the same radiologist only', async () => {
    const request = await approved()
    await expect(undoDecision({ ctx: department.as(department.people.secondRadiologist), input: request })).rejects.toBeInstanceOf(StateConflict)
    const late = new Date(Date.now() + 61_000)
    await expect(undoDecision({ ctx: department.as(department.people.radiologist, { now: late }), input: request })).rejects.toBeInstanceOf(StateConflict)
    await expect(undoDecision({ ctx: department.as(department.people.radiologist), input: request })).resolves.toMatchObject({ state: 'sent' })
  })

  it('opened again shows as reopened in the queue', async () => {
    const request = await approved()
    await reopenRequest({ ctx: department.as(department.people.radiologist), input: { ...request, reason: 'A new creatinine was phoned through.' } })
    const queue = await listReview({ ctx: department.as(department.people.radiologist), input: { filter: 'reopened', limit: 50 } })
    expect(queue.rows.map(row => row.id)).toContain(request.id)
  })
})

describe('the thread', () => {
  it('gives a queried request back to the queue once the ordering side answers', async () => {
    const request = await sent()
    const queried = await queryRequest({ ctx: department.as(department.people.radiologist), input: { ...request, body: 'Any earlier MRI?' } })
    expect(queried.state).toBe('queried')
    await expect(approveRequest({ ctx: department.as(department.people.radiologist), input: { id: request.id, version: queried.version, ...approval } })).rejects.toBeInstanceOf(StateConflict)
    const answered = await postMessage({ ctx: department.as(department.people.colleague), input: { id: request.id, kind: 'answer', body: 'None, CT only.', internal: false } })
    expect(answered.state).toBe('sent')
    const queue = await listReview({ ctx: department.as(department.people.radiologist), input: { filter: 'reply', limit: 50 } })
    expect(queue.rows.find(row => row.id === request.id)).toMatchObject({ replyWaiting: true, nextStep: 'A radiologist reads the answer' })
    const view = await viewRequest({ ctx: department.as(department.people.orderer), input: { id: request.id } })
    expect(view.messages.map(message => [message.author, message.kind])).toEqual([['Dr Radiologist', 'query'], ['Dr Colleague', 'answer']])
  })

  it('hides internal notes from the ordering side', async () => {
    const request = await sent()
    await postMessage({ ctx: department.as(department.people.radiologist), input: { id: request.id, kind: 'note', body: 'Check with the pediatric team.', internal: true } })
    const view = await viewRequest({ ctx: department.as(department.people.orderer), input: { id: request.id } })
    expect(view.messages).toEqual([])
  })

  it('says that imaging owes an answer after a question', async () => {
    const request = await sent()
    await postMessage({ ctx: department.as(department.people.orderer), input: { id: request.id, kind: 'question', body: 'Could this be done sooner?', internal: false } })
    const view = await viewRequest({ ctx: department.as(department.people.scheduler), input: { id: request.id } })
    expect(view.awaiting).toBe('imaging')
  })
})

describe('preparation', () => {
  it('lists an approved exam under what it still needs, until it is marked', async () => {
    const request = await approved()
    const ctx = () => department.as(department.people.scheduler)
    const before = await listPreparation({ ctx: ctx(), input: { tab: 'iv-start', limit: 50 } })
    expect(before.rows.find(row => row.id === request.id)?.needs.map(need => need.kind)).toContain('iv-start')
    await markNeed({ ctx: ctx(), input: { id: request.id, kind: 'iv-start', state: 'met', note: '' } })
    const after = await listPreparation({ ctx: ctx(), input: { tab: 'iv-start', limit: 50 } })
    expect(after.rows.map(row => row.id)).not.toContain(request.id)
  })

  it('books a slot and queues the patient\'s letter in the same step', async () => {
    const request = await booked()
    expect(request.state).toBe('booked')
    const [letter] = await department.db.select().from(letters).where(eq(letters.requestId, request.id))
    expect(letter).toMatchObject({ kind: 'before', state: 'queued', toAddress: 'marta@example.org', detailed: false })
    expect(letter?.content.title).toContain('contrast')
    await release(request)
  })

  it('never gives one scanner\'s time to two exams', async () => {
    const [first, second] = [await approved(), await approved()]
    const startsAt = new Date(Date.now() + 90 * 3_600_000).toISOString()
    const book = (request: { id: string, version: number }) =>
      bookExam({ ctx: department.as(department.people.scheduler), input: { id: request.id, version: request.version, scannerId: department.scanner, startsAt, minutes: 40 } })
    const results = await Promise.allSettled([book(first), book(second)])
    expect(results.filter(result => result.status === 'fulfilled')).toHaveLength(1)
  })

  it('refuses a time that has passed and a transition out of turn', async () => {
    const request = await sent()
    const input = { id: request.id, version: request.version, scannerId: department.scanner, minutes: 40 }
    await expect(bookExam({ ctx: department.as(department.people.scheduler), input: { ...input, startsAt: tomorrow() } })).rejects.toBeInstanceOf(StateConflict)
    await expect(bookExam({ ctx: department.as(department.people.scheduler), input: { ...input, startsAt: '2020-01-01T10:00:00Z' } })).rejects.toBeInstanceOf(Invalid)
  })

  it('records what was given, keeps corrections beside it and feeds the patient\'s next assessment', async () => {
    const request = await booked(new Date(Date.now() + 50 * 3_600_000).toISOString())
    const given = {
      contrast: 'iv-with-and-without', agent: 'gadobutrol', volumeMl: 7.4, lot: 'L1', givenAt: new Date().toISOString(), differsCause: null, differsReason: '',
      reaction: 'none', reactionDetail: '', extravasation: false,
    } as const
    const done = await recordGiven({ ctx: department.as(department.people.scheduler), input: { ...request, ...given } })
    expect(done.state).toBe('done')
    const corrected = await recordGiven({ ctx: department.as(department.people.scheduler), input: { ...done, ...given, volumeMl: 7 } })
    expect(corrected.state).toBe('done')
    const rows = await department.db.select().from(administrations).where(eq(administrations.requestId, request.id)).orderBy(administrations.recordedAt)
    expect(rows).toHaveLength(2)
    expect(rows[1]?.correctsId).toBe(rows[0]?.id)
    const [stored] = await department.db.select().from(requests).where(eq(requests.id, request.id))
    const next = await department.makeDraft({ patientId: stored?.patientId })
    const view = await viewRequest({ ctx: department.as(department.people.orderer), input: { id: next } })
    expect(view.ledger.map(dose => [dose.agent, dose.amountMmol])).toEqual([['gadobutrol', 7]])
    const [after] = await department.db.select().from(letters).where(eq(letters.requestId, request.id)).orderBy(desc(letters.queuedAt)).limit(1)
    expect(after?.kind).toBe('after')
  })

  it('asks why when something else was given than signed', async () => {
    const request = await booked(new Date(Date.now() + 60 * 3_600_000).toISOString())
    const input = {
      ...request, contrast: 'none', agent: null, volumeMl: null, lot: '', givenAt: new Date().toISOString(), differsCause: null, differsReason: '', reaction: 'none', reactionDetail: '', extravasation: false,
    } as const
    const error = await recordGiven({ ctx: department.as(department.people.scheduler), input }).catch((caught: unknown) => caught)
    expect(error instanceof Invalid && error.problems).toEqual([expect.objectContaining({ path: 'differsCause' })])
    await recordGiven({ ctx: department.as(department.people.scheduler), input: { ...input, differsCause: 'iv-failed', differsReason: 'CANARY for staff only' } })
    const [letter] = await department.db.select().from(letters).where(and(eq(letters.requestId, request.id), eq(letters.kind, 'after')))
    expect(JSON.stringify(letter?.content)).toContain('We could not place the small tube')
    expect(JSON.stringify(letter?.content)).not.toContain('CANARY')
  })
})

describe('withdrawing', () => {
  it('frees the slot and calls back a letter that has not gone out', async () => {
    const request = await booked(new Date(Date.now() + 70 * 3_600_000).toISOString())
    const result = await withdrawRequest({ ctx: department.as(department.people.orderer), input: { ...request, reason: 'Seen elsewhere.' } })
    expect(result.state).toBe('withdrawn')
    const [row] = await department.db.select().from(requests).where(eq(requests.id, request.id))
    expect(row).toMatchObject({ slotStartsAt: null, scannerId: null })
    const states = await department.db.select({ state: letters.state }).from(letters).where(eq(letters.requestId, request.id))
    expect(states).toEqual([{ state: 'cancelled' }])
  })

  it('and approving at once ends in one of the two, never both', async () => {
    const request = await sent()
    const results = await Promise.allSettled([
      withdrawRequest({ ctx: department.as(department.people.orderer), input: { ...request, reason: 'No longer needed.' } }),
      approveRequest({ ctx: department.as(department.people.radiologist), input: { ...request, ...approval } }),
    ])
    expect(results.filter(result => result.status === 'fulfilled')).toHaveLength(1)
  })
})

describe('the trail', () => {
  it('holds one event for each change and can be neither altered nor cleared by the application', async () => {
    const request = await approved()
    const events = await department.db.select({ action: auditEvents.action }).from(auditEvents).where(eq(auditEvents.objectId, request.id)).orderBy(auditEvents.id)
    expect(events.map(event => event.action)).toEqual(['request.send', 'request.record', 'request.approve'])
    await expect(department.db.execute(sql`update audit_events set actor_name = 'nobody'`)).rejects.toThrow()
    await expect(department.db.execute(sql`delete from audit_events`)).rejects.toThrow()
  })

  it('keeps free text out', async () => {
    const request = await sent({ history: 'CANARY-HISTORY' })
    await queryRequest({ ctx: department.as(department.people.radiologist), input: { ...request, body: 'CANARY-QUERY' } })
    const rows = await department.db.execute<{ text: string }>(sql`select audit_events::text as text from audit_events`)
    expect(rows.rows.map(row => row.text).join('\n')).not.toMatch(/CANARY|Lindqvist/)
  })
})
