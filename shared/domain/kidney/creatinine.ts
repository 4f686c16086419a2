import { elapsedDays } from './age'
import { dayMs, requireInstant } from './instant'
import { sortReadings } from './readings'
import type { Accepted, Analyte } from './readings'
import type { ChosenCreatinine, Comparator, LabReading, PassedOver } from './types'
import { convertCreatinine, convertCystatinC } from './units'

/** Creatinine outside these limits is questioned, never repaired (project convention), mg/dL. */
export const plausibleCreatinine = { low: 0.1, high: 30 } as const
/** Cystatin C outside these limits is questioned (project convention), mg/L. */
export const plausibleCystatinC = { low: 0.1, high: 20 } as const
/** Feeds are known to file an eGFR under a creatinine code; a figure like this in mg/dL raises the question. */
export const egfrLikeCreatinine = { low: 15, high: 150 } as const

/** One usable creatinine. */
export interface CreatininePoint {
  reading: LabReading
  atMs: number
  collectedAt: string
  mgPerDl: number
  umolPerL: number
  comparator: Comparator | null
  /** 15 mg/dL or more: a true value in kidney failure, or an eGFR filed as creatinine. A person must look. */
  mayBeEgfr: boolean
  /** Another result of the same moment differed; this is the worse one. */
  hadRival: boolean
}

export interface CreatinineChoice {
  /** The newest usable one, null where there is none. */
  chosen: ChosenCreatinine | null
  /** Every usable one, oldest first; the last is the chosen one. */
  series: CreatininePoint[]
  /** What was not used and why, newest first. */
  passedOver: PassedOver[]
  /** Two neighbors differ more than tenfold: a unit may be wrong. */
  tenfoldJump: boolean
}

/** Creatinine for a sentence, to 0.01 mg/dL, rounded half up as KDIGO asks it to be reported. */
export function displayMgPerDl(mgPerDl: number): string {
  return (Math.floor(mgPerDl * 100 + 0.5 + 1e-9) / 100).toFixed(2)
}

const creatinine: Analyte<{ mgPerDl: number, umolPerL: number }> = {
  kind: 'creatinine',
  // Laboratories send one result in both units, each rounded: 1.0 mg/dL beside 88 µmol/L.
  sameWithin: 1,
  read(reading) {
    const amount = convertCreatinine(reading.value, reading.unit)
    if (amount.status !== 'ok') return { status: 'refused', reason: amount.reason }
    const { mgPerDl, umolPerL } = amount
    if (mgPerDl < plausibleCreatinine.low || mgPerDl > plausibleCreatinine.high) {
      const looksLikeEgfr = mgPerDl >= egfrLikeCreatinine.low && mgPerDl <= egfrLikeCreatinine.high
      return {
        status: 'refused',
        reason: `${displayMgPerDl(mgPerDl)} mg/dL lies outside ${plausibleCreatinine.low} to ${plausibleCreatinine.high} mg/dL`
          + (looksLikeEgfr ? '; it may be an eGFR filed as creatinine' : '; a person must check it'),
      }
    }
    return { status: 'ok', amount: { mgPerDl, umolPerL }, size: umolPerL }
  },
}

const cystatinC: Analyte<number> = {
  kind: 'cystatin-c',
  sameWithin: 0.01,
  read(reading) {
    const amount = convertCystatinC(reading.value, reading.unit)
    if (amount.status !== 'ok') return { status: 'refused', reason: amount.reason }
    if (amount.mgPerL < plausibleCystatinC.low || amount.mgPerL > plausibleCystatinC.high) {
      return { status: 'refused', reason: `${amount.mgPerL} mg/L lies outside ${plausibleCystatinC.low} to ${plausibleCystatinC.high} mg/L; a person must check it` }
    }
    return { status: 'ok', amount: amount.mgPerL, size: amount.mgPerL }
  },
}

function toPoint({ reading, atMs, amount, hadRival }: Accepted<{ mgPerDl: number, umolPerL: number }>): CreatininePoint {
  return {
    reading, atMs, collectedAt: new Date(atMs).toISOString(), ...amount, comparator: reading.comparator,
    mayBeEgfr: amount.mgPerDl >= egfrLikeCreatinine.low, hadRival,
  }
}

/**
 * Picks the newest creatinine that may be used. Bounds ("<0.2") keep their sign. Of two results of one moment a
 * correction outranks what it corrects, and of two final ones the worse kidney function counts.
 *
 * @param readings as found, in any order
 * @param now ISO instant
 * @throws RangeError where `now` is no instant
 */
export function chooseCreatinine(readings: readonly LabReading[], now: string): CreatinineChoice {
  const nowMs = requireInstant(now)
  const sorted = sortReadings(readings, creatinine, nowMs)
  const series = sorted.series.map(toPoint)
  const newest = series.at(-1)
  return {
    chosen: newest === undefined
      ? null
      : {
          reading: newest.reading, mgPerDl: newest.mgPerDl, umolPerL: newest.umolPerL, comparator: newest.comparator,
          collectedAt: newest.collectedAt, ageDays: elapsedDays(newest.atMs, nowMs),
        },
    series,
    passedOver: sorted.passedOver,
    tenfoldJump: series.some((point, index) => {
      const before = series[index - 1]
      return before !== undefined && Math.max(point.umolPerL / before.umolPerL, before.umolPerL / point.umolPerL) > 10
    }),
  }
}

/**
 * Picks the usable cystatin C drawn nearest to a creatinine, at most seven days apart (project convention).
 *
 * @param readings as found, in any order
 * @param now ISO instant
 * @param creatinineMs when the creatinine was drawn
 */
export function chooseCystatinC(
  readings: readonly LabReading[], now: string, creatinineMs: number | null,
): { mgPerL: number, comparator: Comparator | null, passedOver: PassedOver[] } | { mgPerL: null, comparator: null, passedOver: PassedOver[] } {
  const { series, passedOver } = sortReadings(readings, cystatinC, requireInstant(now))
  const distance = (atMs: number) => Math.abs(atMs - (creatinineMs ?? Number.POSITIVE_INFINITY))
  const near = series.filter(({ atMs }) => distance(atMs) <= 7 * dayMs)
    .sort((a, b) => distance(a.atMs) - distance(b.atMs) || b.atMs - a.atMs)[0]
  return near === undefined
    ? { mgPerL: null, comparator: null, passedOver }
    : { mgPerL: near.amount, comparator: near.reading.comparator, passedOver }
}
