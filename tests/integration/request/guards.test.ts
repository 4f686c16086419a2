import { randomUUID } from 'node:crypto'
import { and, eq } from 'drizzle-orm'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { letters, patients, requests } from '#server/database/schema/requests'
import { auditEvents } from '#server/database/schema/trail'
import { Forbidden, NotFound, StateConflict } from '#server/services/errors'
import { approveRequest } from '#server/services/request/approve'
import { bookExam } from '#server/services/request/book'
import { createDraft } from '#server/services/request/create-draft'
import { discardDraft } from '#server/services/request/discard'
import { listPreparation } from '#server/services/request/preparation-list'
import { postMessage } from '#server/services/request/post-message'
import { queryRequest } from '#server/services/request/query'
import { recordConsent } from '#server/services/request/record-consent'
import { recordGiven } from '#server/services/request/record-given'
import { reopenRequest } from '#server/services/request/reopen'
import { sendRequest } from '#server/services/request/send'
import { viewRequest } from '#server/services/request/view'
import { withdrawRequest } from '#server/services/request/withdraw'
import { createTestDepartment, readyForm, typedCreatinine } from '../../support/department'
import type { TestDepartment } from '../../support/department'

let department: TestDepartment
let hoursAhead = 24

beforeAll(async () => {
  department = await createTestDepartment()
})
afterAll(async () => {
  await department.close()
})

const approval = {
  contrast: 'iv-with-and-without', agent: 'gadobutrol', doseMmolPerKg: 0.1, weightKg: 74, volumeMl: null, note: '', differsReason: null, wordGiven: false, waivedNeeds: [],
} as const satisfies Omit<Parameters<typeof approveRequest>[0]['input'], 'id' | 'version'>

async function sent(form: Partial<typeof readyForm> = {}, patientId?: string) {
  const id = await department.makeDraft({ patientId, form: { typedReadings: [typedCreatinine(0.94, 19)], ...form } })
  return await sendRequest({ ctx: department.as(department.people.orderer), input: { id, version: 1 } })
}

/** Booked for 40 minutes at a time that no other test uses. */
async function booked() {
  const request = await approveRequest({ ctx: department.as(department.people.radiologist), input: { ...await sent(), ...approval } })
  hoursAhead += 2
  const startsAt = new Date(Date.now() + hoursAhead * 3_600_000).toISOString()
  return await bookExam({ ctx: department.as(department.people.scheduler), input: { ...request, scannerId: department.scanner, startsAt, minutes: 40 } })
}

describe('a write sent twice under one key', () => {
  it('is answered the same, with the permission asked as the route demands', async () => {
    const id = await department.makeDraft({ form: { typedReadings: [typedCreatinine(0.94, 19)] } })
    const key = randomUUID()
    const first = await sendRequest({ ctx: department.as(department.people.orderer, { key }), input: { id, version: 1 } })
    const again = department.as(department.people.orderer, { key })
    expect(await sendRequest({ ctx: again, input: { id, version: 1 } })).toEqual(first)
    expect([...again.permitted]).toContain('request.send')

    const withdrawal = { id, version: first.version, reason: 'Seen elsewhere.' }
    const otherKey = randomUUID()
    const withdrawn = await withdrawRequest({ ctx: department.as(department.people.orderer, { key: otherKey }), input: withdrawal })
    const repeated = department.as(department.people.orderer, { key: otherKey })
    expect(await withdrawRequest({ ctx: repeated, input: withdrawal })).toEqual(withdrawn)
    expect([...repeated.permitted]).toContain('request.withdraw')
  })

  it('is answered even where the step could not be taken again', async () => {
    const id = await department.makeDraft()
    const key = randomUUID()
    const first = await discardDraft({ ctx: department.as(department.people.orderer, { key }), input: { id, version: 1 } })
    expect(await discardDraft({ ctx: department.as(department.people.orderer, { key }), input: { id, version: 1 } })).toEqual(first)
  })

  it('is not answered to somebody who left the practice meanwhile', async () => {
    const id = await department.makeDraft()
    const key = randomUUID()
    await discardDraft({ ctx: department.as(department.people.orderer, { key }), input: { id, version: 1 } })
    const left = department.as({ ...department.people.orderer, practiceIds: [] }, { key })
    await expect(discardDraft({ ctx: left, input: { id, version: 1 } })).rejects.toBeInstanceOf(NotFound)
  })
})

describe('a corrected copy', () => {
  const copy = async (id: string, practiceId: string, actor = department.people.orderer) => {
    const [row] = await department.db.select({ ehrId: patients.ehrId }).from(requests).innerJoin(patients, eq(patients.id, requests.patientId)).where(eq(requests.id, id))
    return await createDraft({ ctx: department.as(actor), input: { ehrPatientId: row?.ehrId ?? '', practiceId, confirmed: true, copyOf: id } })
  }

  it('keeps the question but neither the confirmation nor the patient\'s wish on e-mail', async () => {
    const request = await sent({ detailsByEmail: true, patientEmail: 'old@example.org' })
    await withdrawRequest({ ctx: department.as(department.people.orderer), input: { ...request, reason: 'Wrong side.' } })
    const made = await copy(request.id, department.ownPractice)
    const [row] = await department.db.select().from(requests).where(eq(requests.id, made.id))
    expect(row?.form).toMatchObject({ questionId: readyForm.questionId, screeningConfirmed: false, detailsByEmail: null, patientEmail: null })
  })

  it('starts only from a request that came to nothing, and stays with its practice', async () => {
    const request = await sent()
    await expect(copy(request.id, department.ownPractice)).rejects.toBeInstanceOf(StateConflict)
    await withdrawRequest({ ctx: department.as(department.people.orderer), input: { ...request, reason: 'Wrong side.' } })
    const both = { ...department.people.orderer, practiceIds: [department.ownPractice, department.otherPractice] }
    await expect(copy(request.id, department.otherPractice, both)).rejects.toBeInstanceOf(Forbidden)
  })
})

