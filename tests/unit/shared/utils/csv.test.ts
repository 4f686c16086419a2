import { describe, expect, it } from 'vitest'
import { toCsv } from '#shared/utils/csv'

const one = (cell: string) => toCsv(['note'], [[cell]]).split('\r\n').slice(1).join('\r\n').replace(/\r\n$/, '')

describe('a table as CSV', () => {
  it('ends every line with CR LF, as RFC 4180 asks', () => {
    expect(toCsv(['exam', 'minutes'], [['MRI knee', 30], ['MRI brain', 40]])).toBe('exam,minutes\r\nMRI knee,30\r\nMRI brain,40\r\n')
  })

  it('quotes a cell with a comma, a quote or a line end and doubles the quotes inside', () => {
    expect(one('Rahman, Nadia')).toBe('"Rahman, Nadia"')
    expect(one('called "Nan"')).toBe('"called ""Nan"""')
    expect(one('first\nsecond')).toBe('"first\nsecond"')
  })

  it.each(['=1+1', '+441234', '-2', '@cmd', '\t=1'])('keeps %j as text in a spreadsheet', (cell) => {
    expect(one(cell)).toBe(`'${cell}`)
  })

  it('keeps text that begins like a formula as text when it is quoted too', () => {
    expect(one('=HYPERLINK("x","y")')).toBe('"\'=HYPERLINK(""x"",""y"")"')
  })

  it('leaves numbers alone and writes nothing for an empty cell', () => {
    expect(toCsv(['a', 'b'], [[-2.5, null]])).toBe('a,b\r\n-2.5,\r\n')
  })
})
