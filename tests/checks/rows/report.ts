import { z } from 'zod'
import { parseTable } from '../../support/csv'
import type { Shortfall } from './row'
import { checkFor, checkRow, rowName, tableNames } from './tables'
import { vignetteSchema } from './vignette'
import { scoreVignette } from './vignette-score'

/** What checking one file gave. */
export interface FileReport { lines: string[], passed: number, failed: number }

/** A file that is neither a known table nor a list of cases, or cannot be read as one. */
export class Unreadable extends Error {
  override name = 'Unreadable'
}

/**
 * Checks a table or a vignette file by its name and content.
 *
 * @throws Unreadable
 */
export function checkFile(fileName: string, content: string): FileReport {
  const report = fileName.toLowerCase().endsWith('.json') ? checkVignettes(fileName, content) : checkTable(fileName, content)
  if (report.passed + report.failed === 0) throw new Unreadable(`${fileName} holds nothing to check`)
  return report
}

function words(shortfalls: readonly Shortfall[]): string[] {
  return shortfalls.map(({ what, expected, actual }) => `    ${what}: expected ${expected}, actual ${actual}`)
}

function checkTable(fileName: string, content: string): FileReport {
  const check = checkFor(fileName)
  if (check === null) throw new Unreadable(`${fileName} is no known table. A table's name begins with ${tableNames.join(', ')}; a file of cases ends with .json`)
  const lines: string[] = []
  const kinds = new Map<string, { passed: number, failed: number }>()
  try {
    for (const row of parseTable(fileName, content)) {
      const shortfalls = checkRow(check, row)
      const kind = row.optional('row_kind') || 'kind not stated'
      const count = kinds.get(kind) ?? { passed: 0, failed: 0 }
      count[shortfalls.length === 0 ? 'passed' : 'failed'] += 1
      kinds.set(kind, count)
      if (shortfalls.length > 0) lines.push(`  ${rowName(row)}, record ${row.line} (${kind})`, ...words(shortfalls))
    }
  }
  catch (error) {
    throw new Unreadable(error instanceof Error ? error.message : String(error))
  }
  const counts = [...kinds.values()]
  const byKind = [...kinds].map(([kind, { passed, failed }]) => `${kind.replaceAll('_', ' ')} ${passed} of ${passed + failed}`)
  return {
    lines: [`${fileName}: ${byKind.join(', ')} passed`, ...lines],
    passed: counts.reduce((sum, { passed }) => sum + passed, 0),
    failed: counts.reduce((sum, { failed }) => sum + failed, 0),
  }
}

function parseJson(fileName: string, content: string): unknown[] {
  let parsed: unknown
  try {
    parsed = JSON.parse(content.replace(/^\uFEFF/, ''))
  }
  catch {
    throw new Unreadable(`${fileName} is not JSON`)
  }
  const list = z.array(z.unknown()).safeParse(parsed)
  if (!list.success) throw new Unreadable(`${fileName} is not a list of cases`)
  return list.data
}

function checkVignettes(fileName: string, content: string): FileReport {
  const lines: string[] = []
  let passed = 0
  let failed = 0
  parseJson(fileName, content).forEach((item, index) => {
    const read = vignetteSchema.safeParse(item)
    if (!read.success) {
      failed += 1
      lines.push(`  case ${index + 1}: FAILED, it cannot be read`, ...read.error.issues.map(issue => `    ${issue.path.join('.')}: ${issue.message}`))
      return
    }
    const { shortfalls, beside } = scoreVignette(read.data)
    if (shortfalls.length === 0) passed += 1
    else failed += 1
    const verdict = shortfalls.length === 0 ? 'passed' : `FAILED${read.data.arguable === true ? ' (experts differ)' : ''}`
    lines.push(`  ${read.data.id}: ${verdict}`, ...words(shortfalls), ...beside.map(line => `      ${line}`))
  })
  return { lines: [`${fileName}: ${passed} of ${passed + failed} cases passed; findings and needs are listed to be compared, not scored`, ...lines], passed, failed }
}
