import type { CsvRow } from '../../support/csv'
import { MissingColumn } from '../../support/csv'
import { checkAgent, checkDose, checkSignal } from './contrast'
import { checkInjury, checkUnits } from './creatinine'
import { checkChildGfr, checkCreatinineGfr, checkCystatinGfr, checkStage } from './egfr'
import type { RowCheck, Shortfall } from './row'

/** The kinds of table, by the beginning of their file names. */
const tableChecks: Record<string, RowCheck> = {
  egfr_ckdepi2021: checkCreatinineGfr,
  egfr_cystatin: checkCystatinGfr,
  egfr_child: checkChildGfr,
  creatinine_units: checkUnits,
  aki_series: checkInjury,
  ckd_stage: checkStage,
  agents: checkAgent,
  dose_volume: checkDose,
  signal_dilution: checkSignal,
}

/** The names a table's file name may begin with. */
export const tableNames = Object.keys(tableChecks)

/** The check for a table, by its file name: `egfr_child.csv`, and as well `egfr_child-ours.csv`. Null where none fits. */
export function checkFor(fileName: string): RowCheck | null {
  const name = tableNames.find(each => fileName.toLowerCase().startsWith(each))
  return name === undefined ? null : tableChecks[name] ?? null
}

/** What a row is called in a report. */
export function rowName(row: CsvRow): string {
  return row.optional('id') || row.optional('agent') || `record ${row.line}`
}

/** A row that cannot be read falls short by that; a missing column fails the table as a whole. */
export function checkRow(check: RowCheck, row: CsvRow): Shortfall[] {
  try {
    return check(row)
  }
  catch (error) {
    if (error instanceof MissingColumn) throw error
    return [{ what: 'row', expected: 'a row that can be checked', actual: error instanceof Error ? error.message : String(error) }]
  }
}
