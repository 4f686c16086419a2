import { describe, expect, it } from 'vitest'
import { unitWords } from '#shared/utils/unit-words'

describe('a lab unit in words', () => {
  it('is printed with the micro sign where its code has a plain u', () => {
    expect(unitWords('umol/L')).toBe('µmol/L')
  })

  it('stays as it is otherwise', () => {
    expect(unitWords('mg/dL')).toBe('mg/dL')
    expect(unitWords('µmol/L')).toBe('µmol/L')
  })
})
