import { mkdirSync } from 'node:fs'
import { dirname, join } from 'node:path'
import { fileURLToPath } from 'node:url'

/** The checkout. */
export const root = join(dirname(fileURLToPath(import.meta.url)), '..', '..')

/** Everything the two commands keep: `npm start` under `.data/`, `npm test` under `.data/test/`. Git ignores it. */
export const dataDir = join(root, '.data')
export const testDir = join(dataDir, 'test')

/** Makes a folder (and those above it) and returns its path. */
export function ensureDir(path) {
  mkdirSync(path, { recursive: true })
  return path
}
