import { describe, expect, it } from 'vitest'
import { displayGfr, gfrStage, wholeGfr } from '#shared/domain/kidney/stage'
import { readTable } from '../support/csv'

/** Categories. Source: KDIGO CKD guideline 2012, kept in 2024; the gate on the unrounded value is a project convention. */
describe('GFR categories', () => {
  it.each(readTable('ckd_stage.csv').map(row => [row.text('id'), row] as const))('agree with %s', (_id, row) => {
    const egfr = row.number('egfr') ?? Number.NaN
    expect(gfrStage(egfr)).toBe(row.text('expected_stage'))
    expect(egfr < 30).toBe(row.text('expected_below_30') === 'true')
    expect(displayGfr(egfr)).toBe(row.text('expected_display'))
    expect(gfrStage(wholeGfr(egfr))).toBe(row.text('stage_if_rounded_first'))
  })
})
