import { DateTime } from 'luxon'
import type { NeedKind, NeedState } from '#shared/domain/assessment/needs'
import { outcomeWords } from '#shared/domain/contrast/outcome'
import type { CsvCell } from '#shared/utils/csv'
import type { NeedView, PreparationRow, PreparationTab } from '#shared/types/views'

export const preparationTabWords = {
  'not-booked': 'Not yet booked',
  'needs-something': 'Still needs something',
  'lab-work': 'Lab work',
  'iv-start': 'IV start',
  'held': 'Held',
  'ready': 'Ready',
  'done': 'Done',
} as const satisfies Record<PreparationTab, string>

export const needStateWords = { open: 'open', arranged: 'arranged', met: 'met', waived: 'left out' } as const satisfies Record<NeedState, string>

/** What the booking desk does next about an open need, as a button says it; the need is then arranged. */
export const arrangeWords = {
  'creatinine': 'Lab ordered',
  'iv-start': 'IV start arranged',
  'pregnancy-answer': 'Pregnancy question asked',
  'weight': 'Weight asked for',
  'height': 'Height asked for',
  'premedication': 'Premedication prescribed',
  'dialysis-after': 'Dialysis arranged',
  'radiologist-word': 'Radiologist asked',
  'reaction-history': 'History asked for',
  'medication-guide': 'Guide laid ready',
  'implant-clearance': 'MR safety asked',
  'interpreter': 'Interpreter booked',
  'sedation': 'Sedation booked',
  'radiologist-present': 'Radiologist booked',
  'observation': 'Observation arranged',
} as const satisfies Record<NeedKind, string>

/** The first need nobody has done anything about, overdue ones before others. */
export function nextNeed(needs: readonly NeedView[]): NeedView | null {
  const open = needs.filter(need => need.state === 'open')
  return open.find(need => need.overdue) ?? open[0] ?? null
}

export interface DayGroup { key: string, label: string | null, rows: PreparationRow[] }

/** Rows under the day of their slot in the department's zone, in the order given; rows without a slot stand first, without a heading. */
export function groupByDay(rows: readonly PreparationRow[], zone: string): DayGroup[] {
  const groups: DayGroup[] = []
  for (const row of rows) {
    const day = row.slot === null ? null : DateTime.fromISO(row.slot.startsAt, { zone }).setLocale('en-US')
    const key = day?.toISODate() ?? ''
    const last = groups.at(-1)
    if (last?.key === key) last.rows.push(row)
    else groups.push({ key, label: day?.toFormat('cccc d LLLL') ?? null, rows: [row] })
  }
  return groups
}

/** The ISO date of a slot in the department's zone; null while none is set. */
export function slotDate(row: Pick<PreparationRow, 'slot'>, zone: string): string | null {
  return row.slot === null ? null : DateTime.fromISO(row.slot.startsAt, { zone }).toISODate()
}

/** A date and time typed as the department's own clock shows it. */
export type LocalTime = { ok: true, instant: string } | { ok: false, message: string }

/**
 * The instant of a date (YYYY-MM-DD) and a time (HH:MM) on the department's clock. A time that the change to summer time
 * skips is refused; one that comes twice is taken as the first.
 */
export function instantOf(date: string | null, time: string, zone: string): LocalTime {
  if (date === null) return { ok: false, message: 'Choose the day.' }
  if (!/^\d{1,2}:\d{2}$/.test(time)) return { ok: false, message: 'Give the time as hours and minutes, like 09:30.' }
  const padded = time.padStart(5, '0')
  const at = DateTime.fromISO(`${date}T${padded}`, { zone })
  if (!at.isValid) return { ok: false, message: 'That is no time of day.' }
  if (at.toFormat('HH:mm') !== padded) return { ok: false, message: 'The clocks go forward then: that time does not exist on this day.' }
  return { ok: true, instant: at.toUTC().toISO({ suppressMilliseconds: true }) }
}

/** Date and time of an instant as the department's clock shows them, for the fields. */
export function localOf(iso: string, zone: string): { date: string, time: string } {
  const at = DateTime.fromISO(iso, { zone })
  return { date: at.toFormat('yyyy-MM-dd'), time: at.toFormat('HH:mm') }
}

export const csvHeader = [
  'Reference', 'Exam', 'Contrast', 'Patient', 'Age', 'Record number', 'Phone', 'Practice', 'Priority', 'State', 'Date', 'Time', 'Scanner', 'Minutes',
  'Still needed', 'Arranged', 'Met', 'Left out',
]

/** One exam as a line of the export, in the order of `csvHeader`. Times on the department's clock. */
export function csvLine(row: PreparationRow, zone: string): CsvCell[] {
  const slot = row.slot === null ? null : localOf(row.slot.startsAt, zone)
  const of = (state: NeedState) => row.needs.filter(need => need.state === state).map(need => need.text).join('; ')
  return [
    row.reference, row.examName, row.decided === null ? null : outcomeWords[row.decided].label, row.patient.displayName, row.patient.ageWords,
    row.patient.recordNumber, row.phone, row.practice, row.priority, row.state, slot?.date ?? null, slot?.time ?? null, row.slot?.scanner ?? null, row.minutes,
    of('open'), of('arranged'), of('met'), of('waived'),
  ]
}
