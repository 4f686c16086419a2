import { ageAt } from '../kidney/age'

/** The lowest and highest age in completed years that a birth date allows; they differ where day or month is not known. */
export interface AgeBounds { youngest: number, oldest: number }

/**
 * Age in completed years at an instant, on that day in the department's zone.
 * Returns null where the birth date cannot be read or lies after the instant.
 */
export function ageBounds(birthDate: string, at: string, zone: string): AgeBounds | null {
  const range = ageAt(birthDate, Date.parse(at), zone)
  return range && { youngest: range.youngest.completedYears, oldest: range.oldest.completedYears }
}
