import { DateTime } from 'luxon'
import { dayMs } from './instant'

/** A person's age on one day, in both countings that the equations ask for. */
export interface Age {
  completedYears: number
  /** Days lived divided by 365.25, never below the completed years. */
  decimalYears: number
}

/** Youngest and oldest age that the birth date allows; both are equal where the day of birth is known. */
export interface AgeRange { youngest: Age, oldest: Age, exact: boolean }

interface Day { year: number, month: number, day: number }

function dayNumber({ year, month, day }: Day): number {
  return Math.round(Date.UTC(year, month - 1, day) / dayMs)
}

function ageBetween(birth: Day, on: Day): Age {
  const beforeBirthday = on.month < birth.month || (on.month === birth.month && on.day < birth.day)
  const completedYears = Math.max(0, on.year - birth.year - (beforeBirthday ? 1 : 0))
  const lived = Math.max(0, dayNumber(on) - dayNumber(birth)) / 365.25
  // 365 days are 0.9993 of 365.25: without this a child would not be one year old on the first birthday.
  return { completedYears, decimalYears: Math.max(lived, completedYears) }
}

/** Earliest and latest day of birth that the text allows, or null where it is no date. */
function birthDays(birthDate: string): { earliest: Day, latest: Day } | null {
  const match = /^(\d{4})(?:-(\d{2})(?:-(\d{2}))?)?$/.exec(birthDate)
  if (match === null) return null
  const year = Number(match[1])
  const month = match[2] === undefined ? null : Number(match[2])
  const day = match[3] === undefined ? null : Number(match[3])
  const [first, last] = [month ?? 1, month ?? 12]
  if (first < 1 || first > 12 || (day !== null && (day < 1 || day > daysInMonth(year, first)))) return null
  return {
    earliest: { year, month: first, day: day ?? 1 },
    latest: { year, month: last, day: day ?? daysInMonth(year, last) },
  }
}

/** Days of a month of the Gregorian calendar, which ISO 8601 uses. */
function daysInMonth(year: number, month: number): number {
  if (month === 2) return year % 4 === 0 && (year % 100 !== 0 || year % 400 === 0) ? 29 : 28
  return [4, 6, 9, 11].includes(month) ? 30 : 31
}

/**
 * Age on the calendar day of an instant, as that day is counted in the department's zone.
 * A birth date known only to the month or year gives a range, so that a caller can reckon with its worse end.
 *
 * @param birthDate YYYY-MM-DD, YYYY-MM or YYYY
 * @param atMs instant in milliseconds
 * @param timeZone IANA zone
 * @returns null where the birth date cannot be read, or every possible day of birth lies after the instant
 */
export function ageAt(birthDate: string, atMs: number, timeZone: string): AgeRange | null {
  const birth = birthDays(birthDate)
  const at = DateTime.fromMillis(atMs, { zone: timeZone })
  if (birth === null || !at.isValid) return null
  const on: Day = { year: at.year, month: at.month, day: at.day }
  if (dayNumber(on) < dayNumber(birth.earliest)) return null
  return {
    youngest: ageBetween(birth.latest, on),
    oldest: ageBetween(birth.earliest, on),
    exact: dayNumber(birth.earliest) === dayNumber(birth.latest),
  }
}

/**
 * The age of a sample in words for a screen.
 *
 * @param collectedMs collection instant
 * @param nowMs the present
 * @param timeZone IANA zone that decides what "today" is
 * @returns "today", "yesterday" or a number of elapsed whole days, in years from two years on
 */
export function sampleAgeWords(collectedMs: number, nowMs: number, timeZone: string): string {
  const days = elapsedDays(collectedMs, nowMs)
  if (days === 0) {
    const collected = DateTime.fromMillis(collectedMs, { zone: timeZone })
    const now = DateTime.fromMillis(nowMs, { zone: timeZone })
    return collected < now && !collected.hasSame(now, 'day') ? 'yesterday' : 'today'
  }
  if (days >= 730) return `${Math.floor(days / 365.25)} years old`
  return days === 1 ? '1 day old' : `${days} days old`
}

/** Whole days of 24 hours between two instants; 0 where the first is a little ahead of the second. */
export function elapsedDays(fromMs: number, toMs: number): number {
  return Math.max(0, Math.floor((toMs - fromMs) / dayMs))
}
