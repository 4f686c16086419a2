import { DateTime } from 'luxon'

/** The lowest and highest age in completed years that a birth date allows; they differ where day or month is not known. */
export interface AgeBounds { youngest: number, oldest: number }

/**
 * Age in completed years at an instant, in the department's zone.
 * Returns null where the birth date cannot be read or lies after the instant.
 */
export function ageBounds(birthDate: string, at: string, zone: string): AgeBounds | null {
  const moment = DateTime.fromISO(at, { zone })
  const earliest = DateTime.fromISO(birthDate, { zone })
  if (!moment.isValid || !earliest.isValid) return null
  const latest = /^\d{4}$/.test(birthDate)
    ? earliest.endOf('year')
    : /^\d{4}-\d{2}$/.test(birthDate) ? earliest.endOf('month') : earliest
  const oldest = Math.floor(moment.diff(earliest, 'years').years)
  if (oldest < 0) return null
  return { youngest: Math.max(0, Math.floor(moment.diff(latest, 'years').years)), oldest }
}
