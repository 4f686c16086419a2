import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { starterAgents } from '#shared/domain/contrast/agents'
import { computeDose, displayVolume } from '#shared/domain/contrast/dose'

const gadoxetate = { doseMmolPerKg: 0.025, concentrationMmolPerMl: 0.25, youngestLabelledAgeYears: null }
const gadopiclenol = { doseMmolPerKg: 0.05, concentrationMmolPerMl: 0.5, youngestLabelledAgeYears: 2 }

function checksOf(input: Parameters<typeof computeDose>[0]) {
  const result = computeDose(input)
  return result.status === 'ok' ? result.dose.checks : result.status
}

describe('a dose by weight', () => {
  it.each([null, 0, -3, Number.NaN, Number.POSITIVE_INFINITY])('is not given for a weight of %s', (weightKg) => {
    expect(computeDose({ agent: gadopiclenol, weightKg, ageYears: 40 })).toEqual({ status: 'bad-weight' })
  })

  it('asks a person to confirm a weight outside the limits, not at them', () => {
    expect(['2.49', '2.5', '140', '140.1'].map(weight => checksOf({ agent: gadopiclenol, weightKg: Number(weight), ageYears: 40 })))
      .toEqual([['check-weight'], ['ok'], ['ok'], ['check-weight']])
    expect(checksOf({ agent: gadopiclenol, weightKg: 120, ageYears: 40, limitsKg: { low: 3, high: 110 } })).toEqual(['check-weight'])
  })

  it('marks an age below the label, beside an unusual weight', () => {
    expect(checksOf({ agent: gadopiclenol, weightKg: 2, ageYears: 1.9 })).toEqual(['age-below-label', 'check-weight'])
    expect(checksOf({ agent: gadopiclenol, weightKg: 12, ageYears: 2 })).toEqual(['ok'])
    expect(checksOf({ agent: gadoxetate, weightKg: 60, ageYears: 17 })).toEqual(['age-below-label'])
    expect(checksOf({ agent: gadoxetate, weightKg: 60, ageYears: null })).toEqual(['ok'])
  })

  it('grows with the weight, and the volume holds the amount', () => {
    fc.assert(fc.property(fc.double({ min: 1, max: 300, noNaN: true }), (weightKg) => {
      const result = computeDose({ agent: gadopiclenol, weightKg, ageYears: 40 })
      if (result.status !== 'ok') throw new Error(result.status)
      expect(result.dose.volumeMl * gadopiclenol.concentrationMmolPerMl).toBeCloseTo(weightKg * 0.05, 9)
    }))
  })
})

describe('the dose of any agent', () => {
  it('never falls with weight, neither worked out nor as shown', () => {
    fc.assert(fc.property(fc.constantFrom(...starterAgents), fc.double({ min: 0.5, max: 300, noNaN: true }), fc.double({ min: 0, max: 100, noNaN: true }), (agent, weightKg, more) => {
      const of = (kg: number) => {
        const result = computeDose({ agent, weightKg: kg, ageYears: 40 })
        if (result.status !== 'ok') throw new Error(result.status)
        return result.dose
      }
      const lighter = of(weightKg)
      const heavier = of(weightKg + more)
      expect(heavier.amountMmol).toBeGreaterThanOrEqual(lighter.amountMmol)
      expect(heavier.volumeMl).toBeGreaterThanOrEqual(lighter.volumeMl)
      expect(Number(heavier.volumeDisplay)).toBeGreaterThanOrEqual(Number(lighter.volumeDisplay))
    }))
  })
})

describe('a volume as shown', () => {
  it.each([[0.125, '0.13'], [2.48, '2.48'], [1.005, '1.01'], [4.99, '4.99'], [5, '5.0'], [7.25, '7.3'], [12.34, '12.3']])('shows %d as %s', (value, shown) => {
    expect(displayVolume(value)).toBe(shown)
  })

  it('is never off by more than half a step', () => {
    fc.assert(fc.property(fc.double({ min: 0, max: 60, noNaN: true }), (value) => {
      expect(Math.abs(Number(displayVolume(value)) - value)).toBeLessThanOrEqual(value < 5 ? 0.005001 : 0.05001)
    }))
  })
})
