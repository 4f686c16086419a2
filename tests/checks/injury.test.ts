import { describe, expect, it } from 'vitest'
import { assessInjury } from '#shared/domain/kidney/injury'
import type { InjuryInput, InjuryPoint } from '#shared/domain/kidney/injury'
import { parseInstant } from '#shared/domain/kidney/instant'
import { convertCreatinine } from '#shared/domain/kidney/units'
import { readTable } from '../support/csv'

/**
 * Acute kidney injury against a table of series computed independently.
 * Source: KDIGO Clinical Practice Guideline for AKI, Kidney Int Suppl 2012;2:1-138, definition and table 2; how a series is read
 * is a project convention.
 */
const dialysis: Record<string, InjuryInput['dialysis']> = { none: 'none', chronic: 'chronic', acute_rrt: 'acute-rrt' }

/** `instant=value;…`; in a mixed series each value carries its unit in brackets. */
function readSeries(text: string, unit: string): InjuryPoint[] {
  return text.split(';').filter(part => part !== '').map((part) => {
    const [instant = '', amount = ''] = part.split('=')
    const [, value = '', ownUnit] = /^([\d.]+)(?:\[(.+)\])?$/.exec(amount) ?? []
    const read = convertCreatinine(Number(value), ownUnit ?? unit)
    const atMs = parseInstant(instant)
    if (read.status !== 'ok' || atMs === null) throw new Error(`cannot read ${part}`)
    return { atMs, umolPerL: read.umolPerL, comparator: null }
  })
}

describe('acute kidney injury', () => {
  it.each(readTable('aki_series.csv').map(row => [row.text('id'), row] as const))('agrees with %s', (_id, row) => {
    const result = assessInjury({
      series: readSeries(row.text('series'), row.text('unit')), ageYears: row.number('age_years'), heightCm: row.number('height_cm'),
      dialysis: dialysis[row.text('dialysis')] ?? 'none',
    })
    const status = row.text('expected_status').replaceAll('_', '-')
    expect(result.status).toBe(status === 'no-aki' ? 'none' : status)
    expect(result.stageCurrent).toBe(row.number('expected_stage_current'))
    expect(result.stagePeak).toBe(row.number('expected_stage_peak'))
    const steady = row.text('expected_steady_state')
    expect(result.steady).toBe(steady === 'unknown' ? null : steady === 'true')
    expect(result.rule).toBe(row.text('rule'))
  })
})
