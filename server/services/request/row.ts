import { eq } from 'drizzle-orm'
import { examNameFor } from '#shared/domain/contrast/exam-name'
import { ageWords } from '#shared/domain/record/age-words'
import { nextStep } from '#shared/domain/request/next-step'
import type { RequestRow, SlotView } from '#shared/types/views'
import type { Database } from '#server/database/client'
import { practices } from '#server/database/schema/people'
import { decisions, patients, requests } from '#server/database/schema/requests'
import { scanners } from '#server/database/schema/rules'
import { preparer, signer } from './load'

/** The columns of a worklist line: one query, no clinical notes. */
export function selectRows(db: Database) {
  return db.select({
    id: requests.id,
    reference: requests.reference,
    state: requests.state,
    version: requests.version,
    priority: requests.priority,
    priorityRank: requests.priorityRank,
    sentence: requests.sentence,
    outcome: requests.outcome,
    decided: decisions.contrast,
    examName: requests.examName,
    region: requests.region,
    kidneyLine: requests.kidneyLine,
    awaiting: requests.awaiting,
    replyWaiting: requests.replyWaiting,
    sentAt: requests.sentAt,
    dueAt: requests.dueAt,
    slotStartsAt: requests.slotStartsAt,
    slotEndsAt: requests.slotEndsAt,
    updatedAt: requests.updatedAt,
    displayName: patients.displayName,
    birthDate: patients.birthDate,
    sex: patients.sex,
    recordNumber: patients.recordNumber,
    practice: practices.name,
    preparedBy: preparer.name,
    signedBy: signer.name,
    scannerId: scanners.id,
    scanner: scanners.name,
    place: scanners.place,
  }).from(requests)
    .innerJoin(patients, eq(patients.id, requests.patientId))
    .innerJoin(practices, eq(practices.id, requests.practiceId))
    .innerJoin(preparer, eq(preparer.id, requests.preparedById))
    .leftJoin(signer, eq(signer.id, requests.signedById))
    .leftJoin(scanners, eq(scanners.id, requests.scannerId))
    .leftJoin(decisions, eq(decisions.id, requests.currentDecisionId))
    .$dynamic()
}

export type SelectedRow = Awaited<ReturnType<typeof selectRows>>[number]

/** `zone` is the department's. */
export function rowView(row: SelectedRow, now: Date, zone: string): RequestRow {
  return {
    id: row.id,
    reference: row.reference,
    state: row.state,
    version: row.version,
    priority: row.priority,
    sentence: row.sentence,
    outcome: row.outcome,
    decided: row.decided === 'discuss' ? null : row.decided,
    examName: row.examName === null ? null : examNameFor(row.examName, row.decided ?? row.outcome),
    region: row.region,
    patient: { displayName: row.displayName, ageWords: ageWords(row.birthDate, now.toISOString(), zone), sex: row.sex, recordNumber: row.recordNumber },
    practice: row.practice,
    kidneyLine: row.kidneyLine,
    awaiting: row.awaiting,
    replyWaiting: row.replyWaiting,
    nextStep: nextStep({ state: row.state, awaiting: row.awaiting, replyWaiting: row.replyWaiting, slotStartsAt: row.slotStartsAt?.toISOString() ?? null }),
    preparedBy: row.preparedBy,
    signedBy: row.signedBy,
    sentAt: row.sentAt?.toISOString() ?? null,
    dueAt: row.dueAt?.toISOString() ?? null,
    slot: slotView(row),
    updatedAt: row.updatedAt.toISOString(),
  }
}

export function slotView(row: Pick<SelectedRow, 'scannerId' | 'scanner' | 'place' | 'slotStartsAt' | 'slotEndsAt'>): SlotView | null {
  if (!row.scannerId || !row.scanner || !row.slotStartsAt || !row.slotEndsAt) return null
  return { scannerId: row.scannerId, scanner: row.scanner, place: row.place ?? '', startsAt: row.slotStartsAt.toISOString(), endsAt: row.slotEndsAt.toISOString() }
}
