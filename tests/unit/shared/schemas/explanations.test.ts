import { describe, expect, it } from 'vitest'
import { explanationFormSchema } from '#shared/schemas/explanations'

const birth = (month: string, day: string, year: string) => explanationFormSchema.safeParse({ month, day, year }).data?.birthDate ?? null

describe('a date of birth in three fields', () => {
  it('takes one or two digits and stray spaces', () => {
    expect([birth('3', '4', '1965'), birth('12', ' 24 ', '2001')]).toEqual(['1965-03-04', '2001-12-24'])
  })

  it('refuses a day that the month does not have', () => {
    expect([birth('2', '30', '1965'), birth('2', '29', '2001'), birth('2', '29', '2000')]).toEqual([null, null, '2000-02-29'])
  })

  it.each([['', '4', '1965'], ['3', 'x', '1965'], ['3', '4', '65'], ['3', '4', '-965']])('refuses %j %j %j', (month, day, year) => {
    expect(birth(month, day, year)).toBeNull()
  })
})
