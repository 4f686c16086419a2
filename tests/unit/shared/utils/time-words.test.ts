import { describe, expect, it } from 'vitest'
import { birthDateWords, clockWords, dateWords, dueWords, exactWords, momentWords, relativeWords, spanWords } from '#shared/utils/time-words'

const chicago = 'America/Chicago'
const now = '2026-12-01T16:00:00.000Z'

describe('times on a screen', () => {
  it('shows the department\'s clock, not the reader\'s', () => {
    expect(clockWords('2026-12-01T20:32:00.000Z', chicago)).toBe('14:32')
    expect(clockWords('2026-12-01T20:32:00.000Z', 'Asia/Kolkata')).toBe('02:02')
  })

  it('leaves out the year only while it is the present one', () => {
    expect(dateWords('2026-11-12T13:00:00.000Z', chicago, now)).toBe('12 Nov')
    expect(dateWords('2021-11-12T13:00:00.000Z', chicago, now)).toBe('12 Nov 2021')
  })

  it('takes the day in the department\'s zone', () => {
    expect(dateWords('2026-11-12T02:00:00.000Z', chicago, now)).toBe('11 Nov')
  })

  it('never moves a date that has no time', () => {
    expect(dateWords('2026-11-12', chicago, now)).toBe('12 Nov')
  })

  it('says the time alone for today and the day with it otherwise', () => {
    expect(momentWords('2026-12-01T15:10:00.000Z', chicago, now)).toBe('09:10')
    expect(momentWords('2026-11-30T15:10:00.000Z', chicago, now)).toBe('30 Nov, 09:10')
  })

  it('keeps seconds and zone for the title on hover', () => {
    expect(exactWords('2026-12-02T20:32:05.000Z', chicago)).toMatch(/^Wednesday 2 December 2026, 14:32:05 /)
  })

  it.each([
    ['2026-12-01T15:59:40.000Z', 'just now'],
    ['2026-12-01T15:58:00.000Z', '2 minutes ago'],
    ['2026-12-01T15:59:00.000Z', '1 minute ago'],
    ['2026-12-01T16:40:00.000Z', 'in 40 minutes'],
    ['2026-12-01T13:00:00.000Z', '3 hours ago'],
    ['2026-11-28T16:00:00.000Z', '3 days ago'],
  ])('says %s as "%s"', (moment, words) => {
    expect(relativeWords(moment, now)).toBe(words)
  })

  it.each([
    ['2026-12-01T16:40:00.000Z', 'due in 40 min'],
    ['2026-12-01T23:00:00.000Z', 'due today 17:00'],
    ['2026-12-03T23:00:00.000Z', 'due Thu'],
    ['2026-12-12T23:00:00.000Z', 'due 12 Dec'],
    ['2026-12-01T15:10:00.000Z', 'overdue since 09:10'],
  ])('says when %s is due: %s', (moment, words) => {
    expect(dueWords(moment, chicago, now)).toBe(words)
  })

  it('shows as much of a birth date as is known', () => {
    expect(birthDateWords('1965-03-04')).toBe('4 Mar 1965')
    expect(birthDateWords('1965-03')).toBe('Mar 1965')
    expect(birthDateWords('1965')).toBe('1965')
    expect(birthDateWords(null)).toBe('not known')
  })

  it('says a span in the unit people use', () => {
    expect([40, 60, 90, 240, 2880].map(spanWords)).toEqual(['40 minutes', '1 hour', '90 minutes', '4 hours', '2 days'])
  })
})
