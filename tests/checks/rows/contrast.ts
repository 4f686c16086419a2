import { findAgent, isIonic, netCharge, starterAgents } from '#shared/domain/contrast/agents'
import { concentrationFromPercent, dilutionFold, dilutionStockMl } from '#shared/domain/contrast/arthrography'
import { computeDose } from '#shared/domain/contrast/dose'
import { peakConcentration, signal } from '#shared/domain/contrast/signal'
import type { Sequence, Tissue } from '#shared/domain/contrast/signal'
import type { Agent } from '#shared/domain/contrast/types'
import type { CsvRow } from '../../support/csv'
import { near, nearRelative, same, statusOf } from './row'
import type { RowCheck } from './row'

function agentOf(row: CsvRow): Agent {
  const agent = starterAgents.find(({ id }) => id === row.text('agent'))
  if (agent === undefined) throw new Error(`no such agent: ${row.text('agent')}`)
  return agent
}

/**
 * Agents. Sources: US prescribing information, ACR and NKF (Radiology 2021;298:28-35), EMA 2017, Rohrer 2005
 * (Invest Radiol 40:715).
 */
export const checkAgent: RowCheck = (row) => {
  const agent = agentOf(row)
  const spellings = [agent.id, ...row.text('synonyms').split(';').map(name => name.trim()).filter(name => name !== '')]
  return [
    ...same('structure', row.text('structure'), agent.structure),
    ...same('ligand charge', row.number('ligand_charge'), agent.ligandCharge),
    ...same('net charge', row.number('net_charge'), netCharge(agent)),
    ...same('ionicity', row.text('ionicity'), isIonic(agent) ? 'ionic' : 'non-ionic'),
    ...same('ACR group', row.text('acr_group').replace('_', ' '), agent.acrGroup),
    ...same('concentration, mmol/mL', row.number('concentration_mmol_ml'), agent.concentrationMmolPerMl),
    ...same('dose, mmol/kg', row.number('dose_mmol_kg_adult'), agent.doseMmolPerKg),
    ...near('dose, mL/kg', row.number('dose_ml_kg_adult'), agent.doseMmolPerKg / agent.concentrationMmolPerMl, 1e-9),
    // Adults only is written as 18 in the table, and as "no labeled child" here.
    ...same('youngest labeled age', row.number('youngest_label_age_years_us'), agent.youngestLabelledAgeYears ?? 18),
    ...same('structure rank', row.number('structure_risk_rank'), agent.structureRank),
    ...same('taken up by the liver', row.text('ema_iv_status') === 'liver_only', agent.liverUptake),
    ...same('common in joints', row.text('intra_articular_common').startsWith('yes'), agent.intraArticularCommon),
    ...same('r1 at 1.5 T', row.number('r1_1_5t'), agent.relaxivity.r1At1_5T),
    ...same('r2 at 1.5 T', row.number('r2_1_5t'), agent.relaxivity.r2At1_5T),
    ...same('r1 at 3 T', row.number('r1_3t'), agent.relaxivity.r1At3T),
    ...same('r2 at 3 T', row.number('r2_3t'), agent.relaxivity.r2At3T),
    ...spellings.flatMap(name => [name, name.toUpperCase()]).flatMap(name => same(`found by ${name}`, agent.id, findAgent(name)?.id)),
  ]
}

/** Doses. Sources: label dosing tables of gadobutrol and gadoterate (US) and gadopiclenol (EU); else computed. */
export const checkDose: RowCheck = (row) => {
  const agent = agentOf(row)
  const result = computeDose({
    agent, weightKg: row.number('weight_kg'), ageYears: row.number('age_years'), doseMmolPerKg: row.number('dose_mmol_kg') ?? Number.NaN,
  })
  const shortfalls = [
    ...same('concentration, mmol/mL', row.number('concentration_mmol_ml'), agent.concentrationMmolPerMl),
    ...same('status', statusOf(row), result.status === 'ok' ? result.dose.checks[0] : result.status),
  ]
  if (result.status !== 'ok') return shortfalls
  return [
    ...shortfalls,
    ...near('mmol', row.number('expected_mmol'), result.dose.amountMmol, 1e-6),
    ...near('mL', row.number('expected_ml'), result.dose.volumeMl, 1e-6),
    ...same('mL as shown', row.text('expected_ml_display'), result.dose.volumeDisplay),
  ]
}

function need(row: CsvRow, column: string): number {
  const value = row.number(column)
  if (value === null || Number.isNaN(value)) throw new Error(`no ${column}`)
  return value
}

function sequenceOf(row: CsvRow): Sequence {
  const times = { trMs: need(row, 'tr_ms'), teMs: need(row, 'te_ms') }
  switch (row.text('sequence')) {
    case 'se': return { kind: 'spin-echo', ...times }
    case 'spgr': return { kind: 'spoiled-gradient-echo', ...times, flipDegrees: need(row, 'flip_deg') }
    default: throw new Error(`no such sequence: ${row.text('sequence')}`)
  }
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

/**
 * Signal and dilution. Sources: Bloch steady state (textbook), AJR 2005;184:1754, a public reference article on MR arthrogram
 * solution (0.1 mL in 20 mL), and the row of water tubes known from practice.
 */
export const checkSignal: RowCheck = (row) => {
  const kind = row.text('check_kind')
  const measure = measures[kind]
  if (measure === undefined) throw new Error(`no such check: ${kind}`)
  const value = measure(row)
  const expected = need(row, 'expected_value')
  const tolerance = row.text('tolerance')
  const bound = /^must be < ([\d.]+)$/.exec(tolerance)?.[1]
  if (tolerance === 'exact') return same(kind, expected, value)
  if (bound !== undefined) {
    return [
      ...(value < Number(bound) ? [] : [{ what: kind, expected: `below ${bound}`, actual: String(value) }]),
      ...near(kind, expected, value, 0.000005),
    ]
  }
  return tolerance.endsWith(' relative')
    ? nearRelative(kind, expected, value, Number.parseFloat(tolerance))
    : near(kind, expected, value, Number(tolerance))
}
