import { describe, expect, it } from 'vitest'
import { concentrationFromPercent, dilutionFold, dilutionStockMl } from '#shared/domain/contrast/arthrography'
import { peakConcentration, signal } from '#shared/domain/contrast/signal'
import type { Sequence, Tissue } from '#shared/domain/contrast/signal'
import { readTable } from '../support/csv'
import type { CsvRow } from '../support/csv'

/**
 * Signal and dilution against a table: Bloch steady state (textbook), AJR 2005;184:1754 and a public reference article on MR
 * arthrogram solution (0.1 mL in 20 mL), and the row of water tubes known from practice.
 */
function need(row: CsvRow, column: string): number {
  const value = row.number(column)
  if (value === null || Number.isNaN(value)) throw new Error(`line ${row.line}: no ${column}`)
  return value
}

function sequenceOf(row: CsvRow): Sequence {
  const times = { trMs: need(row, 'tr_ms'), teMs: need(row, 'te_ms') }
  return row.text('sequence') === 'se'
    ? { kind: 'spin-echo', ...times }
    : { kind: 'spoiled-gradient-echo', ...times, flipDegrees: need(row, 'flip_deg') }
}

function tissueOf(row: CsvRow): Tissue {
  return { r10PerS: need(row, 'r10_per_s'), r20PerS: need(row, 'r20_per_s'), r1: need(row, 'r1'), r2: need(row, 'r2') }
}

function tubes(row: CsvRow): { percent: number, signal: number }[] {
  return row.text('percent_v_v').split(';').map(Number).map(percent => ({
    percent,
    signal: signal(sequenceOf(row), tissueOf(row), concentrationFromPercent({ stockMmolPerMl: need(row, 'stock_mmol_ml'), percentByVolume: percent })),
  }))
}

const measures: Record<string, (row: CsvRow) => number> = {
  signal: row => signal(sequenceOf(row), tissueOf(row), need(row, 'concentration_mmol_l')),
  peak_concentration: row => peakConcentration(sequenceOf(row), tissueOf(row)),
  concentration_from_percent: row => concentrationFromPercent({ stockMmolPerMl: need(row, 'stock_mmol_ml'), percentByVolume: need(row, 'percent_v_v') }),
  dilution_stock_ml: row => dilutionStockMl({
    targetMmolPerL: need(row, 'target_mmol_l'), finalVolumeMl: need(row, 'final_volume_ml'), stockMmolPerMl: need(row, 'stock_mmol_ml'),
  }),
  dilution_fold: row => dilutionFold({ targetMmolPerL: need(row, 'target_mmol_l'), stockMmolPerMl: need(row, 'stock_mmol_ml') }),
  brightest_percent: row => tubes(row).reduce((best, tube) => (tube.signal > best.signal ? tube : best)).percent,
  high_percent_fraction: (row) => {
    const series = tubes(row)
    return Math.max(...series.filter(tube => tube.percent >= 25).map(tube => tube.signal)) / Math.max(...series.map(tube => tube.signal))
  },
}

describe('signal and dilution', () => {
  it.each(readTable('signal_dilution.csv').map(row => [row.text('id'), row] as const))('agree with %s', (_id, row) => {
    const value = measures[row.text('check_kind')]?.(row) ?? Number.NaN
    const expected = need(row, 'expected_value')
    const tolerance = row.text('tolerance')
    if (tolerance === 'exact') expect(value).toBe(expected)
    else if (tolerance === 'must be < 0.02') {
      expect(value).toBeLessThan(0.02)
      expect(value).toBeCloseTo(expected, 5)
    }
    else if (tolerance.endsWith(' relative')) expect(Math.abs(value / expected - 1)).toBeLessThanOrEqual(Number.parseFloat(tolerance))
    else expect(Math.abs(value - expected)).toBeLessThanOrEqual(Number(tolerance))
  })
})
