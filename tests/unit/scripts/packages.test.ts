import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { markPackagesInstalled, matchesLock, packagesAreInstalled } from '../../../scripts/lib/packages.mjs'

const vue = { version: '3.5.45', integrity: 'sha512-a' }
const fsevents = { version: '2.3.3', integrity: 'sha512-b', optional: true }
const lock = { packages: { '': { version: '0.1.0' }, 'node_modules/vue': vue, 'node_modules/fsevents': fsevents } }

describe('comparing the installed packages with the lock', () => {
  it('is content without optional packages of other platforms', () => {
    expect(matchesLock(lock, { packages: { 'node_modules/vue': vue } })).toBe(true)
    expect(matchesLock(lock, { packages: { 'node_modules/vue': vue, 'node_modules/fsevents': fsevents } })).toBe(true)
  })

  it('notices a missing package, another version, other content and one too many', () => {
    expect(matchesLock(lock, { packages: {} })).toBe(false)
    expect(matchesLock(lock, { packages: { 'node_modules/vue': { ...vue, version: '3.5.44' } } })).toBe(false)
    expect(matchesLock(lock, { packages: { 'node_modules/vue': { ...vue, integrity: 'sha512-z' } } })).toBe(false)
    expect(matchesLock(lock, { packages: { 'node_modules/vue': vue, 'node_modules/left-pad': vue } })).toBe(false)
  })
})

describe('deciding whether npm ci is needed', () => {
  let root = ''
  const put = (path: string, content: unknown): void => writeFileSync(join(root, path), JSON.stringify(content))

  beforeEach(() => {
    root = mkdtempSync(join(tmpdir(), 'packages-'))
    put('package-lock.json', lock)
  })
  afterEach(() => rmSync(root, { recursive: true }))

  it('is needed in a fresh clone, and not after an installation by hand', () => {
    expect(packagesAreInstalled(root)).toBe(false)
    mkdirSync(join(root, 'node_modules'))
    put('node_modules/.package-lock.json', { packages: { 'node_modules/vue': vue } })
    expect(packagesAreInstalled(root)).toBe(true)
  })

  it('is needed again when the lock moves on, or when somebody changes what is installed', () => {
    mkdirSync(join(root, 'node_modules'))
    put('node_modules/.package-lock.json', { packages: { 'node_modules/vue': vue } })
    markPackagesInstalled(root)
    expect(packagesAreInstalled(root)).toBe(true)
    put('package-lock.json', { packages: { 'node_modules/vue': { ...vue, version: '3.6.0' } } })
    expect(packagesAreInstalled(root)).toBe(false)
    put('package-lock.json', lock)
    put('node_modules/.package-lock.json', { packages: { 'node_modules/vue': vue, 'node_modules/left-pad': vue } })
    expect(packagesAreInstalled(root)).toBe(false)
  })

  it('is needed when an installation broke off while writing', () => {
    mkdirSync(join(root, 'node_modules'))
    writeFileSync(join(root, 'node_modules/.package-lock.json'), '{"packages":')
    expect(packagesAreInstalled(root)).toBe(false)
  })
})
