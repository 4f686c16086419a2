import type { GfrEstimate, GfrStage } from './types'

/** Lower edge of each category, mL/min/1.73 m²; an edge belongs to the better one. */
const lowerEdges = [['G1', 90], ['G2', 60], ['G3a', 45], ['G3b', 30], ['G4', 15]] as const

/**
 * KDIGO GFR category of an unrounded eGFR.
 * Source: KDIGO CKD guideline 2012, kept in 2024 (Kidney Int 2024;105(4S)).
 *
 * @param egfr mL/min/1.73 m², unrounded
 */
export function gfrStage(egfr: number): GfrStage {
  return lowerEdges.find(([, edge]) => egfr >= edge)?.[0] ?? 'G5'
}

/** Rounds half up to whole numbers, as KDIGO asks an eGFR to be reported. */
export function wholeGfr(egfr: number): number {
  return Math.floor(egfr + 0.5)
}

function cutTo(value: number, decimals: number): number {
  const scale = 10 ** decimals
  const cut = Math.floor(value * scale) / scale
  // 8.7 times 10 may come out a hair below 87: take the next step where it still does not exceed the value.
  const next = (Math.floor(value * scale) + 1) / scale
  return next <= value ? next : cut
}

/**
 * An eGFR as a screen shows it: a whole number, unless rounding would carry it over a category edge or a gate.
 * Then decimals are cut, not rounded, so that 29.6 stays "29.6" and is never read as "30".
 *
 * @param egfr mL/min/1.73 m², unrounded
 * @param bound `at-least` is rounded down, so that no more is claimed than is known, and carries its sign
 * @param gates further thresholds the figure must not seem to pass, for instance the department's own
 */
export function displayGfr(egfr: number, bound: GfrEstimate['bound'] = 'exact', gates: readonly number[] = []): string {
  const edges = [...lowerEdges.map(([, edge]) => edge), ...gates]
  const agrees = (shown: number) => edges.every(edge => (shown >= edge) === (egfr >= edge))
  const whole = bound === 'at-least' ? Math.floor(egfr) : wholeGfr(egfr)
  const sign = bound === 'exact' ? '' : bound === 'at-least' ? '≥ ' : '≤ '
  if (agrees(whole)) return `${sign}${whole}`
  const decimals = [1, 2, 3].find(places => agrees(cutTo(egfr, places))) ?? 3
  return `${sign}${cutTo(egfr, decimals).toFixed(decimals)}`
}
