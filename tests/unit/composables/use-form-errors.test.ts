import { describe, expect, it } from 'vitest'
import { z } from 'zod'
import { pathText, problemsOf, useFormErrors } from '~/composables/use-form-errors'
import { typedSchema } from '~/composables/use-zod-form'

const schema = z.object({ readings: z.array(z.object({ value: z.number({ error: 'Give a number.' }) })), name: z.string().min(1, 'Give a name.') })

describe('errors of a form', () => {
  it('names a field inside a list as forms write it', () => {
    expect(pathText(['typedReadings', 0, 'value'])).toBe('typedReadings[0].value')
  })

  it('keeps the first thing wrong with each field', () => {
    expect(problemsOf([{ path: ['a'], message: 'one' }, { path: ['a'], message: 'two' }])).toEqual([{ path: 'a', message: 'one' }])
  })

  it('moves to the summary on each refused try and forgets a field once it is mended', () => {
    const errors = useFormErrors()
    expect(errors.check(schema, { readings: [], name: '' })).toBeNull()
    expect(errors.attempt.value).toBe(1)
    expect(errors.of('name')).toBe('Give a name.')
    errors.clear('name')
    expect(errors.hasErrors.value).toBe(false)
  })

  it('hands over parsed values when nothing is wrong', () => {
    expect(useFormErrors().check(schema, { readings: [{ value: 1 }], name: 'x' })).toEqual({ readings: [{ value: 1 }], name: 'x' })
  })

  it('lets vee-validate see zod\'s messages by path', async () => {
    const result = await typedSchema(schema).parse({ readings: [{ value: Number.NaN }], name: '' })
    expect(result.errors).toEqual(expect.arrayContaining([
      { path: 'readings[0].value', errors: ['Give a number.'] },
      { path: 'name', errors: ['Give a name.'] },
    ]))
  })
})
