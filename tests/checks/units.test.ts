import { UcumLhcUtils } from '@lhncbc/ucum-lhc'
import { describe, expect, it } from 'vitest'
import { convertCreatinine, convertCystatinC } from '#shared/domain/kidney/units'

/** Creatinine units against the unit library of the US National Library of Medicine, which knows nothing of ours. */
const ucum = UcumLhcUtils.getInstance()
const molecularWeight = 113.12

describe('creatinine units beside the National Library of Medicine\'s', () => {
  it.each(['mg/dL', 'mg/dl', 'mg%', 'mg/L', 'ug/mL', 'ug/dL', 'g/L', 'umol/L', 'mmol/L', 'nmol/mL'])('gives the same mg/dL and µmol/L for %s', (unit) => {
    for (const value of [0.04, 0.7, 1, 13, 88.4, 450]) {
      const ours = convertCreatinine(value, unit)
      const mass = ucum.convertUnitTo(unit, value, 'mg/dL', { molecularWeight })
      const moles = ucum.convertUnitTo(unit, value, 'umol/L', { molecularWeight })
      if (ours.status !== 'ok') throw new Error(ours.reason)
      expect(mass.status).toBe('succeeded')
      // The library's molar mass gives 88.4017 where KDIGO prints 88.4.
      expect(Math.abs(ours.mgPerDl / (mass.toVal ?? Number.NaN) - 1)).toBeLessThanOrEqual(1e-4)
      expect(Math.abs(ours.umolPerL / (moles.toVal ?? Number.NaN) - 1)).toBeLessThanOrEqual(1e-4)
    }
  })

  it.each(['mg/L', 'mg/dL', 'ug/mL'])('gives the same cystatin C for %s', (unit) => {
    const ours = convertCystatinC(1.3, unit)
    const theirs = ucum.convertUnitTo(unit, 1.3, 'mg/L')
    expect(ours.status === 'ok' ? ours.mgPerL : null).toBeCloseTo(theirs.toVal ?? Number.NaN, 9)
  })

  it.each(['mg/g', 'mg/mmol', 'mmol/mol', 'g/(24.h)', 'mL/min/{1.73_m2}', 'mL/min'])('refuses %s, which that library holds for a valid unit', (unit) => {
    expect(ucum.validateUnitString(unit).status).toBe('valid')
    expect(convertCreatinine(1, unit).status).toBe('bad-unit')
  })
})
