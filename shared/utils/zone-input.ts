import { DateTime } from 'luxon'

/** An instant as a date-and-time field shows it in a zone, "2026-12-02T14:00"; null stays null. */
export function toZoneInput(iso: string | null, zone: string): string | null {
  if (iso === null) return null
  const moment = DateTime.fromISO(iso, { zone })
  return moment.isValid ? moment.toFormat('yyyy-MM-dd\'T\'HH:mm') : null
}

/** What such a field holds, or a date alone (its start in the zone), as an ISO instant in UTC; null where it is neither. */
export function fromZoneInput(local: string | null, zone: string): string | null {
  if (!local) return null
  const moment = DateTime.fromISO(local, { zone })
  return moment.isValid ? moment.toUTC().toISO() : null
}
