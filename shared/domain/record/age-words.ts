import { DateTime } from 'luxon'
import { ageAt } from '../kidney/age'

/**
 * A person's age in words, for the line that names them: "61 years", "14 months", "9 days"; "about 61 years" where the record
 * knows no day of birth.
 *
 * @param birthDate YYYY-MM-DD, YYYY-MM or YYYY.
 * @param now ISO instant.
 * @param timeZone IANA zone whose calendar counts.
 */
export function ageWords(birthDate: string, now: string, timeZone: string): string {
  const today = DateTime.fromISO(now, { zone: timeZone }).startOf('day')
  const born = DateTime.fromISO(birthDate, { zone: timeZone })
  if (!born.isValid || !today.isValid || born > today) return 'age not known'
  const about = birthDate.length < 10 ? 'about ' : ''
  const years = ageAt(birthDate, today.toMillis(), timeZone)?.oldest.completedYears ?? 0
  if (years >= 2) return `${about}${years} years`
  const months = Math.floor(today.diff(born, 'months').months)
  if (months >= 2) return `${about}${months} months`
  const days = Math.floor(today.diff(born, 'days').days)
  return `${about}${days} ${days === 1 ? 'day' : 'days'}`
}
