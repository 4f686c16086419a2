import { describe, expect, it } from 'vitest'
import { starterAgents } from '#shared/domain/contrast/agents'
import { computeDose } from '#shared/domain/contrast/dose'
import { readTable } from '../support/csv'

/**
 * Amounts and volumes against the label dosing tables of gadobutrol and gadoterate (US) and gadopiclenol (EU), and values
 * computed from weight, dose and strength.
 */
describe('dose by weight', () => {
  it.each(readTable('dose_volume.csv').map(row => [row.text('id'), row] as const))('agrees with %s', (_id, row) => {
    const agent = starterAgents.find(({ id }) => id === row.text('agent'))
    if (agent === undefined) throw new Error('no such agent')
    expect(agent.concentrationMmolPerMl).toBe(row.number('concentration_mmol_ml'))
    const result = computeDose({
      agent, weightKg: row.number('weight_kg'), ageYears: row.number('age_years'), doseMmolPerKg: row.number('dose_mmol_kg') ?? Number.NaN,
    })
    const status = row.text('expected_status').replaceAll('_', '-')
    expect(result.status === 'ok' ? result.dose.checks[0] : result.status).toBe(status)
    if (result.status !== 'ok') return
    expect(Math.abs(result.dose.amountMmol - (row.number('expected_mmol') ?? Number.NaN))).toBeLessThanOrEqual(1e-6)
    expect(Math.abs(result.dose.volumeMl - (row.number('expected_ml') ?? Number.NaN))).toBeLessThanOrEqual(1e-6)
    expect(result.dose.volumeDisplay).toBe(row.text('expected_ml_display'))
  })
})
