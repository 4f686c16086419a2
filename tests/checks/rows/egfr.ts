import {
  bedsideSchwartz, ckdEpi2012CystatinC, ckdEpi2021Creatinine, ckdEpi2021CreatinineCystatinC, ckidU25Creatinine,
} from '#shared/domain/kidney/egfr'
import type { GfrResult } from '#shared/domain/kidney/egfr'
import { displayGfr, gfrStage, wholeGfr } from '#shared/domain/kidney/stage'
import type { Sex } from '#shared/domain/kidney/types'
import type { CsvRow } from '../../support/csv'
import { near, same, statusOf } from './row'
import type { RowCheck, Shortfall } from './row'

/**
 * eGFR against outside tables. Sources: Inker 2021 (N Engl J Med 385:1737), Inker 2012 (N Engl J Med 367:20),
 * Pierce 2021 (Kidney Int 99:948), Schwartz 2009 (J Am Soc Nephrol 20:629).
 */
const sexes = new Map<string, Sex>([
  ['female', 'female'], ['f', 'female'], ['male', 'male'], ['m', 'male'], ['other', 'other'], ['x', 'other'], ['unknown', 'unknown'], ['', 'unknown'],
])

function sexOf(row: CsvRow): Sex {
  const sex = sexes.get(row.text('sex').toLowerCase())
  if (sex === undefined) throw new Error(`sex cannot be read: ${row.text('sex')}`)
  return sex
}

function compare(row: CsvRow, result: GfrResult): Shortfall[] {
  const status = same('status', statusOf(row), result.status)
  if (status.length > 0 || result.status !== 'ok') return status
  return [
    ...near('eGFR', row.number('expected_egfr'), result.egfr, 0.001),
    ...same('whole eGFR', row.number('expected_egfr_whole'), wholeGfr(result.egfr)),
  ]
}

const ageOf = (row: CsvRow) => row.number('age_years') ?? Number.NaN
const creatinineOf = (row: CsvRow) => ({ value: row.number('creatinine_value'), unit: row.text('creatinine_unit') })

/** CKD-EPI 2021 from creatinine. */
export const checkCreatinineGfr: RowCheck = row =>
  compare(row, ckdEpi2021Creatinine({ ageYears: ageOf(row), sex: sexOf(row), creatinine: creatinineOf(row) }))

/** CKD-EPI 2021 from creatinine and cystatin C, CKD-EPI 2012 from cystatin C. */
export const checkCystatinGfr: RowCheck = (row) => {
  const person = { ageYears: ageOf(row), sex: sexOf(row), cystatinCMgPerL: row.number('cystatin_c_mg_l') }
  switch (row.text('equation')) {
    case 'ckdepi2021_crcys': return compare(row, ckdEpi2021CreatinineCystatinC({ ...person, creatinineMgPerDl: row.number('creatinine_mg_dl') }))
    case 'ckdepi2012_cys': return compare(row, ckdEpi2012CystatinC(person))
    default: throw new Error(`no such equation: ${row.text('equation')}`)
  }
}

function childGfr(row: CsvRow): GfrResult {
  const input = { ageYears: ageOf(row), heightCm: row.number('height_cm'), creatinine: creatinineOf(row) }
  switch (row.text('equation')) {
    case 'ckid_u25_cr': return ckidU25Creatinine({ ...input, sex: sexOf(row) })
    case 'schwartz2009': return bedsideSchwartz(input)
    default: throw new Error(`no such equation: ${row.text('equation')}`)
  }
}

/** CKiD U25 and bedside Schwartz; a note may name what a published calculator prints. */
export const checkChildGfr: RowCheck = (row) => {
  const result = childGfr(row)
  const shortfalls = compare(row, result)
  if (result.status !== 'ok') return shortfalls
  const published = /to one decimal: ([\d.]+)$/.exec(row.optional('note'))?.[1]
  return [
    ...shortfalls,
    ...near('factor K', row.number('expected_k'), result.k, 0.00005),
    ...(published === undefined ? [] : same('published calculator', published, result.egfr.toFixed(1))),
  ]
}

/** GFR categories. Source: KDIGO CKD guideline 2012, kept in 2024; the gate on the unrounded value is a project convention. */
export const checkStage: RowCheck = (row) => {
  const egfr = row.number('egfr') ?? Number.NaN
  return [
    ...same('stage', row.text('expected_stage'), gfrStage(egfr)),
    ...same('below 30', row.text('expected_below_30'), String(egfr < 30)),
    ...same('display', row.text('expected_display'), displayGfr(egfr)),
    ...same('stage of the whole number', row.text('stage_if_rounded_first'), gfrStage(wholeGfr(egfr))),
  ]
}