describe('the patient\'s wish on e-mail', () => {
  it('given with the form is kept and traced', async () => {
    const patientId = await department.makePatient()
    const request = await sent({ detailsByEmail: true, patientEmail: 'new@example.org' }, patientId)
    const [patient] = await department.db.select().from(patients).where(eq(patients.id, patientId))
    expect(patient).toMatchObject({ detailsByEmail: true, email: 'new@example.org' })
    const events = await department.db.select().from(auditEvents).where(and(eq(auditEvents.objectId, request.id), eq(auditEvents.action, 'patient.consent')))
    expect(events.map(event => event.detail)).toEqual([{ detailsByEmail: true, address: true }])
  })

  it('taken back after the form was saved is not undone by sending it', async () => {
    const patientId = await department.makePatient()
    const id = await department.makeDraft({ patientId, form: { detailsByEmail: true, patientEmail: 'new@example.org', typedReadings: [typedCreatinine(0.94, 19)] } })
    const later = new Date(Date.now() + 1_000)
    await recordConsent({ ctx: department.as(department.people.orderer, { now: later }), input: { id, detailsByEmail: false, email: null } })
    await sendRequest({ ctx: department.as(department.people.orderer, { now: new Date(later.getTime() + 1_000) }), input: { id, version: 1 } })
    const [patient] = await department.db.select().from(patients).where(eq(patients.id, patientId))
    expect(patient).toMatchObject({ detailsByEmail: false, email: 'marta@example.org' })
  })
})

describe('the thread', () => {
  it('does not tell the ordering side that an internal note was written', async () => {
    const request = await sent()
    await postMessage({ ctx: department.as(department.people.radiologist), input: { id: request.id, kind: 'note', body: 'For us only.', internal: true } })
    const events = async (actor: TestDepartment['people']['orderer']) =>
      (await viewRequest({ ctx: department.as(actor), input: { id: request.id } })).timeline.map(entry => entry.action)
    expect(await events(department.people.radiologist)).toContain('request.note')
    expect(await events(department.people.orderer)).not.toContain('request.note')
  })

  it('begins with sending', async () => {
    const id = await department.makeDraft()
    await expect(postMessage({ ctx: department.as(department.people.orderer), input: { id, kind: 'note', body: 'Too early.', internal: false } })).rejects.toBeInstanceOf(StateConflict)
  })
})

describe('a booked exam', () => {
  it('whose decision was opened again stays on the booking desk\'s list while it waits for a new one', async () => {
    const exam = await booked()
    const reopened = await reopenRequest({ ctx: department.as(department.people.radiologist), input: { ...exam, reason: 'New creatinine.' } })
    const queried = await queryRequest({ ctx: department.as(department.people.radiologist), input: { ...reopened, body: 'Is the patient unwell?' } })
    const answered = await postMessage({ ctx: department.as(department.people.orderer), input: { id: queried.id, kind: 'answer', body: 'No.', internal: false } })
    expect(answered.state).toBe('sent')
    const held = await listPreparation({ ctx: department.as(department.people.scheduler), input: { tab: 'held', limit: 50 } })
    expect(held.rows.map(row => row.id)).toContain(exam.id)
  })

  it('has no slot any more when it is signed again after its time', async () => {
    const exam = await booked()
    const reopened = await reopenRequest({ ctx: department.as(department.people.radiologist), input: { ...exam, reason: 'New creatinine.' } })
    const afterwards = new Date(Date.now() + (hoursAhead + 1) * 3_600_000)
    const signed = await approveRequest({ ctx: department.as(department.people.radiologist, { now: afterwards }), input: { ...reopened, ...approval } })
    expect(signed.state).toBe('approved')
    const [row] = await department.db.select().from(requests).where(eq(requests.id, exam.id))
    expect(row).toMatchObject({ scannerId: null, slotStartsAt: null, slotEndsAt: null })
  })

  it('is written about again only where a correction changes what the letter says', async () => {
    const exam = await booked()
    const given = {
      contrast: 'iv-with-and-without', agent: 'gadobutrol', volumeMl: 7.4, lot: 'L1', givenAt: new Date().toISOString(), differsCause: null, differsReason: '',
      reaction: 'none', reactionDetail: '', extravasation: false,
    } as const
    const written = async () => (await department.db.select().from(letters).where(and(eq(letters.requestId, exam.id), eq(letters.kind, 'after')))).length
    const done = await recordGiven({ ctx: department.as(department.people.scheduler), input: { ...exam, ...given } })
    expect(await written()).toBe(1)
    const lot = await recordGiven({ ctx: department.as(department.people.scheduler), input: { ...done, ...given, lot: 'L2' } })
    expect(await written()).toBe(1)
    await recordGiven({ ctx: department.as(department.people.scheduler), input: { ...lot, ...given, extravasation: true } })
    expect(await written()).toBe(2)
  })
})
