import { mayOnRequest, mayOnUser } from '#shared/domain/access/permissions'
import type { Action, RequestAction, RequestScope, UserAction, UserScope } from '#shared/domain/access/permissions'
import type { Actor } from '#shared/domain/access/roles'
import type { Database } from '#server/database/client'
import type { EhrClient } from '#server/ehr/client'
import { Forbidden, NotFound } from './errors'

/** A person, or the system on its own behalf (jobs), or a patient with a link, or nobody yet (sign-in). */
export type ContextActor =
  | ({ kind: 'user' } & Actor)
  | { kind: 'system', name: string }
  | { kind: 'patient' }
  | { kind: 'nobody' }

/** Names one write, so that sending it twice makes one. */
export interface IdempotencyToken { userId: string, route: string, key: string, fingerprint: string }

/** All a verb may know of the outside. No request object enters a service. */
export interface ServiceContext {
  db: Database
  actor: ContextActor
  requestId: string
  now: Date
  /** Null where no hospital record is connected. */
  ehr: EhrClient | null
  idempotency: IdempotencyToken | null
  /** Which row rules were asked; the route wrapper refuses to answer when one was forgotten. */
  permitted: Set<Action>
}

/** The signed-in person; verbs that need one call this first. */
export function userOf(ctx: ServiceContext): Actor {
  if (ctx.actor.kind !== 'user') throw new Forbidden()
  return ctx.actor
}

/**
 * Asks the permission table about this request.
 *
 * @throws NotFound where the actor may not even see it, so that its existence is not given away; Forbidden otherwise.
 */
export function permitRequest(ctx: ServiceContext, action: RequestAction, row: RequestScope): void {
  const actor = userOf(ctx)
  ctx.permitted.add(action)
  if (mayOnRequest(actor, action, row)) return
  if (!mayOnRequest(actor, 'request.read', row)) throw new NotFound('This request')
  throw new Forbidden()
}

/** Asks the permission table about this account. @throws Forbidden */
export function permitUser(ctx: ServiceContext, action: UserAction, row: UserScope): void {
  const actor = userOf(ctx)
  ctx.permitted.add(action)
  if (!mayOnUser(actor, action, row)) throw new Forbidden('You cannot change your own account here; ask another administrator.')
}
