import { describe, expect, it } from 'vitest'
import { ageWords } from '#shared/domain/record/age-words'

const zone = 'America/Chicago'

describe('ageWords', () => {
  it.each([
    ['1965-03-14', '2026-12-01T15:00:00Z', '61 years'],
    ['2024-12-01', '2026-12-01T15:00:00Z', '2 years'],
    ['2024-12-02', '2026-12-01T15:00:00Z', '23 months'],
    ['2026-11-22', '2026-12-01T15:00:00Z', '9 days'],
    ['2026-11-30', '2026-12-01T15:00:00Z', '1 day'],
    ['1965', '2026-12-01T15:00:00Z', 'about 61 years'],
    ['2004-02-29', '2026-02-28T15:00:00Z', '21 years'],
    ['2027-01-01', '2026-12-01T15:00:00Z', 'age not known'],
    ['unknown', '2026-12-01T15:00:00Z', 'age not known'],
  ])('born %s is on %s "%s"', (birthDate, now, words) => {
    expect(ageWords(birthDate, now, zone)).toBe(words)
  })

  it('counts the day of the department, not that of Greenwich', () => {
    expect(ageWords('2024-12-01', '2026-12-01T03:00:00Z', zone)).toBe('23 months')
  })
})
