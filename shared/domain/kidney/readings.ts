import { parseInstant } from './instant'
import type { Comparator, LabReading, ObservationStatus, PassedOver } from './types'

/** A reading that counts, with its worth on one scale for comparison. */
export interface Accepted<A> {
  reading: LabReading
  atMs: number
  amount: A
  /** On the analyte's own scale; higher means worse kidney function. */
  size: number
  /** Another result of the same moment differed; the worse one was taken. */
  hadRival: boolean
}

/** How one analyte is read: its conversion, and what makes a value implausible. */
export interface Analyte<A> {
  kind: LabReading['analyte']
  read: (reading: LabReading) => { status: 'ok', amount: A, size: number } | { status: 'refused', reason: string }
  /** Sizes closer than this are one result, written in two units. */
  sameWithin: number
}

/** A clock may run ahead this far before a collection time counts as future. */
const clockAllowanceMs = 10 * 60_000

/** Why a status keeps a result from being used; usable ones are missing. Source: HL7 FHIR R4, observation-status. */
const statusRefusals: Partial<Record<ObservationStatus, string>> = {
  'registered': 'Ordered, no result yet',
  'preliminary': 'Not final yet',
  'cancelled': 'Cancelled by the laboratory',
  'entered-in-error': 'Entered in error',
  'unknown': 'Its status is not known',
}

/** A correction outranks what it corrects. */
const versionRank: Partial<Record<ObservationStatus, number>> = { corrected: 3, amended: 2, final: 1 }
const withdrawn: readonly ObservationStatus[] = ['entered-in-error', 'cancelled']

/** A result known only as "above" is the worse one of two alike. */
const comparatorRank: Record<Comparator | 'none', number> = { '>': 4, '>=': 3, 'none': 2, '<=': 1, '<': 0 }

function rankOf(reading: LabReading): number {
  return versionRank[reading.status] ?? 0
}

function issuedMs(reading: LabReading): number {
  return parseInstant(reading.issuedAt) ?? Number.NEGATIVE_INFINITY
}

function byId(a: LabReading, b: LabReading): number {
  return a.id < b.id ? -1 : a.id > b.id ? 1 : 0
}

/** Keeps one version of each result: the latest released, and a withdrawal before anything released with it. */
function latestVersions(readings: readonly LabReading[], passedOver: PassedOver[]): LabReading[] {
  const versions = new Map<string, LabReading[]>()
  for (const reading of readings) versions.set(reading.id, [...(versions.get(reading.id) ?? []), reading])
  return [...versions.values()].flatMap((rows) => {
    const [kept, ...older] = rows.sort((a, b) => compareVersions(b, a))
    if (kept === undefined) return []
    for (const reading of older) {
      // The same version read twice is no news.
      if (describe(reading) !== describe(kept)) passedOver.push({ reading, reason: 'Replaced by a later version of the same result' })
    }
    return [kept]
  })
}

function describe(reading: LabReading): string {
  return JSON.stringify([reading.status, reading.value, reading.unit, reading.comparator, reading.collectedAt, reading.refusal])
}

function compareVersions(a: LabReading, b: LabReading): number {
  const issuedA = issuedMs(a)
  const issuedB = issuedMs(b)
  if (issuedA !== issuedB) return issuedA > issuedB ? 1 : -1
  const withdrawnA = withdrawn.includes(a.status)
  if (withdrawnA !== withdrawn.includes(b.status)) return withdrawnA ? 1 : -1
  return rankOf(a) - rankOf(b) || (a.value ?? 0) - (b.value ?? 0) || (describe(a) < describe(b) ? -1 : 1)
}

