import { describe, expect, it } from 'vitest'
import { ageAt, sampleAgeWords } from '#shared/domain/kidney/age'

const chicago = 'America/Chicago'
const at = (text: string) => Date.parse(text)

describe('age at the sample', () => {
  it('counts completed years up to the birthday', () => {
    expect(ageAt('1970-06-15', at('2026-06-14T18:00:00Z'), chicago)?.youngest.completedYears).toBe(55)
    expect(ageAt('1970-06-15', at('2026-06-15T18:00:00Z'), chicago)?.youngest.completedYears).toBe(56)
  })

  it('counts the day in the department, not in Greenwich', () => {
    const lateEvening = at('2026-06-15T03:00:00Z')
    expect(ageAt('1970-06-15', lateEvening, chicago)?.youngest.completedYears).toBe(55)
    expect(ageAt('1970-06-15', lateEvening, 'UTC')?.youngest.completedYears).toBe(56)
  })

  it('makes a child born on 29 February one year older on 1 March', () => {
    expect(ageAt('2024-02-29', at('2025-02-28T18:00:00Z'), chicago)?.youngest.completedYears).toBe(0)
    expect(ageAt('2024-02-29', at('2025-03-01T18:00:00Z'), chicago)?.youngest.completedYears).toBe(1)
  })

  it('is decimal for children, and one on the first birthday', () => {
    expect(ageAt('2020-01-01', at('2026-07-02T18:00:00Z'), chicago)?.youngest.decimalYears).toBeCloseTo(6.5, 2)
    expect(ageAt('2025-03-01', at('2026-03-01T18:00:00Z'), chicago)?.youngest.decimalYears).toBe(1)
  })

  it('stays below 18 on the day before the 18th birthday', () => {
    const age = ageAt('2008-06-15', at('2026-06-14T18:00:00Z'), chicago)?.youngest
    expect(age?.completedYears).toBe(17)
    expect(age?.decimalYears).toBeLessThan(18)
  })

  it('gives both ends where only the year or the month is known', () => {
    const year = ageAt('1970', at('2026-06-14T18:00:00Z'), chicago)
    expect([year?.youngest.completedYears, year?.oldest.completedYears, year?.exact]).toEqual([55, 56, false])
    const month = ageAt('2024-02', at('2025-02-20T18:00:00Z'), chicago)
    expect([month?.youngest.completedYears, month?.oldest.completedYears]).toEqual([0, 1])
  })

  it.each(['', '15.06.1970', '1970-13-01', '1970-02-30', '70-06-15'])('gives none for %j', (text) => {
    expect(ageAt(text, at('2026-06-14T18:00:00Z'), chicago)).toBeNull()
  })

  it('gives none before birth, and an infant where birth may lie before', () => {
    expect(ageAt('2027-01-01', at('2026-06-14T18:00:00Z'), chicago)).toBeNull()
    expect(ageAt('2026', at('2026-06-14T18:00:00Z'), chicago)?.youngest.completedYears).toBe(0)
  })
})

describe('the age of a sample in words', () => {
  const now = at('2026-12-01T15:00:00Z')
  it.each([
    ['2026-12-01T13:00:00Z', 'today'], ['2026-12-01T04:00:00Z', 'yesterday'], ['2026-12-01T15:05:00Z', 'today'],
    ['2026-11-30T15:00:00Z', '1 day old'], ['2026-11-12T09:00:00Z', '19 days old'], ['2025-01-01T00:00:00Z', '699 days old'],
    ['2023-11-30T15:00:00Z', '3 years old'],
  ])('says of %s: %s', (collected, words) => {
    expect(sampleAgeWords(at(collected), now, chicago)).toBe(words)
  })
})
