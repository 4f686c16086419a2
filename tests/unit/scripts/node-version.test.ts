import { describe, expect, it } from 'vitest'
import { satisfiesCaret } from '../../../scripts/lib/node-version.mjs'

describe('the check of the Node version', () => {
  it.each([
    ['v20.19.0', true],
    ['20.20.2', true],
    ['20.19.1-nightly', true],
    ['20.18.9', false],
    ['18.20.0', false],
    ['22.0.0', false],
  ])('judges %s against ^20.19.0: %s', (version, expected) => {
    expect(satisfiesCaret(version, '^20.19.0')).toBe(expected)
  })

  it('refuses a range that it cannot judge', () => {
    expect(() => satisfiesCaret('20.19.0', '>=20')).toThrow('Not a caret range')
  })
})
