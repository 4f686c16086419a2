import { describe, expect, it } from 'vitest'
import { pauseSeconds } from '#server/auth/throttle'

describe('the pause after wrong tries', () => {
  it('begins with the sixth, doubles, and never passes a quarter of an hour', () => {
    expect([6, 7, 8, 9, 10, 11, 50].map(pauseSeconds)).toEqual([30, 60, 120, 240, 480, 900, 900])
  })
})
