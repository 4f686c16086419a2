import { DateTime } from 'luxon'

/** The zone of the demonstration department, from its starter policy. */
export const departmentZone = 'America/Chicago'

/** The date that is `days` from now on the department's calendar, as a date field takes it. */
export const dayAhead = (days: number): string => DateTime.now().setZone(departmentZone).plus({ days }).toFormat('yyyy-MM-dd')

/** An instant on the department's clock. */
export const instantAhead = (days: number, time: string): string =>
  DateTime.fromISO(`${dayAhead(days)}T${time}`, { zone: departmentZone }).toUTC().toISO({ suppressMilliseconds: true }) ?? ''
