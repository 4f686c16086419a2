#!/usr/bin/env node
/**
 * Compares the medicine with tables and cases from outside: `npm run check:medicine -- PATH...`. Runs from the sources, without a
 * build. The formats are described in DEVELOPERS.md.
 *
 * Prints what falls short, and for cases what was found beside what was expected; last `N passed, N failed`.
 * Exit code 0: all passed. 1: something failed. 2: called wrongly, or a file could not be read.
 */
import { readFileSync } from 'node:fs'
import { basename, join } from 'node:path'
import { loadSources } from './lib/load-sources.mjs'
import { root } from './lib/paths.mjs'

const paths = process.argv.slice(2)
if (paths.length === 0 || paths.some((path) => path.startsWith('-'))) {
  console.error('Usage: npm run check:medicine -- PATH...\nEach path is a check table (.csv) or a file of cases (.json), for instance tests/checks/tables/egfr_child.csv')
  process.exit(2)
}

const sources = await loadSources()
let passed = 0
let failed = 0
let unreadable = false
try {
  const { checkFile, Unreadable } = await sources.load(join(root, 'tests', 'checks', 'rows', 'report.ts'))
  for (const path of paths) {
    try {
      const report = checkFile(basename(path), readFileSync(path, 'utf8'))
      console.log(report.lines.join('\n'))
      passed += report.passed
      failed += report.failed
    } catch (error) {
      if (!(error instanceof Unreadable) && error.syscall === undefined) throw error
      unreadable = true
      console.error(error instanceof Unreadable ? `${path}: ${error.message}` : `${path} cannot be read (${error.code})`)
    }
  }
} finally {
  await sources.close()
}
console.log(`${passed} passed, ${failed} failed`)
process.exitCode = unreadable ? 2 : failed > 0 ? 1 : 0
