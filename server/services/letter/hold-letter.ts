import { eq } from 'drizzle-orm'
import type { AuditAction } from '#shared/domain/access/audit'
import type { Database } from '#server/database/client'
import { letters, patients, requests } from '#server/database/schema/requests'
import { recordAudit } from '../audit/record'
import type { AuditEntry } from '../audit/record'
import type { ServiceContext } from '../context'
import { NotFound } from '../errors'
import { lockRequest } from '../request/load'
import type { PatientRecord, RequestRecord } from '../request/load'

export type LetterRecord = typeof letters.$inferSelect
export interface HeldLetter { letter: LetterRecord, request: RequestRecord, patient: PatientRecord }

/**
 * Holds a letter until the transaction ends. The request first, as every change of a request does, so that the two never wait
 * for each other.
 *
 * @throws NotFound
 */
export async function holdLetter(tx: Database, id: string): Promise<HeldLetter> {
  const [known] = await tx.select({ requestId: letters.requestId }).from(letters).where(eq(letters.id, id))
  if (!known) throw new NotFound('This letter')
  await lockRequest(tx, known.requestId)
  const [held] = await tx.select({ letter: letters, request: requests, patient: patients }).from(letters)
    .innerJoin(requests, eq(requests.id, letters.requestId))
    .innerJoin(patients, eq(patients.id, letters.patientId))
    .where(eq(letters.id, id)).for('update', { of: letters })
  if (!held) throw new NotFound('This letter')
  return held
}

export async function auditLetter(tx: Database, ctx: ServiceContext, { letter, request }: HeldLetter, action: AuditAction, detail: AuditEntry['detail'] = {}): Promise<void> {
  await recordAudit(tx, ctx, {
    action, objectType: 'letter', objectId: letter.id, reference: request.reference, patientId: letter.patientId, practiceId: request.practiceId,
    detail: { kind: letter.kind, ...detail },
  })
}
