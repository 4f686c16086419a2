import type { CsvRow } from '../../support/csv'

/** One value of a row that is not as expected, both in words. */
export interface Shortfall { what: string, expected: string, actual: string }

/** Compares one row of a table with the product; empty where all of it holds. */
export type RowCheck = (row: CsvRow) => Shortfall[]

function shown(value: unknown): string {
  if (value === null || value === undefined || value === '') return 'none'
  return Array.isArray(value) ? value.map(shown).join(', ') : String(value)
}

/** The same value. */
export function same(what: string, expected: unknown, actual: unknown): Shortfall[] {
  return Object.is(expected, actual) ? [] : [{ what, expected: shown(expected), actual: shown(actual) }]
}

/** Numbers no further apart than the tolerance. A missing number is never near. */
export function near(what: string, expected: number | null, actual: number | null, tolerance: number): Shortfall[] {
  const close = expected !== null && actual !== null && Math.abs(actual - expected) <= tolerance
  return close ? [] : [{ what, expected: `${shown(expected)} ± ${tolerance}`, actual: shown(actual) }]
}

/** Numbers no further apart than this share of the expected one. */
export function nearRelative(what: string, expected: number | null, actual: number | null, share: number): Shortfall[] {
  const close = expected !== null && actual !== null && Math.abs(actual / expected - 1) <= share
  return close ? [] : [{ what, expected: `${shown(expected)} ± ${share * 100} %`, actual: shown(actual) }]
}

/** A status as tables write it, `bad_unit`, in the product's spelling. */
export function statusOf(row: CsvRow): string {
  return row.text('expected_status').replaceAll('_', '-')
}
