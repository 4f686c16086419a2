import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { chooseCreatinine, chooseCystatinC, displayMgPerDl } from '#shared/domain/kidney/creatinine'
import { observationStatuses } from '#shared/domain/kidney/types'
import type { LabReading } from '#shared/domain/kidney/types'
import { daysAgo, now, reading } from './sample'

function reasonFor(changes: Partial<LabReading>): string | undefined {
  return chooseCreatinine([reading(changes)], now).passedOver[0]?.reason
}

describe('the newest usable creatinine', () => {
  it('is the one collected last, not the one released last', () => {
    const older = reading({ collectedAt: daysAgo(20), issuedAt: daysAgo(1), value: 2 })
    const newer = reading({ collectedAt: daysAgo(5), issuedAt: daysAgo(5), value: 1.1 })
    const { chosen, series } = chooseCreatinine([older, newer], now)
    expect(chosen).toMatchObject({ reading: { id: newer.id }, mgPerDl: 1.1, ageDays: 5 })
    expect(series.map(point => point.mgPerDl)).toEqual([2, 1.1])
  })

  it('is found by moment, across zones', () => {
    const west = reading({ collectedAt: '2026-11-10T23:30:00-08:00', value: 1.3 })
    const east = reading({ collectedAt: '2026-11-11T06:00:00+09:00', value: 1.2 })
    expect(chooseCreatinine([west, east], now).chosen?.mgPerDl).toBe(1.3)
  })

  it('puts a result with a date only before a timed one of that day', () => {
    const day = reading({ collectedAt: '2026-11-20T06:00:00Z', precision: 'day', value: 1.2 })
    const timed = reading({ collectedAt: '2026-11-20T14:00:00Z', value: 1.4 })
    expect(chooseCreatinine([timed, day], now).chosen?.mgPerDl).toBe(1.4)
  })

  it('keeps the sign of a bound', () => {
    expect(chooseCreatinine([reading({ value: 0.2, comparator: '<' })], now).chosen).toMatchObject({ comparator: '<', mgPerDl: 0.2 })
  })

  it('does not count cystatin C', () => {
    const { chosen, passedOver } = chooseCreatinine([reading({ analyte: 'cystatin-c', unit: 'mg/L' })], now)
    expect([chosen, passedOver]).toEqual([null, []])
  })
})

describe('a creatinine that is passed over', () => {
  it.each<[string, Partial<LabReading>]>([
    ['Ordered, no result yet', { status: 'registered', value: null }],
    ['Not final yet', { status: 'preliminary' }],
    ['Cancelled by the laboratory', { status: 'cancelled' }],
    ['Entered in error', { status: 'entered-in-error' }],
    ['Its status is not known', { status: 'unknown' }],
    ['Collection time not known', { collectedAt: null, precision: 'unknown' }],
    ['Collection time not known', { collectedAt: '2026-11-20T14:00:00' }],
    ['Collection time lies in the future', { collectedAt: '2026-12-01T15:11:00Z' }],
    ['No usable value', { value: null }],
    ['The specimen is urine', { refusal: 'The specimen is urine', value: 60 }],
    ['The value is hidden', { refusal: 'The value is hidden', value: null }],
    ['Sent without a unit; it is not guessed from the size', { unit: null }],
    ['The value is not a positive number', { value: 0 }],
    ['0.05 mg/dL lies outside 0.1 to 30 mg/dL; a person must check it', { value: 0.05 }],
    ['62.00 mg/dL lies outside 0.1 to 30 mg/dL; it may be an eGFR filed as creatinine', { value: 62 }],
    ['450.00 mg/dL lies outside 0.1 to 30 mg/dL; a person must check it', { value: 450 }],
  ])('says: %s', (reason, changes) => {
    expect(reasonFor(changes)).toBe(reason)
  })

  it('says that an eGFR was filed as creatinine', () => {
    expect(reasonFor({ value: 62, unit: 'mL/min/{1.73_m2}' })).toContain('eGFR')
  })

  it('is not passed over for a clock ten minutes ahead', () => {
    expect(chooseCreatinine([reading({ collectedAt: '2026-12-01T15:10:00Z' })], now).chosen?.ageDays).toBe(0)
  })

  it('is marked, not dropped, where it may be an eGFR but can be true', () => {
    const { chosen, series } = chooseCreatinine([reading({ value: 18 })], now)
    expect([chosen?.mgPerDl, series[0]?.mayBeEgfr]).toEqual([18, true])
  })
})

