import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { convertCreatinine, convertCystatinC } from '#shared/domain/kidney/units'

const spellings = ['mg/dL', 'MG/DL', 'mg/100 mL', 'mg%', 'mg/L', 'ug/dL', 'g/L', 'umol/L', '\u00B5mol/L', '\u03BCmol/L', ' umol / L ', 'uM', 'nmol/mL', 'mmol/L']

describe('creatinine units', () => {
  it.each(['mcmol/l', 'micromol/L', 'UMOL/L', '\u00B5M', '\u03BCM'])('reads %s as micromoles a liter', (unit) => {
    expect(convertCreatinine(88.4, unit)).toMatchObject({ status: 'ok', mgPerDl: 1, umolPerL: 88.4 })
  })

  it('does not take a micrometer for micromolar', () => {
    expect(convertCreatinine(80, 'um').status).toBe('bad-unit')
  })

  it.each([
    ['mg/g', 'urine ratio'], ['mg/mmol', 'urine ratio'], ['mmol/mol', 'urine ratio'], ['mg/g{creat}', 'urine ratio'],
    ['g/24.h', 'urine over time'], ['mmol/d', 'urine over time'], ['mg/24 hours', 'urine over time'],
    ['mL/min/{1.73_m2}', 'eGFR'], ['mL/min/1.73m\u00B2', 'eGFR'], ['mL/min', 'eGFR'],
    ['U/L', 'not a unit of creatinine in blood'], ['mg/mL', 'not a unit of creatinine in blood'],
  ])('refuses %s and says what it is', (unit, words) => {
    const result = convertCreatinine(1, unit)
    expect(result.status).toBe('bad-unit')
    expect(result.status === 'ok' ? '' : result.reason).toContain(words)
  })

  it.each([null, '', '  '])('never guesses an absent unit (%j)', (unit) => {
    expect(convertCreatinine(80, unit).status).toBe('missing-unit')
  })

  it.each([0, -1, Number.NaN, Number.POSITIVE_INFINITY])('refuses %d as a value', (value) => {
    expect(convertCreatinine(value, 'mg/dL').status).toBe('bad-value')
  })

  it('tells a missing value from a bad one', () => {
    expect(convertCreatinine(null, 'mg/dL').status).toBe('missing-value')
  })

  it('keeps mg/dL and µmol/L in step, whatever the spelling', () => {
    fc.assert(fc.property(fc.constantFrom(...spellings), fc.double({ min: 1e-3, max: 1e4, noNaN: true }), (unit, value) => {
      const result = convertCreatinine(value, unit)
      if (result.status !== 'ok') throw new Error(result.reason)
      const back = convertCreatinine(result.umolPerL, 'umol/L')
      if (back.status !== 'ok') throw new Error(back.reason)
      expect(back.mgPerDl / result.mgPerDl).toBeCloseTo(1, 12)
      expect(result.umolPerL / result.mgPerDl).toBeCloseTo(88.4, 9)
    }))
  })
})

describe('cystatin C units', () => {
  it.each([['mg/L', 1.2], ['MG/L', 1.2], ['mg/dL', 12], ['ug/mL', 1.2]])('reads 1.2 %s', (unit, mgPerL) => {
    expect(convertCystatinC(1.2, unit)).toMatchObject({ status: 'ok', mgPerL: expect.closeTo(mgPerL, 9) })
  })

  it('refuses moles, an absent unit and a value of zero', () => {
    expect(convertCystatinC(90, 'nmol/L').status).toBe('bad-unit')
    expect(convertCystatinC(1, null).status).toBe('missing-unit')
    expect(convertCystatinC(0, 'mg/L').status).toBe('bad-value')
  })
})
