import { describe, expect, it } from 'vitest'
import { parseTestArguments } from '../../../scripts/lib/test-arguments.mjs'

describe('the command line of npm test', () => {
  it('runs every part when nothing is asked for', () => {
    expect(parseTestArguments([])).toEqual({ only: ['lint', 'typecheck', 'unit', 'integration', 'e2e'], filters: [] })
  })

  it('takes several parts in any spelling and keeps their order of running', () => {
    const only = ['lint', 'unit', 'e2e']
    expect(parseTestArguments(['--only', 'e2e', '--only', 'lint', '--only=unit']).only).toEqual(only)
    expect(parseTestArguments(['--only', 'unit,e2e,lint']).only).toEqual(only)
  })

  it('hands file filters to the runners', () => {
    expect(parseTestArguments(['--only', 'e2e', 'review', 'thread'])).toEqual({ only: ['e2e'], filters: ['review', 'thread'] })
  })

  it.each([[['--only']], [['--only', 'everything']], [['--watch']]])('refuses %j with the possible parts', (argv) => {
    expect(() => parseTestArguments(argv)).toThrow(/lint/)
  })
})
