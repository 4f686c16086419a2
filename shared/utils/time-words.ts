import { DateTime } from 'luxon'

/** Times as screens say them: a 24-hour clock, day before month, always in the department's zone. */

function at(iso: string, zone: string): DateTime {
  return DateTime.fromISO(iso, { zone }).setLocale('en-US')
}

/** "14:32". */
export function clockWords(iso: string, zone: string): string {
  return at(iso, zone).toFormat('HH:mm')
}

/** "12 Nov", with the year where it is not the present one: "12 Nov 2021". A date without a time is taken as it stands. */
export function dateWords(iso: string, zone: string, now: string): string {
  const date = /^\d{4}-\d{2}-\d{2}$/.test(iso) ? DateTime.fromISO(iso, { zone: 'utc' }) : at(iso, zone)
  if (!date.isValid) return iso
  return date.toFormat(date.year === at(now, zone).year ? 'd LLL' : 'd LLL yyyy')
}

/** "12 Nov, 14:32"; today "14:32" alone. */
export function momentWords(iso: string, zone: string, now: string): string {
  const moment = at(iso, zone)
  return moment.hasSame(at(now, zone), 'day') ? clockWords(iso, zone) : `${dateWords(iso, zone, now)}, ${clockWords(iso, zone)}`
}

/** "Wednesday 2 December". */
export function dayWords(iso: string, zone: string): string {
  return at(iso, zone).toFormat('cccc d LLLL')
}

/** For a title on hover: "Wednesday 2 December 2026, 14:32:05 GMT-6". */
export function exactWords(iso: string, zone: string): string {
  return at(iso, zone).toFormat('cccc d LLLL yyyy, HH:mm:ss ZZZZ')
}

/** "just now", "2 minutes ago", "in 40 minutes", "3 days ago". */
export function relativeWords(iso: string, now: string): string {
  const seconds = (Date.parse(iso) - Date.parse(now)) / 1000
  const size = Math.abs(seconds)
  if (size < 45) return 'just now'
  const [amount, unit] = size < 3570 ? [Math.round(size / 60), 'minute'] : size < 84_600 ? [Math.round(size / 3600), 'hour'] : [Math.round(size / 86_400), 'day']
  const words = `${amount} ${unit}${amount === 1 ? '' : 's'}`
  return seconds < 0 ? `${words} ago` : `in ${words}`
}

/** "due in 40 min", "due today 17:00", "due Thu", "due 12 Dec", "overdue since 09:10". */
export function dueWords(iso: string, zone: string, now: string): string {
  const due = at(iso, zone)
  const present = at(now, zone)
  const minutes = due.diff(present, 'minutes').minutes
  if (minutes < 0) return `overdue since ${momentWords(iso, zone, now)}`
  if (minutes <= 90) return `due in ${Math.max(1, Math.round(minutes))} min`
  if (due.hasSame(present, 'day')) return `due today ${clockWords(iso, zone)}`
  if (due.startOf('day').diff(present.startOf('day'), 'days').days < 7) return `due ${due.toFormat('ccc')}`
  return `due ${dateWords(iso, zone, now)}`
}

/** A birth date as known: "4 Mar 1965", "Mar 1965" or "1965". */
export function birthDateWords(birthDate: string | null): string {
  if (!birthDate) return 'not known'
  const date = DateTime.fromISO(birthDate, { zone: 'utc' }).setLocale('en-US')
  if (!date.isValid) return birthDate
  return date.toFormat(birthDate.length === 10 ? 'd LLL yyyy' : birthDate.length === 7 ? 'LLL yyyy' : 'yyyy')
}

/** A span as people say it: "40 minutes", "4 hours", "2 days". */
export function spanWords(minutes: number): string {
  const [amount, unit] = minutes < 120 && minutes % 60 !== 0 ? [minutes, 'minute'] : minutes < 2880 ? [Math.round(minutes / 60), 'hour'] : [Math.round(minutes / 1440), 'day']
  return `${amount} ${unit}${amount === 1 ? '' : 's'}`
}
