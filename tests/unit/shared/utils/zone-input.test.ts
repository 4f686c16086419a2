import { describe, expect, it } from 'vitest'
import { fromZoneInput, toZoneInput } from '#shared/utils/zone-input'

describe('a date-and-time field in the department\'s zone', () => {
  it('shows and reads back the same instant', () => {
    expect(toZoneInput('2026-12-02T19:00:00.000Z', 'America/Chicago')).toBe('2026-12-02T13:00')
    expect(fromZoneInput('2026-12-02T13:00', 'America/Chicago')).toBe('2026-12-02T19:00:00.000Z')
  })

  it('takes a day alone as its start in the zone', () => {
    expect(fromZoneInput('2026-11-12', 'America/Chicago')).toBe('2026-11-12T06:00:00.000Z')
  })

  it('keeps an empty field empty', () => {
    expect(fromZoneInput('', 'America/Chicago')).toBeNull()
    expect(toZoneInput(null, 'America/Chicago')).toBeNull()
  })
})
