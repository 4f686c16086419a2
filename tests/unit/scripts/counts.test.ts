import { describe, expect, it } from 'vitest'
import { playwrightCounts, sum, verdict, verdictCounts, vitestCounts } from '../../../scripts/lib/counts.mjs'

const test = (status: string) => ({ status })
const vitest = (passed: number, failed: number, testResults: unknown[] = []) =>
  ({ numPassedTests: passed, numFailedTests: failed, numPendingTests: 0, numTodoTests: 0, testResults })
const playwright = (expected: number, unexpected: number, more: object = {}) =>
  ({ stats: { expected, unexpected, flaky: 0, skipped: 0 }, errors: [], ...more })

describe('counting what vitest reports', () => {
  it('counts passed and failed tests', () => {
    const results = [{ status: 'failed', assertionResults: [test('failed'), test('passed')] }]
    expect(vitestCounts(vitest(7, 1, results), { ok: false })).toEqual({ passed: 7, failed: 1, skipped: 0 })
  })

  it('counts a file that does not load as a failure', () => {
    const results = [{ status: 'failed', assertionResults: [] }, { status: 'passed', assertionResults: [test('passed')] }]
    expect(vitestCounts(vitest(1, 0, results), { ok: false })).toMatchObject({ passed: 1, failed: 1 })
  })

  it('counts an error outside of any test as a failure', () => {
    expect(vitestCounts(vitest(9, 0), { ok: false })).toMatchObject({ passed: 9, failed: 1 })
  })

  it('fails when no test ran or no report was written', () => {
    expect(vitestCounts(vitest(0, 0), { ok: true })).toMatchObject({ passed: 0, failed: 1 })
    expect(vitestCounts(null, { ok: true })).toMatchObject({ passed: 0, failed: 1 })
  })
})

describe('counting what Playwright reports', () => {
  it('counts passed, failed and skipped tests', () => {
    const report = { stats: { expected: 5, unexpected: 2, flaky: 0, skipped: 1 }, errors: [] }
    expect(playwrightCounts(report, { ok: false })).toEqual({ passed: 5, failed: 2, skipped: 1 })
  })

  it('counts an error outside of any test, no test and no report as a failure', () => {
    expect(playwrightCounts(playwright(3, 0, { errors: [{ message: 'cannot load' }] }), { ok: false })).toMatchObject({ passed: 3, failed: 1 })
    expect(playwrightCounts(playwright(0, 0), { ok: true })).toMatchObject({ failed: 1 })
    expect(playwrightCounts(null, { ok: false })).toMatchObject({ failed: 1 })
  })
})

describe('the last line', () => {
  it('adds up all parts, a yes-or-no part counting as one', () => {
    const total = sum([verdictCounts({ ok: true }), verdictCounts({ ok: false }), { passed: 40, failed: 0, skipped: 2 }])
    expect(verdict(total)).toBe('41 passed, 1 failed')
  })
})
