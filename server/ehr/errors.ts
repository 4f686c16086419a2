import type { PartProblem } from '#shared/domain/record/types'

/**
 * The hospital record could not be read. The message is for people and never holds a patient's id, a token or the
 * server's own text, which may hold either.
 */
export class EhrUnavailable extends Error {
  readonly problem: PartProblem
  /** HTTP status behind it, null where no answer came. */
  readonly status: number | null
  /** Milliseconds the server asked us to wait, null where it did not say. */
  readonly retryAfterMs: number | null
  /** Whether the refusal itself was FHIR: the server is the right one. */
  readonly inFhir: boolean

  constructor(
    problem: PartProblem, message: string,
    details: { status?: number | null, retryAfterMs?: number | null, inFhir?: boolean, cause?: unknown } = {},
  ) {
    super(message, details.cause === undefined ? undefined : { cause: details.cause })
    this.name = 'EhrUnavailable'
    this.problem = problem
    this.status = details.status ?? null
    this.retryAfterMs = details.retryAfterMs ?? null
    this.inFhir = details.inFhir ?? false
  }
}

/** No hospital record is connected: the settings are empty. */
export class EhrNotConfigured extends Error {
  constructor() {
    super('No hospital record is connected')
    this.name = 'EhrNotConfigured'
  }
}

/** The settings cannot work as they stand; the message names the setting, never its value. */
export class EhrSettingsInvalid extends Error {
  constructor(message: string) {
    super(message)
    this.name = 'EhrSettingsInvalid'
  }
}
