import { describe, expect, it } from 'vitest'
import { findAgent, isIonic, netCharge, starterAgents } from '#shared/domain/contrast/agents'
import { agentIds } from '#shared/domain/contrast/types'
import { readTable } from '../support/csv'

/**
 * The agents against a table drawn from US prescribing information, ACR and NKF (Radiology 2021;298:28-35), EMA 2017 and
 * Rohrer 2005 (Invest Radiol 40:715).
 */
const rows = readTable('agents.csv')

describe('contrast agents', () => {
  it('are those of the table', () => {
    expect(rows.map(row => row.text('agent'))).toEqual([...agentIds])
    expect(starterAgents.map(agent => agent.id)).toEqual([...agentIds])
  })

  it.each(rows.map(row => [row.text('agent'), row] as const))('describe %s as the table does', (name, row) => {
    const agent = starterAgents.find(({ id }) => id === name)
    if (agent === undefined) throw new Error(`${name} is missing`)
    expect(agent.structure).toBe(row.text('structure'))
    expect(agent.ligandCharge).toBe(row.number('ligand_charge'))
    expect(netCharge(agent)).toBe(row.number('net_charge'))
    expect(isIonic(agent) ? 'ionic' : 'non-ionic').toBe(row.text('ionicity'))
    expect(agent.acrGroup).toBe(row.text('acr_group').replace('_', ' '))
    expect(agent.concentrationMmolPerMl).toBe(row.number('concentration_mmol_ml'))
    expect(agent.doseMmolPerKg).toBe(row.number('dose_mmol_kg_adult'))
    expect(agent.doseMmolPerKg / agent.concentrationMmolPerMl).toBeCloseTo(row.number('dose_ml_kg_adult') ?? Number.NaN, 9)
    // Adults only is written as 18 in the table, and as "no labelled child" here.
    expect(agent.youngestLabelledAgeYears ?? 18).toBe(row.number('youngest_label_age_years_us'))
    expect(agent.structureRank).toBe(row.number('structure_risk_rank'))
    expect(agent.liverUptake).toBe(row.text('ema_iv_status') === 'liver_only')
    expect(agent.intraArticularCommon).toBe(row.text('intra_articular_common').startsWith('yes'))
    expect(agent.relaxivity.r1At1_5T).toBe(row.number('r1_1_5t'))
    expect(agent.relaxivity.r2At1_5T).toBe(row.number('r2_1_5t'))
    expect(agent.relaxivity.r1At3T).toBe(row.number('r1_3t'))
    expect(agent.relaxivity.r2At3T).toBe(row.number('r2_3t'))
  })

  it.each(rows.flatMap(row => [row.text('agent'), ...row.text('synonyms').split('; ')].map(spelling => [spelling, row.text('agent')] as const)))(
    'are found by %s', (spelling, name) => {
      expect(findAgent(spelling)?.id).toBe(name)
      expect(findAgent(spelling.toUpperCase())?.id).toBe(name)
    },
  )
})
