import { eq } from 'drizzle-orm'
import { letters } from '#server/database/schema/requests'
import type { ServiceContext } from '#server/services/context'
import type { LetterRecord } from '#server/services/letter/hold-letter'
import { approveRequest } from '#server/services/request/approve'
import { bookExam } from '#server/services/request/book'
import { recordGiven } from '#server/services/request/record-given'
import { sendRequest } from '#server/services/request/send'
import type { WriteResult } from '#shared/types/views'
import { typedCreatinine } from './department'
import type { TestDepartment } from './department'

let slots = 0
/** A time of its own for each exam, so that they never meet on the scanner. */
const nextSlot = () => new Date(Date.now() + 26 * 3_600_000 + (slots += 1) * 3_600_000).toISOString()

export interface ExamPatient { email?: string | null, detailsByEmail?: boolean | null, birthDate?: string, displayName?: string }

/** A signed, unbooked request for contrast for a patient of its own. */
export async function approvedExam(department: TestDepartment, patient: ExamPatient = {}): Promise<WriteResult & { patientId: string }> {
  const asked = patient.detailsByEmail ?? null
  const patientId = await department.makePatient({ ...patient, ...(asked === null ? {} : { consentAskedAt: new Date(), consentAskedById: department.people.scheduler.userId }) })
  const id = await department.makeDraft({ patientId, form: { typedReadings: [typedCreatinine(0.94, 19)] } })
  const sent = await sendRequest({ ctx: department.as(department.people.orderer), input: { id, version: 1 } })
  const approved = await approveRequest({
    ctx: department.as(department.people.radiologist),
    input: {
      id, version: sent.version, contrast: 'iv-with-and-without', agent: 'gadobutrol', doseMmolPerKg: 0.1, weightKg: 74, volumeMl: null, note: '', differsReason: null,
      wordGiven: false, waivedNeeds: [],
    },
  })
  return { ...approved, patientId }
}

/** A booked exam, whose first letter is queued. */
export async function bookedExam(department: TestDepartment, patient: ExamPatient = {}): Promise<WriteResult & { patientId: string, letter: LetterRecord }> {
  const { patientId, ...approved } = await approvedExam(department, patient)
  const booked = await bookExam({
    ctx: department.as(department.people.scheduler),
    input: { id: approved.id, version: approved.version, scannerId: department.scanner, startsAt: nextSlot(), minutes: 40 },
  })
  return { ...booked, patientId, letter: await newestLetter(department, booked.id) }
}

/** An exam that was done with contrast as planned, whose second letter is queued. */
export async function doneExam(department: TestDepartment, patient: ExamPatient = {}): Promise<WriteResult & { patientId: string, letter: LetterRecord }> {
  const booked = await bookedExam(department, patient)
  const done = await recordGiven({
    ctx: department.as(department.people.scheduler),
    input: {
      id: booked.id, version: booked.version, contrast: 'iv-with-and-without', agent: 'gadobutrol', volumeMl: 7.4, lot: '', givenAt: new Date().toISOString(), differsCause: null, differsReason: '',
      reaction: 'none', reactionDetail: '', extravasation: false,
    },
  })
  return { ...done, patientId: booked.patientId, letter: await newestLetter(department, booked.id) }
}

export async function newestLetter(department: TestDepartment, requestId: string): Promise<LetterRecord> {
  const rows = await department.db.select().from(letters).where(eq(letters.requestId, requestId))
  const newest = rows.sort((a, b) => b.queuedAt.getTime() - a.queuedAt.getTime())[0]
  if (!newest) throw new Error('no letter')
  return newest
}

export async function letterById(department: TestDepartment, id: string): Promise<LetterRecord> {
  const [row] = await department.db.select().from(letters).where(eq(letters.id, id))
  if (!row) throw new Error('no letter')
  return row
}

/** The system on its own behalf, as jobs call services. */
export function systemContext(department: TestDepartment, now = new Date()): ServiceContext {
  return { db: department.db, ehr: null, actor: { kind: 'system', name: 'Wherefore' }, requestId: 'test', now, idempotency: null, permitted: new Set() }
}

/** The token in the link of a sent message. */
export function tokenIn(text: string): string {
  const token = /\/(?:explanation|invitation)\/([\w-]{22,})/.exec(text)?.[1]
  if (!token) throw new Error('no link in the message')
  return token
}
