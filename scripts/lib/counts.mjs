/**
 * Reads how many checks passed and failed out of the runners' own reports. Whatever went wrong outside a test (a file that does
 * not load, an unhandled error, no test at all) counts as one failure: a run must never look green because nothing ran.
 *
 * @typedef {{ passed: number, failed: number, skipped: number }} Counts
 */

/**
 * @param {any} report what vitest's JSON reporter wrote, or null when it wrote nothing
 * @param {{ ok: boolean }} run whether the program ended with 0
 * @returns {Counts}
 */
export function vitestCounts(report, { ok }) {
  if (!report) return { passed: 0, failed: 1, skipped: 0 }
  const broken = report.testResults.filter(({ status, assertionResults }) => status === 'failed' && !assertionResults.some((test) => test.status === 'failed'))
  const failed = report.numFailedTests + broken.length
  return settle({ passed: report.numPassedTests, failed, skipped: report.numPendingTests + report.numTodoTests }, ok)
}

/**
 * @param {any} report what Playwright's JSON reporter wrote, or null when it wrote nothing
 * @param {{ ok: boolean }} run whether the program ended with 0
 * @returns {Counts}
 */
export function playwrightCounts(report, { ok }) {
  if (!report) return { passed: 0, failed: 1, skipped: 0 }
  const { expected, unexpected, flaky, skipped } = report.stats
  return settle({ passed: expected, failed: unexpected + flaky + (report.errors ?? []).length, skipped }, ok)
}

/** A program that only says yes or no is one check. */
export const verdictCounts = ({ ok }) => ({ passed: ok ? 1 : 0, failed: ok ? 0 : 1, skipped: 0 })

function settle(counts, ok) {
  const nothingRan = counts.passed + counts.failed === 0
  return counts.failed === 0 && (!ok || nothingRan) ? { ...counts, failed: 1 } : counts
}

/**
 * @param {Counts[]} all
 * @returns {Counts}
 */
export const sum = (all) =>
  all.reduce((total, one) => ({ passed: total.passed + one.passed, failed: total.failed + one.failed, skipped: total.skipped + one.skipped }), {
    passed: 0,
    failed: 0,
    skipped: 0,
  })

/** The last line of `npm test`. */
export const verdict = ({ passed, failed }) => `${passed} passed, ${failed} failed`
