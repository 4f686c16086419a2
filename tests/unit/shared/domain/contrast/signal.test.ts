import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { peakConcentration, signal } from '#shared/domain/contrast/signal'
import type { Sequence } from '#shared/domain/contrast/signal'

const tissue = { r10PerS: 0.3, r20PerS: 0.4, r1: 4, r2: 5 }
const spinEcho: Sequence = { kind: 'spin-echo', trMs: 500, teMs: 12 }

describe('the brightest concentration', () => {
  it('is brighter than its neighbors, for either sequence', () => {
    const times = fc.record({ trMs: fc.double({ min: 3, max: 900, noNaN: true }), teMs: fc.double({ min: 1, max: 20, noNaN: true }) })
    const sequence = fc.oneof(
      times.map((one): Sequence => ({ kind: 'spin-echo', ...one })),
      fc.tuple(times, fc.integer({ min: 2, max: 90 })).map(([one, flipDegrees]): Sequence => ({ kind: 'spoiled-gradient-echo', ...one, flipDegrees })),
    )
    fc.assert(fc.property(sequence, (one) => {
      const peak = peakConcentration(one, tissue)
      const best = signal(one, tissue, peak) * (1 + 1e-9)
      expect(signal(one, tissue, peak * 1.05 + 0.01)).toBeLessThanOrEqual(best)
      expect(signal(one, tissue, peak * 0.95)).toBeLessThanOrEqual(best)
    }))
  })

  it('moves up with a shorter TR or TE, and down with higher relaxivity', () => {
    const peak = peakConcentration(spinEcho, tissue)
    expect(peakConcentration({ ...spinEcho, trMs: 400 }, tissue)).toBeGreaterThan(peak)
    expect(peakConcentration({ ...spinEcho, teMs: 9 }, tissue)).toBeGreaterThan(peak)
    expect(peakConcentration(spinEcho, { ...tissue, r1: 8, r2: 10 })).toBeLessThan(peak)
  })

  it('is none where any agent only darkens', () => {
    expect(peakConcentration({ kind: 'spin-echo', trMs: 5000, teMs: 200 }, { ...tissue, r10PerS: 1 })).toBe(0)
  })
})

describe('a tube of water', () => {
  it('is as dark with far too much agent as with none', () => {
    expect(signal(spinEcho, tissue, 35)).toBeLessThan(signal(spinEcho, tissue, 0))
    expect(signal(spinEcho, tissue, 250)).toBeLessThan(1e-6)
  })
})
