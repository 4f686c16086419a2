import { describe, expect, it } from 'vitest'
import {
  bedsideSchwartz, ckdEpi2012CystatinC, ckdEpi2021Creatinine, ckdEpi2021CreatinineCystatinC, ckidU25Creatinine,
} from '#shared/domain/kidney/egfr'
import type { GfrResult } from '#shared/domain/kidney/egfr'
import { wholeGfr } from '#shared/domain/kidney/stage'
import type { Sex } from '#shared/domain/kidney/types'
import { readTable } from '../support/csv'
import type { CsvRow } from '../support/csv'

/**
 * eGFR against outside tables: values of the CKiD U25 online calculator, of the National Kidney Foundation calculator and of a
 * manual of the bedside formula, and values computed independently from the published formulas.
 * Sources: Inker 2021 (N Engl J Med 385:1737), Inker 2012 (N Engl J Med 367:20), Pierce 2021 (Kidney Int 99:948),
 * Schwartz 2009 (J Am Soc Nephrol 20:629).
 */
const sexes: Record<string, Sex> = { female: 'female', male: 'male', unknown: 'unknown', other: 'other' }

function sexOf(row: CsvRow): Sex {
  const sex = sexes[row.text('sex')]
  if (sex === undefined) throw new Error(`line ${row.line}: no such sex`)
  return sex
}

function expectRow(row: CsvRow, result: GfrResult): void {
  expect(result.status).toBe(row.text('expected_status').replaceAll('_', '-'))
  if (result.status !== 'ok') return
  expect(Math.abs(result.egfr - (row.number('expected_egfr') ?? Number.NaN))).toBeLessThanOrEqual(0.001)
  expect(wholeGfr(result.egfr)).toBe(row.number('expected_egfr_whole'))
}

describe('CKD-EPI 2021 from creatinine', () => {
  it.each(readTable('egfr_ckdepi2021.csv').map(row => [row.text('id'), row] as const))('agrees with %s', (_id, row) => {
    expectRow(row, ckdEpi2021Creatinine({
      ageYears: row.number('age_years') ?? Number.NaN, sex: sexOf(row),
      creatinine: { value: row.number('creatinine_value'), unit: row.text('creatinine_unit') },
    }))
  })
})

describe('cystatin C equations', () => {
  it.each(readTable('egfr_cystatin.csv').map(row => [row.text('id'), row] as const))('agree with %s', (_id, row) => {
    const ageYears = row.number('age_years') ?? Number.NaN
    const cystatinCMgPerL = row.number('cystatin_c_mg_l')
    const combined = row.text('equation') === 'ckdepi2021_crcys'
    expectRow(row, combined
      ? ckdEpi2021CreatinineCystatinC({ ageYears, sex: sexOf(row), creatinineMgPerDl: row.number('creatinine_mg_dl'), cystatinCMgPerL })
      : ckdEpi2012CystatinC({ ageYears, sex: sexOf(row), cystatinCMgPerL }))
  })
})

describe('equations for children', () => {
  it.each(readTable('egfr_child.csv').map(row => [row.text('id'), row] as const))('agree with %s', (_id, row) => {
    const input = {
      ageYears: row.number('age_years') ?? Number.NaN, heightCm: row.number('height_cm'),
      creatinine: { value: row.number('creatinine_value'), unit: row.text('creatinine_unit') },
    }
    const result = row.text('equation') === 'ckid_u25_cr' ? ckidU25Creatinine({ ...input, sex: sexOf(row) }) : bedsideSchwartz(input)
    expectRow(row, result)
    if (result.status === 'ok') expect(result.k).toBeCloseTo(row.number('expected_k') ?? Number.NaN, 4)
    const published = /to one decimal: ([\d.]+)$/.exec(row.text('note'))?.[1]
    if (published !== undefined && result.status === 'ok') expect(result.egfr.toFixed(1)).toBe(published)
  })
})
