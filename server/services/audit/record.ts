import { addedAuditEvents } from '#server/database/append'
import type { Database } from '#server/database/client'
import type { ServiceContext } from '../context'
import type { AuditAction } from '#shared/domain/access/audit'

export interface AuditEntry {
  action: AuditAction
  objectType: 'request' | 'user' | 'practice' | 'session' | 'letter' | 'patient' | 'policy' | 'guidance' | 'connection' | 'audit' | 'invitation'
  objectId: string | null
  reference?: string | null
  patientId?: string | null
  practiceId?: string | null
  /** Facts about the change: states, versions, field names, counts. Never names, notes, values of laboratory results. */
  detail?: Record<string, string | number | boolean | null | string[]>
  outcome?: 'ok' | 'refused'
}

/** Writes the audit event in the caller's transaction: if it fails, the change fails with it. */
export async function recordAudit(tx: Database, ctx: ServiceContext, entry: AuditEntry): Promise<void> {
  const { actor } = ctx
  await tx.insert(addedAuditEvents).values({
    actorKind: actor.kind,
    actorId: actor.kind === 'user' ? actor.userId : null,
    actorName: actor.kind === 'user' || actor.kind === 'system' ? actor.name : actor.kind,
    actorRole: actor.kind === 'user' ? actor.role : null,
    action: entry.action,
    objectType: entry.objectType,
    objectId: entry.objectId,
    reference: entry.reference ?? null,
    patientId: entry.patientId ?? null,
    practiceId: entry.practiceId ?? null,
    detail: entry.detail ?? {},
    outcome: entry.outcome ?? 'ok',
    requestId: ctx.requestId,
  })
}
