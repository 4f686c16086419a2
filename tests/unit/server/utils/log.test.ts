import { describe, expect, it } from 'vitest'
import { describeError } from '#server/utils/log'

describe('errors in the log', () => {
  it('never quote what the database was handed', () => {
    const cause = Object.assign(new Error('invalid input syntax for type uuid: "Marta Lindqvist"'), { code: '22P02' })
    const error = new Error('Failed query: insert into patients values ($1)\nparams: Marta Lindqvist', { cause })
    const said = JSON.stringify(describeError(error))
    expect(said).not.toContain('Lindqvist')
    expect(said).toContain('22P02')
  })

  it('keep the words of mistakes in the program', () => {
    expect(describeError(new TypeError('x is not a function'))[0]).toMatchObject({ kind: 'TypeError', words: 'x is not a function' })
  })

  it('name the place', () => {
    expect(describeError(new Error('anything'))[0]?.at[0]).toContain('log.test')
  })
})
