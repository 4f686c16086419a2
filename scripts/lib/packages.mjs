import { createHash } from 'node:crypto'
import { existsSync, readFileSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'

const stampPath = (root) => join(root, 'node_modules', '.wherefore-lock')

const readJson = (path) => JSON.parse(readFileSync(path, 'utf8'))

/**
 * True when what npm says it installed (`node_modules/.package-lock.json`) is what the lock asks for: the same packages in the
 * same places with the same version and content hash. Optional packages may be missing: they are for other platforms.
 *
 * @param {{ packages: Record<string, { version?: string, integrity?: string, optional?: boolean, devOptional?: boolean }> }} lock
 * @param {{ packages: Record<string, { version?: string, integrity?: string }> }} installed
 */
export function matchesLock(lock, installed) {
  for (const [path, wanted] of Object.entries(lock.packages)) {
    if (path === '') continue
    const found = installed.packages[path]
    if (!found) {
      if (wanted.optional || wanted.devOptional) continue
      return false
    }
    if (found.version !== wanted.version || found.integrity !== wanted.integrity) return false
  }
  return Object.keys(installed.packages).every((path) => path === '' || path in lock.packages)
}

/**
 * True when `npm ci` has nothing to do. The stamp of our own last installation decides at once; without it (somebody ran
 * `npm ci` by hand) the two lock files are compared, and the stamp is then written.
 *
 * @param {string} root
 */
export function packagesAreInstalled(root) {
  const installedPath = join(root, 'node_modules', '.package-lock.json')
  if (!existsSync(installedPath)) return false
  const hash = stampOf(root)
  if (existsSync(stampPath(root)) && readFileSync(stampPath(root), 'utf8') === hash) return true
  try {
    if (!matchesLock(readJson(join(root, 'package-lock.json')), readJson(installedPath))) return false
  } catch {
    return false // A half-written lock counts as "not installed": npm ci makes it whole.
  }
  markPackagesInstalled(root)
  return true
}

/** Remembers which lock, and what npm made of it, the installation answers to. */
export function markPackagesInstalled(root) {
  writeFileSync(stampPath(root), stampOf(root))
}

/** Over both files, so that a later `npm install something` or `npm prune` is noticed too. */
function stampOf(root) {
  return createHash('sha256')
    .update(readFileSync(join(root, 'package-lock.json')))
    .update(readFileSync(join(root, 'node_modules', '.package-lock.json')))
    .digest('hex')
}
