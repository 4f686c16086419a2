/** One hour in milliseconds. */
export const hourMs = 3_600_000
/** One day of 24 hours in milliseconds. Clinical windows count elapsed time, not calendar days. */
export const dayMs = 24 * hourMs

/** A time part with a zone: without one, the same text would mean another moment on another computer. */
const instantPattern = /^\d{4}-\d{2}-\d{2}T\d{2}:\d{2}(?::\d{2}(?:\.\d+)?)?(?:Z|[+-]\d{2}:?\d{2})$/i

/**
 * Reads an ISO 8601 instant.
 *
 * @param text date, time and zone, for instance "2026-11-10T23:30:00-08:00"
 * @returns milliseconds since 1970-01-01T00:00Z, or null where the text is no instant
 */
export function parseInstant(text: string | null): number | null {
  if (text === null || !instantPattern.test(text)) return null
  const ms = Date.parse(text)
  return Number.isNaN(ms) ? null : ms
}

/**
 * Reads an instant that the program itself supplies, such as `now`.
 *
 * @throws RangeError where the text is no instant: a fault of the caller, never of the record
 */
export function requireInstant(text: string): number {
  const ms = parseInstant(text)
  if (ms === null) throw new RangeError('An ISO 8601 instant with a zone is required')
  return ms
}
