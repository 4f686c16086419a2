import { setResponseHeader, setResponseStatus } from 'h3'
import type { H3Event } from 'h3'
import { EhrUnavailable } from '#server/ehr/errors'
import { Invalid, ServiceError, Stale, StateConflict, TooMany, Unavailable } from '#server/services/errors'
import { describeError, log } from './log'

/** RFC 9457 problem details, as every failed call answers. */
export interface ProblemDetails {
  type: string
  title: string
  status: number
  detail: string
  requestId: string
  [extension: string]: unknown
}

/**
 * The one place where errors become answers. A known error speaks for itself; anything else becomes a bland 500 whose cause
 * stays in the log.
 */
export function answerProblem(event: H3Event, error: unknown): ProblemDetails {
  const known = recognise(error)
  const requestId = event.context.requestId
  if (known.status >= 500) {
    log.error({ requestId, code: known.code, error: describeError(error) }, 'request failed')
  }
  setResponseStatus(event, known.status)
  setResponseHeader(event, 'content-type', 'application/problem+json; charset=utf-8')
  if (known instanceof TooMany || known instanceof Unavailable) {
    setResponseHeader(event, 'retry-after', known.retryAfterSeconds)
  }
  return {
    type: `urn:wherefore:problem:${known.code}`,
    title: known.title,
    status: known.status,
    detail: known.detail,
    requestId,
    ...known.extra,
  }
}

function recognise(error: unknown): ServiceError {
  if (error instanceof ServiceError) return error
  if (error instanceof EhrUnavailable) {
    return new Unavailable('The hospital record could not be reached. Nothing is lost; try again, or go on without it.', 10, { cause: error })
  }
  const database = databaseCode(error)
  if (database === '23P01') return new StateConflict('That scanner is already taken at this time. Choose another slot.', { reason: 'slot-taken' })
  if (database === '23505' || database === '23514' || database === '23503') {
    return new Invalid([], 'The change does not fit what is already stored.')
  }
  if (database === '40001' || database === '40P01') return new Stale('Somebody changed this at the same moment. Open it again.')
  if (database && /^(?:08|53|57|55P03)/.test(database)) return new Unavailable('The database is busy or restarting. Nothing is lost; try again.')
  if (isConnectionFailure(error)) return new Unavailable('The database cannot be reached. Nothing is lost; try again.')
  return new ServiceError('internal', 500, 'Something went wrong', 'It was not your doing, and nothing was changed. Try again, or call imaging.')
}

/** PostgreSQL's SQLSTATE, from the driver's error or the cause that drizzle wraps. */
function databaseCode(error: unknown): string | null {
  for (let current = error; current instanceof Error; current = current.cause) {
    if ('code' in current && typeof current.code === 'string' && /^[0-9A-Z]{5}$/.test(current.code)) return current.code
  }
  return null
}

function isConnectionFailure(error: unknown): boolean {
  for (let current = error; current instanceof Error; current = current.cause) {
    if ('code' in current && typeof current.code === 'string' && /^(?:ECONN|ETIMEDOUT|EPIPE)/.test(current.code)) return true
    if (/timeout exceeded when trying to connect|Connection terminated/i.test(current.message)) return true
  }
  return false
}
