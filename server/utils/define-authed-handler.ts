import { createHash } from 'node:crypto'
import { defineEventHandler, getHeader, readRawBody, setResponseHeader } from 'h3'
import type { H3Event } from 'h3'
import { needsRow, roleMay } from '#shared/domain/access/permissions'
import type { Action } from '#shared/domain/access/permissions'
import { currentActor } from '#server/auth/current-actor'
import type { ContextActor, IdempotencyToken, ServiceContext } from '#server/services/context'
import { Forbidden, PreconditionRequired, ServiceError, Unauthenticated } from '#server/services/errors'
import { recordAudit } from '#server/services/audit/record'
import { assertIdempotencyKey } from '#server/services/transaction'
import { useApp } from './app'
import { answerProblem } from './problem'
import type { ProblemDetails } from './problem'

interface HandlerInput {
  event: H3Event
  ctx: ServiceContext
  /** The version named in If-Match; 0 where the route does not ask for one. */
  version: number
}

interface HandlerOptions {
  /** The write must carry an Idempotency-Key: sending it twice makes one. */
  idempotent?: boolean
  /** The write must name the version it read in If-Match. */
  ifMatch?: boolean
}

/**
 * Wraps every route that needs a person: finds who asks from the database, asks the permission table, hands the handler a
 * context, and turns errors into problem details. Where the table decides on the row and the handler never asked, it answers
 * 500 rather than leak.
 */
export function defineAuthedHandler<Result>(
  action: Action,
  handler: (input: HandlerInput) => Promise<Result>,
  options: HandlerOptions = {},
) {
  return defineEventHandler(async (event): Promise<Result | ProblemDetails> => {
    setResponseHeader(event, 'cache-control', 'no-store')
    try {
      const actor = await currentActor(event)
      if (!actor) throw new Unauthenticated()
      const ctx = createContext(event, { kind: 'user', ...actor })
      if (!roleMay(actor.role, action)) {
        await recordAudit(ctx.db, ctx, { action: 'access.refuse', objectType: 'session', objectId: null, outcome: 'refused', detail: { action } })
        throw new Forbidden()
      }
      if (options.idempotent) ctx.idempotency = await idempotencyToken(event, actor.userId)
      const result = await handler({ event, ctx, version: options.ifMatch ? readIfMatch(event) : 0 })
      if (needsRow(actor.role, action) && !ctx.permitted.has(action)) {
        throw new ServiceError('unchecked', 500, 'Something went wrong', 'The answer was withheld because a check was missing.')
      }
      return result
    }
    catch (error) {
      return answerProblem(event, error)
    }
  })
}

/** Wraps the few routes that answer without a person: patient links, invitations, health. Each is listed as public in the route table. */
export function definePublicHandler<Result>(actor: 'patient' | 'nobody', handler: (input: { event: H3Event, ctx: ServiceContext }) => Promise<Result>) {
  return defineEventHandler(async (event): Promise<Result | ProblemDetails> => {
    setResponseHeader(event, 'cache-control', 'no-store')
    try {
      return await handler({ event, ctx: createContext(event, { kind: actor }) })
    }
    catch (error) {
      return answerProblem(event, error)
    }
  })
}

/** Says which version the answer is, for a later If-Match. */
export function sendVersion(event: H3Event, version: number): void {
  setResponseHeader(event, 'etag', `"${version}"`)
}

function createContext(event: H3Event, actor: ContextActor): ServiceContext {
  const app = useApp()
  return {
    db: app.db,
    ehr: app.ehr,
    actor,
    requestId: event.context.requestId,
    now: new Date(),
    idempotency: null,
    permitted: new Set(),
  }
}

function readIfMatch(event: H3Event): number {
  const match = /^"(\d{1,9})"$/.exec(getHeader(event, 'if-match') ?? '')
  if (!match?.[1]) throw new PreconditionRequired('If-Match')
  return Number(match[1])
}

async function idempotencyToken(event: H3Event, userId: string): Promise<IdempotencyToken> {
  const key = assertIdempotencyKey(getHeader(event, 'idempotency-key'))
  const body = (await readRawBody(event)) ?? ''
  return {
    userId,
    key,
    route: `${event.method} ${event.path.split('?')[0]}`,
    fingerprint: createHash('sha256').update(body).digest('hex'),
  }
}
