import { describe, expect, it } from 'vitest'
import { readNumber } from '#shared/utils/read-number'

describe('a typed number', () => {
  it('reads plain decimals, also with a decimal comma', () => {
    expect(readNumber('74')).toBe(74)
    expect(readNumber(' 0.94 ')).toBe(0.94)
    expect(readNumber('.9')).toBe(0.9)
    expect(readNumber('0,94')).toBe(0.94)
  })

  it('refuses what could mean two things, or no number', () => {
    for (const text of ['1,200', '1.2.3', '74 kg', '-3', '1e3', 'abc']) expect(readNumber(text)).toBeNaN()
  })

  it('tells nothing typed from something wrong', () => {
    expect(readNumber('  ')).toBeNull()
  })
})