describe('several results of one moment', () => {
  const at = daysAgo(3)
  it('yield to a correction, even to a better value', () => {
    const first = reading({ collectedAt: at, value: 2.4, status: 'final' })
    const corrected = reading({ collectedAt: at, value: 1.2, status: 'corrected' })
    const { chosen, passedOver } = chooseCreatinine([first, corrected], now)
    expect(chosen?.mgPerDl).toBe(1.2)
    expect(passedOver).toEqual([{ reading: first, reason: 'Replaced by a corrected result of the same sample' }])
  })

  it('yield to the latest of two corrections', () => {
    const first = reading({ collectedAt: at, value: 2.4, status: 'corrected', issuedAt: daysAgo(2) })
    const second = reading({ collectedAt: at, value: 1.2, status: 'corrected', issuedAt: daysAgo(1) })
    expect(chooseCreatinine([second, first], now).chosen?.mgPerDl).toBe(1.2)
  })

  it('are not revived where the correction took the value away', () => {
    const first = reading({ collectedAt: at, value: 0.9 })
    const corrected = reading({ collectedAt: at, value: null, status: 'corrected', refusal: 'The value is a text' })
    const { chosen, passedOver } = chooseCreatinine([first, corrected], now)
    expect(chosen).toBeNull()
    expect(passedOver.map(({ reason }) => reason).sort()).toEqual(['Replaced by a correction that has no usable value', 'The value is a text'])
  })

  it('are not hidden by a urine result of the same moment', () => {
    const urine = reading({ collectedAt: at, value: 60, status: 'corrected', refusal: 'The specimen is urine' })
    expect(chooseCreatinine([urine, reading({ collectedAt: at, value: 0.9 })], now).chosen?.mgPerDl).toBe(0.9)
  })

  it('leave the worse kidney function where two final ones differ, and mark it', () => {
    const { chosen, series } = chooseCreatinine([reading({ collectedAt: at, value: 1.1 }), reading({ collectedAt: at, value: 1.8 })], now)
    expect([chosen?.mgPerDl, series.length, series[0]?.hadRival]).toEqual([1.8, 1, true])
  })

  it('count once where they are the same result in two units', () => {
    const { series, passedOver } = chooseCreatinine([reading({ collectedAt: at, value: 1 }), reading({ collectedAt: at, value: 88, unit: 'umol/L' })], now)
    expect([series.length, series[0]?.hadRival, passedOver[0]?.reason]).toEqual([1, false, 'The same result, sent twice'])
  })

  it('are one where the same version was read twice', () => {
    const once = reading({ collectedAt: at })
    const { series, passedOver } = chooseCreatinine([once, { ...once }], now)
    expect([series.length, passedOver]).toEqual([1, []])
  })

  it('fall away where a later version of the same result withdraws it', () => {
    const first = reading({ collectedAt: at, issuedAt: daysAgo(2) })
    const { chosen } = chooseCreatinine([first, { ...first, status: 'entered-in-error', issuedAt: daysAgo(1) }], now)
    expect(chosen).toBeNull()
  })
})

describe('a creatinine in a sentence', () => {
  // 1.005 times 100 is a hair below 100.5 in floating point.
  it.each([[1, '1.00'], [1.005, '1.01'], [0.994, '0.99']])('shows %d as %s', (value, shown) => {
    expect(displayMgPerDl(value)).toBe(shown)
  })
})

describe('a series', () => {
  it('raises the question of mixed units where neighbors differ more than tenfold', () => {
    const jump = [reading({ value: 0.9, collectedAt: daysAgo(9) }), reading({ value: 12, collectedAt: daysAgo(2) })]
    expect(chooseCreatinine(jump, now).tenfoldJump).toBe(true)
    expect(chooseCreatinine([reading({ value: 1, collectedAt: daysAgo(9) }), reading({ value: 10, collectedAt: daysAgo(2) })], now).tenfoldJump).toBe(false)
  })

  it('does not depend on the order in which results arrive', () => {
    const anyReading = fc.record({
      id: fc.constantFrom('a', 'b', 'c', 'd', 'e'),
      value: fc.constantFrom(null, 0.9, 1, 1.6, 18, 62),
      unit: fc.constantFrom('mg/dL', 'umol/L', null),
      comparator: fc.constantFrom(null, '<' as const, '>' as const),
      status: fc.constantFrom(...observationStatuses),
      collectedAt: fc.constantFrom(null, daysAgo(1), daysAgo(2), daysAgo(-1)),
      issuedAt: fc.constantFrom(null, daysAgo(1), daysAgo(0)),
      refusal: fc.constantFrom(null, 'The value is a text'),
    }).map(changes => reading(changes))
    fc.assert(fc.property(
      fc.array(anyReading, { maxLength: 8 }).chain(list => fc.tuple(fc.constant(list), fc.shuffledSubarray(list, { minLength: list.length }))),
      ([list, shuffled]) => {
        // `sourceLabel` and the like are equal; only the order differs.
        expect(chooseCreatinine(shuffled, now)).toEqual(chooseCreatinine(list, now))
      },
    ), { numRuns: 500 })
  })
})

describe('cystatin C', () => {
  const cystatin = (value: number, collectedAt: string) => reading({ analyte: 'cystatin-c', unit: 'mg/L', value, collectedAt })
  it('is the one drawn nearest to the creatinine', () => {
    const near = chooseCystatinC([cystatin(1.1, daysAgo(10)), cystatin(2.2, daysAgo(4))], now, Date.parse(daysAgo(9)))
    expect(near.mgPerL).toBe(1.1)
  })

  it('counts at exactly seven days, not later', () => {
    const at = Date.parse(daysAgo(10))
    expect(chooseCystatinC([cystatin(1.1, daysAgo(3))], now, at).mgPerL).toBe(1.1)
    expect(chooseCystatinC([cystatin(1.1, daysAgo(2, 23))], now, at).mgPerL).toBeNull()
  })

  it('is questioned outside what is plausible', () => {
    expect(chooseCystatinC([cystatin(45, daysAgo(10))], now, Date.parse(daysAgo(10))).passedOver).toHaveLength(1)
  })
})
