import { DateTime } from 'luxon'

export interface FhirTime {
  /** ISO 8601 in UTC; null where the text says no day. */
  at: string | null
  precision: 'instant' | 'day' | 'unknown'
  /** As sent. */
  text: string | null
}

const dayOnly = /^\d{4}-\d{2}-\d{2}$/
const withTime = /^(\d{4}-\d{2}-\d{2})T\d{2}:\d{2}(:\d{2}(\.\d+)?)?(Z|[+-]\d{2}:\d{2})?$/

/**
 * Reads a FHIR dateTime or instant (R4 Datatypes, "dateTime"). A plain date stands for the start of that day in the
 * department's zone, the older reading; so does a time without a zone, which names no instant. `YYYY-MM` and `YYYY` say
 * no day and are unknown.
 */
export function readFhirTime(text: string | undefined, zone: string): FhirTime {
  const trimmed = text?.trim()
  if (!trimmed) return { at: null, precision: 'unknown', text: null }
  const unknown: FhirTime = { at: null, precision: 'unknown', text: trimmed }
  const timed = withTime.exec(trimmed)
  const parts = timed && timed[4] !== undefined
    ? { value: DateTime.fromISO(trimmed, { zone: 'utc' }), precision: 'instant' as const }
    : timed || dayOnly.test(trimmed)
      ? { value: DateTime.fromISO(timed?.[1] ?? trimmed, { zone }).startOf('day'), precision: 'day' as const }
      : null
  const at = parts?.value.toUTC().toISO() ?? null
  return parts && at !== null ? { at, precision: parts.precision, text: trimmed } : unknown
}

/** The ISO date `days` before `date` (YYYY-MM-DD). */
export function daysBefore(date: string, days: number): string {
  return DateTime.fromISO(date, { zone: 'utc' }).minus({ days }).toISODate() ?? date
}

/** Elapsed whole days between two ISO instants or dates, null where either is missing or unreadable. */
export function daysBetween(from: string | null | undefined, to: string): number | null {
  if (!from) return null
  const days = DateTime.fromISO(to, { zone: 'utc' }).diff(DateTime.fromISO(from, { zone: 'utc' }), 'days').days
  return Number.isFinite(days) ? Math.floor(days) : null
}
