import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { displayGfr, gfrStage } from '#shared/domain/kidney/stage'

describe('an eGFR on a screen', () => {
  it('never contradicts a category, or the department\'s gate', () => {
    const gate = fc.integer({ min: 5, max: 100 })
    const egfr = fc.oneof(fc.double({ min: 0.01, max: 200, noNaN: true }), gate.map(edge => edge - 1e-6), gate.map(edge => edge - 0.04), gate.map(edge => edge - 0.5))
    fc.assert(fc.property(egfr, gate, fc.constantFrom('exact' as const, 'at-least' as const, 'at-most' as const), (value, limit, bound) => {
      const shown = Number(displayGfr(value, bound, [limit]).replace(/^[^\d]+/, ''))
      expect(gfrStage(shown)).toBe(gfrStage(value))
      expect(shown < limit).toBe(value < limit)
      expect(Math.abs(shown - value)).toBeLessThanOrEqual(1)
    }), { numRuns: 2000 })
  })

  it.each([[29.999999, '29.9'], [8.7, '9'], [14.7, '14.7'], [59.95, '59.9']])('shows %d as %s', (value, shown) => {
    expect(displayGfr(value)).toBe(shown)
  })

  it('carries the sign of a bound and claims no more than is known', () => {
    expect(displayGfr(72.8, 'at-least')).toBe('≥ 72')
    expect(displayGfr(3.2, 'at-most')).toBe('≤ 3')
  })

  it('keeps to a gate that the department has moved', () => {
    expect(displayGfr(39.6)).toBe('40')
    expect(displayGfr(39.6, 'exact', [40])).toBe('39.6')
  })
})
