import { and, eq, sql } from 'drizzle-orm'
import type { RequestScope } from '#shared/domain/access/permissions'
import type { Database } from '#server/database/client'
import { practices, users } from '#server/database/schema/people'
import { patients, requests } from '#server/database/schema/requests'
import { scanners } from '#server/database/schema/rules'
import { NotFound } from '../errors'
import { alias } from 'drizzle-orm/pg-core'

export type RequestRecord = typeof requests.$inferSelect
export type PatientRecord = typeof patients.$inferSelect

/** A request with the rows that every screen shows beside it. */
export interface LoadedRequest {
  request: RequestRecord
  patient: PatientRecord
  practice: typeof practices.$inferSelect
  preparedBy: string
  signedBy: string | null
  scanner: typeof scanners.$inferSelect | null
}

export const preparer = alias(users, 'preparer')
export const signer = alias(users, 'signer')

/** Finds one request by id or by reference. @throws NotFound */
export async function loadRequest(db: Database, key: string): Promise<LoadedRequest> {
  const byReference = key.startsWith('WF-')
  const [row] = await db.select({
    request: requests, patient: patients, practice: practices, preparedBy: preparer.name, signedBy: signer.name, scanner: scanners,
  }).from(requests)
    .innerJoin(patients, eq(patients.id, requests.patientId))
    .innerJoin(practices, eq(practices.id, requests.practiceId))
    .innerJoin(preparer, eq(preparer.id, requests.preparedById))
    .leftJoin(signer, eq(signer.id, requests.signedById))
    .leftJoin(scanners, eq(scanners.id, requests.scannerId))
    .where(byReference ? eq(requests.reference, key) : eq(requests.id, key))
  if (!row) throw new NotFound('This request')
  return row
}

/** Holds the row until the transaction ends, so that two writers queue instead of crossing. @throws NotFound */
export async function lockRequest(tx: Database, id: string): Promise<void> {
  const locked = await tx.execute(sql`select 1 from requests where id = ${id} for update`)
  if (locked.rows.length === 0) throw new NotFound('This request')
}

export function scopeOf(request: RequestRecord): RequestScope {
  return {
    practiceId: request.practiceId,
    state: request.state,
    preparedById: request.preparedById,
    signedById: request.signedById,
  }
}

/** The update's guard: the version that was read, repeated in the statement itself. */
export function unchanged(request: RequestRecord) {
  return and(eq(requests.id, request.id), eq(requests.version, request.version), eq(requests.state, request.state))
}
