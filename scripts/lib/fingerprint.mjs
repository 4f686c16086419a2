import { createHash } from 'node:crypto'
import { existsSync, readdirSync, readFileSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'

/** Top-level folders that never reach the built server. Folders and files that begin with a dot are left out everywhere. */
const notBuilt = new Set(['node_modules', 'tests', 'scripts', 'docs', 'fhir-fixtures', 'coverage', 'test-results', 'playwright-report'])

/** Top-level files that are tools' or readers' business. */
const notBuiltFile = /\.(md|log)$|^(vitest|playwright|eslint|drizzle)\.config\.|^LICENSE$/

/**
 * Lists the files that the build reads, relative to `root`, sorted.
 *
 * @param {string} root
 */
export function sourceFiles(root) {
  const files = []
  const walk = (folder) => {
    for (const entry of readdirSync(join(root, folder), { withFileTypes: true })) {
      const path = folder === '' ? entry.name : `${folder}/${entry.name}`
      if (entry.name.startsWith('.')) continue
      if (entry.isDirectory()) {
        if (folder === '' && notBuilt.has(entry.name)) continue
        walk(path)
      } else if (folder !== '' || !notBuiltFile.test(entry.name)) {
        files.push(path)
      }
    }
  }
  walk('')
  return files.sort()
}

/**
 * A hash over the names and contents of every file the build reads, and over the Node version. Contents, not times: a
 * checkout or a branch switched there and back must not cost a build.
 *
 * @param {string} root
 */
export function fingerprint(root) {
  const hash = createHash('sha256').update(process.version)
  for (const file of sourceFiles(root)) {
    const content = readFileSync(join(root, file))
    hash.update(`\0${file}\0${content.length}\0`).update(content)
  }
  return hash.digest('hex')
}

/** The stamp lies inside the output folder, which every build empties first: a build that broke off leaves none. */
const stamp = (output) => join(output, 'sources.sha256')

/** True when `output` holds a finished build of exactly these sources. */
export function isBuilt(output, print) {
  return existsSync(join(output, 'server', 'index.mjs')) && existsSync(stamp(output)) && readFileSync(stamp(output), 'utf8') === print
}

/** Marks a finished build. */
export function markBuilt(output, print) {
  writeFileSync(stamp(output), print)
}
