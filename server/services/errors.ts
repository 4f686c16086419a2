/** A field and what is wrong with it; the rejected value itself is never repeated. */
export interface FieldProblem { path: string, message: string }

/** What went wrong, in words a person may read. The route adapter turns it into problem details. */
export class ServiceError extends Error {
  constructor(
    readonly code: string,
    readonly status: number,
    readonly title: string,
    readonly detail: string,
    readonly extra: Record<string, unknown> = {},
    options?: ErrorOptions,
  ) {
    super(detail, options)
    this.name = new.target.name
  }
}

export class NotFound extends ServiceError {
  constructor(what = 'This') {
    super('not-found', 404, 'Not found', `${what} does not exist, or is not yours to see.`)
  }
}

export class Unauthenticated extends ServiceError {
  constructor() {
    super('unauthenticated', 401, 'Sign in first', 'You are not signed in, or your session has ended.')
  }
}

export class Forbidden extends ServiceError {
  constructor(detail = 'Your role does not allow this.') {
    super('forbidden', 403, 'Not allowed', detail)
  }
}

/** The request's state forbids the step. */
export class StateConflict extends ServiceError {
  constructor(detail: string, extra: Record<string, unknown> = {}) {
    super('state-conflict', 409, 'This step is no longer possible', detail, extra)
  }
}

/** Somebody else changed it since it was read. */
export class Stale extends ServiceError {
  constructor(detail: string, extra: Record<string, unknown> = {}) {
    super('stale', 412, 'Changed since you opened it', detail, extra)
  }
}

export class PreconditionRequired extends ServiceError {
  constructor(header: 'If-Match') {
    super('precondition-required', 428, 'Version missing', `The ${header} header must name the version you read.`)
  }
}

export class Invalid extends ServiceError {
  constructor(readonly problems: FieldProblem[], detail = 'Some answers need another look.') {
    super('invalid', 422, 'Please check', detail, { errors: problems })
  }
}

export class BadRequest extends ServiceError {
  constructor(detail: string, status: 400 | 413 | 415 = 400) {
    super('bad-request', status, 'The request could not be read', detail)
  }
}

export class TooMany extends ServiceError {
  constructor(readonly retryAfterSeconds: number, detail = 'Too many tries. Wait a little and try again.') {
    super('too-many', 429, 'Too many tries', detail, { retryAfterSeconds })
  }
}

export class Unavailable extends ServiceError {
  constructor(detail: string, readonly retryAfterSeconds = 5, options?: ErrorOptions) {
    super('unavailable', 503, 'Not available right now', detail, {}, options)
  }
}
