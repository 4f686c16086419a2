import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  bedsideSchwartz, ckdEpi2012CystatinC, ckdEpi2021Creatinine, ckdEpi2021CreatinineCystatinC, ckidU25Creatinine,
} from '#shared/domain/kidney/egfr'
import type { GfrResult } from '#shared/domain/kidney/egfr'

const sex = fc.constantFrom('female' as const, 'male' as const)
const adultAge = fc.integer({ min: 18, max: 110 })
const childAge = fc.double({ min: 1, max: 17.99, noNaN: true })
const creatinine = fc.double({ min: 0.1, max: 20, noNaN: true })
const rise = fc.double({ min: 1.001, max: 5, noNaN: true })

function value(result: GfrResult): number {
  if (result.status !== 'ok') throw new Error(result.status)
  return result.egfr
}

describe('every equation', () => {
  it('gives less for more creatinine', () => {
    fc.assert(fc.property(sex, adultAge, childAge, creatinine, rise, (who, adult, child, low, factor) => {
      const each = (mgPerDl: number) => {
        const amount = { value: mgPerDl, unit: 'mg/dL' }
        return [
          value(ckdEpi2021Creatinine({ ageYears: adult, sex: who, creatinine: amount })),
          value(ckdEpi2021CreatinineCystatinC({ ageYears: adult, sex: who, creatinineMgPerDl: mgPerDl, cystatinCMgPerL: 1 })),
          value(ckidU25Creatinine({ ageYears: child, sex: who, heightCm: 130, creatinine: amount })),
          value(bedsideSchwartz({ ageYears: child, heightCm: 130, creatinine: amount })),
        ]
      }
      const better = each(low)
      each(low * factor).forEach((worse, index) => expect(worse).toBeLessThan(better[index] ?? 0))
    }))
  })

  it('gives less for more cystatin C, and for a year more in adults', () => {
    fc.assert(fc.property(sex, adultAge, fc.double({ min: 0.2, max: 8, noNaN: true }), rise, (who, ageYears, low, factor) => {
      const at = (cystatinCMgPerL: number, age: number) => value(ckdEpi2012CystatinC({ ageYears: age, sex: who, cystatinCMgPerL }))
      expect(at(low * factor, ageYears)).toBeLessThan(at(low, ageYears))
      expect(at(low, ageYears + 1)).toBeLessThan(at(low, ageYears))
    }))
  })

  it('for adults gives less at every later age', () => {
    fc.assert(fc.property(sex, adultAge, fc.integer({ min: 1, max: 10 }), creatinine, fc.double({ min: 0.2, max: 8, noNaN: true }), (who, age, years, mgPerDl, cystatinCMgPerL) => {
      const at = (ageYears: number) => [
        value(ckdEpi2021Creatinine({ ageYears, sex: who, creatinine: { value: mgPerDl, unit: 'mg/dL' } })),
        value(ckdEpi2021CreatinineCystatinC({ ageYears, sex: who, creatinineMgPerDl: mgPerDl, cystatinCMgPerL })),
        value(ckdEpi2012CystatinC({ ageYears, sex: who, cystatinCMgPerL })),
      ]
      const younger = at(age)
      at(age + years).forEach((older, index) => expect(older).toBeLessThan(younger[index] ?? 0))
    }))
  })

  it('gives the same for mg/dL and µmol/L', () => {
    fc.assert(fc.property(sex, adultAge, creatinine, (who, ageYears, mgPerDl) => {
      const mass = value(ckdEpi2021Creatinine({ ageYears, sex: who, creatinine: { value: mgPerDl, unit: 'mg/dL' } }))
      const moles = value(ckdEpi2021Creatinine({ ageYears, sex: who, creatinine: { value: mgPerDl * 88.4, unit: '\u00B5mol/L' } }))
      expect(moles / mass).toBeCloseTo(1, 9)
    }))
  })
})

describe('an equation refuses', () => {
  it('an age over 120 as an error of the birth date', () => {
    expect(ckdEpi2021Creatinine({ ageYears: 121, sex: 'male', creatinine: { value: 1, unit: 'mg/dL' } }).status).toBe('age-out-of-range')
  })

  it.each([0, -120, Number.NaN])('a height of %d', (heightCm) => {
    expect(bedsideSchwartz({ ageYears: 8, heightCm, creatinine: { value: 1, unit: 'mg/dL' } }).status).toBe('needs-height')
  })

  it('a sex that it has no factor for', () => {
    expect(ckdEpi2021Creatinine({ ageYears: 40, sex: 'other', creatinine: { value: 1, unit: 'mg/dL' } }).status).toBe('needs-sex')
  })

  it.each([[0, 1], [1, 0], [-1, 1]])('a creatinine of %d with a cystatin C of %d', (creatinineMgPerDl, cystatinCMgPerL) => {
    expect(ckdEpi2021CreatinineCystatinC({ ageYears: 40, sex: 'male', creatinineMgPerDl, cystatinCMgPerL }).status).toBe('bad-value')
  })

  it('a creatinine without a unit', () => {
    expect(ckdEpi2021Creatinine({ ageYears: 40, sex: 'male', creatinine: { value: 1, unit: null } }).status).toBe('bad-unit')
  })
})
