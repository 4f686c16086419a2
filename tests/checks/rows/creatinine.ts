import { assessInjury } from '#shared/domain/kidney/injury'
import type { InjuryInput, InjuryPoint } from '#shared/domain/kidney/injury'
import { parseInstant } from '#shared/domain/kidney/instant'
import { convertCreatinine } from '#shared/domain/kidney/units'
import { nearRelative, same, statusOf } from './row'
import type { RowCheck } from './row'

/** Units. Source of the factor 88.4: KDIGO CKD guideline 2012, SI note; spellings: UCUM and common practice. */
export const checkUnits: RowCheck = (row) => {
  const result = convertCreatinine(row.number('value'), row.text('unit_text'))
  const status = same('status', statusOf(row), result.status)
  if (status.length > 0 || result.status !== 'ok') return status
  return [
    ...nearRelative('mg/dL', row.number('expected_mg_dl'), result.mgPerDl, 1e-4),
    ...nearRelative('µmol/L', row.number('expected_umol_l'), result.umolPerL, 1e-4),
  ]
}

const dialysis = new Map<string, InjuryInput['dialysis']>([['none', 'none'], ['', 'none'], ['chronic', 'chronic'], ['acute_rrt', 'acute-rrt']])

/** `instant=value;…`; in a mixed series each value carries its unit in brackets. */
function readSeries(text: string, unit: string): InjuryPoint[] {
  return text.split(';').filter(part => part.trim() !== '').map((part) => {
    const [instant = '', amount = ''] = part.trim().split('=')
    const [, value = '', ownUnit] = /^([\d.]+)(?:\[(.+)\])?$/.exec(amount) ?? []
    const read = convertCreatinine(Number(value), ownUnit ?? unit)
    const atMs = parseInstant(instant)
    if (read.status !== 'ok' || atMs === null) throw new Error(`cannot read ${part}`)
    return { atMs, umolPerL: read.umolPerL, comparator: null }
  })
}

/** Acute injury. Source: KDIGO AKI guideline, Kidney Int Suppl 2012;2:1-138; how a series is read is a project convention. */
export const checkInjury: RowCheck = (row) => {
  const onDialysis = dialysis.get(row.text('dialysis'))
  if (onDialysis === undefined) throw new Error(`dialysis cannot be read: ${row.text('dialysis')}`)
  const result = assessInjury({
    series: readSeries(row.text('series'), row.text('unit')), ageYears: row.number('age_years'), heightCm: row.number('height_cm'), dialysis: onDialysis,
  })
  const status = statusOf(row)
  return [
    ...same('status', status === 'no-aki' ? 'none' : status, result.status),
    ...same('current stage', row.number('expected_stage_current'), result.stageCurrent),
    ...same('peak stage', row.number('expected_stage_peak'), result.stagePeak),
    ...same('steady', row.text('expected_steady_state'), result.steady === null ? 'unknown' : String(result.steady)),
    ...same('rule', row.text('rule'), result.rule),
  ]
}
