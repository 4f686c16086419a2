import { desc, eq, and, sql } from 'drizzle-orm'
import type { AuditAction } from '#shared/domain/access/audit'
import type { RequestAction } from '#shared/domain/access/permissions'
import { stateWords, transition } from '#shared/domain/request/lifecycle'
import type { TransitionName } from '#shared/domain/request/lifecycle'
import type { WriteResult } from '#shared/types/views'
import type { Database } from '#server/database/client'
import { requests } from '#server/database/schema/requests'
import { auditEvents } from '#server/database/schema/trail'
import { recordAudit } from '../audit/record'
import type { AuditEntry } from '../audit/record'
import { permitRequest } from '../context'
import type { ServiceContext } from '../context'
import { Stale, StateConflict } from '../errors'
import { inTransaction } from '../transaction'
import { loadRequest, lockRequest, scopeOf, unchanged } from './load'
import type { LoadedRequest } from './load'

type RequestUpdate = Partial<typeof requests.$inferInsert>

export interface ChangeOutcome {
  set?: RequestUpdate
  audit: AuditAction
  detail?: AuditEntry['detail']
}

interface Change {
  id: string
  /** The version the caller read; null where the change does not depend on one (adding to the thread). */
  version: number | null
  action: RequestAction
  /** The transition it takes; null where the state stays. May depend on the row. */
  step: TransitionName | null | ((loaded: LoadedRequest) => TransitionName | null)
  keepsSlot?: (loaded: LoadedRequest) => boolean
  apply: (tx: Database, loaded: LoadedRequest) => Promise<ChangeOutcome>
}

/**
 * The one way a stored request changes: lock, permission on the row, version, transition, the change itself, a conditional
 * update and the audit event, all in one transaction.
 *
 * @throws NotFound, Forbidden, Stale with who changed it, StateConflict with the state it is in.
 */
export async function changeRequest(ctx: ServiceContext, change: Change): Promise<WriteResult> {
  return await inTransaction(ctx, async (tx) => {
    await lockRequest(tx, change.id)
    const loaded = await loadRequest(tx, change.id)
    const { request } = loaded
    if (ctx.actor.kind !== 'system') permitRequest(ctx, change.action, scopeOf(request))
    if (change.version !== null && change.version !== request.version) throw await staleError(tx, loaded)

    const step = typeof change.step === 'function' ? change.step(loaded) : change.step
    let state = request.state
    if (step) {
      const by = ctx.actor.kind === 'user' ? ctx.actor.role : 'system'
      const result = transition(request.state, step, by, { keepsSlot: change.keepsSlot?.(loaded) ?? false })
      if (!result.ok) throw conflictError(loaded)
      state = result.to
    }
    const outcome = await change.apply(tx, loaded)
    const version = request.version + (step || outcome.set ? 1 : 0)
    if (version !== request.version) {
      const updated = await tx.update(requests)
        .set({ ...outcome.set, state, version, updatedAt: ctx.now })
        .where(unchanged(request))
        .returning({ id: requests.id, reference: requests.reference })
      if (updated.length === 0) throw await staleError(tx, loaded)
    }
    await recordAudit(tx, ctx, {
      action: outcome.audit,
      objectType: 'request',
      objectId: request.id,
      reference: outcome.set?.reference ?? request.reference,
      patientId: request.patientId,
      practiceId: request.practiceId,
      detail: { from: request.state, to: state, version, ...outcome.detail },
    })
    await tx.execute(sql`select pg_notify('wherefore_requests', ${request.id})`)
    return { id: request.id, reference: outcome.set?.reference ?? request.reference, state, version }
  }, tx => permitRepeat(tx, ctx, change))
}

/**
 * A write sent again is answered as before, to whoever may still read the request. The rule of the write itself need not hold any
 * more: a discarded draft is no draft.
 *
 * @throws NotFound
 */
export async function permitRepeat(tx: Database, ctx: ServiceContext, { id, action }: Pick<Change, 'id' | 'action'>): Promise<void> {
  const { request } = await loadRequest(tx, id)
  permitRequest(ctx, 'request.read', scopeOf(request))
  ctx.permitted.add(action)
}

/** Who changed it last, so that the loser of a race is told. */
async function lastChange(tx: Database, requestId: string): Promise<{ who: string, action: string, at: string } | null> {
  const [event] = await tx.select({ who: auditEvents.actorName, action: auditEvents.action, at: auditEvents.at }).from(auditEvents)
    .where(and(eq(auditEvents.objectType, 'request'), eq(auditEvents.objectId, requestId), sql`${auditEvents.action} <> 'request.read'`))
    .orderBy(desc(auditEvents.id)).limit(1)
  return event ? { who: event.who, action: event.action, at: event.at.toISOString() } : null
}

export async function staleError(tx: Database, { request }: LoadedRequest, extra: Record<string, unknown> = {}): Promise<Stale> {
  const last = await lastChange(tx, request.id)
  return new Stale(
    last ? `${last.who} changed it in the meantime. It is now: ${stateWords[request.state].toLowerCase()}.` : 'It was changed in the meantime.',
    { state: request.state, version: request.version, changedBy: last?.who ?? null, changedAt: last?.at ?? null, ...extra },
  )
}

export function conflictError({ request }: LoadedRequest): StateConflict {
  return new StateConflict(`The request is now: ${stateWords[request.state].toLowerCase()}.`, { state: request.state, version: request.version })
}
