import fc from 'fast-check'
import { DateTime } from 'luxon'
import { describe, expect, it } from 'vitest'
import { daysBefore, readFhirTime } from '#server/ehr/fhir-time'
import { retryAfterOf } from '#server/ehr/transport'

describe('a FHIR time', () => {
  it.each([
    ['2026-11-10T23:30:00-08:00', '2026-11-11T07:30:00.000Z', 'instant'],
    ['2026-11-11T06:00:00+09:00', '2026-11-10T21:00:00.000Z', 'instant'],
    ['2026-11-11T06:00:00.123Z', '2026-11-11T06:00:00.123Z', 'instant'],
    // The clocks go back at 2 in the morning: the day still starts at midnight, summer time.
    ['2026-11-01', '2026-11-01T05:00:00.000Z', 'day'],
    // No zone names no instant: the older reading, the start of the day.
    ['2026-11-11T06:00:00', '2026-11-11T06:00:00.000Z', 'day'],
  ])('%s is %s', (text, at, precision) => {
    expect(readFhirTime(text, 'America/Chicago')).toEqual({ at, precision, text })
  })

  it.each(['2026-11', '2026', 'yesterday', '2026-02-30', '2026-11-11T25:00:00Z', ''])('%j says no day', (text) => {
    expect(readFhirTime(text, 'America/Chicago')).toMatchObject({ at: null, precision: 'unknown' })
  })

  it('compares as an instant whatever its offset', () => {
    fc.assert(fc.property(fc.date({ min: new Date('2000-01-01'), max: new Date('2040-01-01'), noInvalidDate: true }), fc.integer({ min: -14, max: 14 }), (date, hours) => {
      const sent = DateTime.fromJSDate(date, { zone: `UTC${hours < 0 ? '' : '+'}${hours}` }).toISO() ?? ''
      expect(readFhirTime(sent, 'Asia/Tokyo').at).toBe(date.toISOString())
    }))
  })

  it('counts days back over a month and a leap day', () => {
    expect(daysBefore('2028-03-01', 1)).toBe('2028-02-29')
  })
})

describe('a wait the server asks for', () => {
  const now = Date.parse('2026-12-01T13:00:00Z')
  it.each([
    ['3', 3_000], [' 120 ', 120_000], ['Tue, 01 Dec 2026 13:00:05 GMT', 5_000], ['Tue, 01 Dec 2026 12:00:00 GMT', 0], ['soon', null], [null, null],
  ])('%j is %s ms', (header, wait) => {
    expect(retryAfterOf(header, now)).toBe(wait)
  })
})