/** Splits off everything that status, refusal or time rules out, and gathers the rest by moment of collection. */
function byMoment(readings: readonly LabReading[], nowMs: number, passedOver: PassedOver[]): Map<number, LabReading[]> {
  const moments = new Map<number, LabReading[]>()
  for (const reading of readings) {
    const statusRefusal = statusRefusals[reading.status]
    const atMs = reading.precision === 'unknown' ? null : parseInstant(reading.collectedAt)
    if (statusRefusal !== undefined) passedOver.push({ reading, reason: statusRefusal })
    // A refused number belongs to something else, such as urine. A refused text may be the correction of a sample,
    // so it stays with its sample.
    else if (reading.refusal !== null && reading.value !== null) passedOver.push({ reading, reason: reading.refusal })
    else if (atMs === null) passedOver.push({ reading, reason: 'Collection time not known' })
    else if (atMs > nowMs + clockAllowanceMs) passedOver.push({ reading, reason: 'Collection time lies in the future' })
    else moments.set(atMs, [...(moments.get(atMs) ?? []), reading])
  }
  return moments
}

/** Of several results of one moment: the correction, then the latest correction, then the worse kidney function. */
function settleMoment<A>(atMs: number, rows: readonly LabReading[], analyte: Analyte<A>, passedOver: PassedOver[]): Accepted<A> | null {
  const top = Math.max(...rows.map(rankOf))
  const current = rows.filter(row => rankOf(row) === top)
  const latest = Math.max(...current.map(issuedMs))
  const candidates: Accepted<A>[] = []
  for (const reading of current) {
    // Among corrections the latest stands; two final results are two measurements, and the worse one counts.
    if (top > 1 && issuedMs(reading) < latest) {
      passedOver.push({ reading, reason: 'Replaced by a later correction of the same sample' })
      continue
    }
    const read = reading.refusal !== null ? { status: 'refused' as const, reason: reading.refusal } : analyte.read(reading)
    if (read.status === 'refused') passedOver.push({ reading, reason: read.reason })
    else candidates.push({ reading, atMs, amount: read.amount, size: read.size, hadRival: false })
  }
  candidates.sort((a, b) => b.size - a.size
    || comparatorRank[b.reading.comparator ?? 'none'] - comparatorRank[a.reading.comparator ?? 'none']
    || issuedMs(b.reading) - issuedMs(a.reading) || byId(a.reading, b.reading))
  const [best, ...rest] = candidates
  for (const reading of rows.filter(row => rankOf(row) < top)) {
    passedOver.push({
      reading,
      reason: best === undefined ? 'Replaced by a correction that has no usable value' : 'Replaced by a corrected result of the same sample',
    })
  }
  if (best === undefined) return null
  for (const other of rest) {
    const same = best.size - other.size <= analyte.sameWithin && best.reading.comparator === other.reading.comparator
    passedOver.push({
      reading: other.reading,
      reason: same ? 'The same result, sent twice' : 'Differs from another result of the same moment; the one with the worse kidney function is used',
    })
    if (!same) best.hadRival = true
  }
  return best
}

/**
 * Sorts one analyte's results into a usable series and those passed over, each with its reason.
 * The order in which results arrive does not matter.
 *
 * @param readings as found; other analytes are ignored
 * @param nowMs the present; a collection more than ten minutes later is refused
 * @returns the series oldest first, and what was passed over, newest first
 */
export function sortReadings<A>(
  readings: readonly LabReading[], analyte: Analyte<A>, nowMs: number,
): { series: Accepted<A>[], passedOver: PassedOver[] } {
  const passedOver: PassedOver[] = []
  const mine = readings.filter(reading => reading.analyte === analyte.kind)
  const moments = byMoment(latestVersions(mine, passedOver), nowMs, passedOver)
  const series = [...moments].flatMap(([atMs, rows]) => settleMoment(atMs, rows, analyte, passedOver) ?? [])
  const time = ({ reading }: PassedOver) => parseInstant(reading.collectedAt) ?? Number.NEGATIVE_INFINITY
  return {
    series: series.sort((a, b) => a.atMs - b.atMs),
    passedOver: passedOver.sort((a, b) => {
      const timeA = time(a)
      const timeB = time(b)
      return timeA === timeB ? byId(a.reading, b.reading) || a.reason.localeCompare(b.reason, 'en') : timeA > timeB ? -1 : 1
    }),
  }
}
