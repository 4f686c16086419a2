import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { assessInjury, isAcute } from '#shared/domain/kidney/injury'
import type { InjuryInput, InjuryPoint } from '#shared/domain/kidney/injury'

const hour = 3_600_000
const point = (hours: number, mgPerDl: number, comparator: InjuryPoint['comparator'] = null): InjuryPoint =>
  ({ atMs: hours * hour, umolPerL: mgPerDl * 88.4, comparator })
const judge = (series: InjuryPoint[], more: Partial<InjuryInput> = {}) =>
  assessInjury({ series, ageYears: 50, heightCm: null, dialysis: 'none', ...more })

describe('acute kidney injury', () => {
  it('takes the higher of two results of one moment', () => {
    expect(judge([point(0, 1), point(24, 1), point(24, 1.4)]).status).toBe('aki')
  })

  it('takes presumed injury before a recent one', () => {
    // Usual level 1.0; 3.0 six days before the end came after 1.4, and the 1.6 at the end is still above the usual level.
    const series = [point(0, 1), point(24 * 10, 1), point(24 * 30, 1.4), point(24 * 33, 3), point(24 * 39, 1.6)]
    expect(judge(series)).toMatchObject({ status: 'aki-presumed', stageCurrent: 1, stagePeak: 2, steady: false })
  })

  it('forgets an episode of months ago that has settled', () => {
    const series = [point(0, 1), point(24, 2), point(24 * 100, 1), point(24 * 130, 1)]
    expect(judge(series)).toMatchObject({ status: 'none', stageCurrent: 0, stagePeak: 2, steady: true })
  })

  it('stages a presumed injury by 4.0 mg/dL as well', () => {
    expect(judge([point(0, 2.5), point(24 * 20, 4.1)])).toMatchObject({ status: 'aki-presumed', stageCurrent: 3 })
  })

  it('needs a height for the stage that rests on a child\'s eGFR', () => {
    const series = [point(0, 0.8), point(48, 1.6)]
    expect(judge(series, { ageYears: 8 }).stageCurrent).toBe(2)
    expect(judge(series, { ageYears: 8, heightCm: 128 }).stageCurrent).toBe(3)
  })

  it('cannot be ruled out from limits, but can be found in them', () => {
    expect(judge([point(0, 0.2, '<'), point(24, 0.2, '<')])).toMatchObject({ status: 'insufficient', steady: null })
    expect(judge([point(0, 0.2, '<'), point(24, 0.6)]).status).toBe('aki')
  })

  it('says in words what was met', () => {
    expect(judge([point(0, 1), point(24, 3.2)]).text).toBe(
      'Acute kidney injury, stage 3: creatinine rose by 0.3 mg/dL or more within 48 hours; creatinine rose to 3 times or more within 7 days',
    )
  })

  it('does not depend on the order of the series', () => {
    const series = fc.array(fc.tuple(fc.integer({ min: 0, max: 24 * 30 }), fc.constantFrom(0.6, 0.9, 1, 1.3, 2, 4)).map(([at, value]) => point(at, value)), { maxLength: 8 })
    fc.assert(fc.property(series.chain(list => fc.tuple(fc.constant(list), fc.shuffledSubarray(list, { minLength: list.length }))), ([list, shuffled]) => {
      expect(judge(shuffled)).toEqual(judge(list))
    }))
  })
})

describe('an estimate that must not be relied on', () => {
  it('is one with injury now, presumed or recent, or a falling creatinine', () => {
    expect(isAcute(judge([point(0, 1), point(24, 1.4)]))).toBe(true)
    expect(isAcute(judge([point(0, 1), point(24 * 20, 1.6)]))).toBe(true)
    expect(isAcute(judge([point(0, 1), point(48, 2.2), point(24 * 5, 1.2)]))).toBe(true)
    expect(isAcute(judge([point(0, 2.4), point(48, 1.6)]))).toBe(true)
  })

  it('is not one with a steady or a single result, or on dialysis', () => {
    expect(isAcute(judge([point(0, 1), point(24, 1.1)]))).toBe(false)
    expect(isAcute(judge([point(0, 1)]))).toBe(false)
    expect(isAcute(judge([point(0, 6), point(24, 7.5)], { dialysis: 'chronic' }))).toBe(false)
  })
})
