import { mkdirSync, mkdtempSync, rmSync, utimesSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { dirname, join } from 'node:path'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { fingerprint, isBuilt, markBuilt, sourceFiles } from '../../../scripts/lib/fingerprint.mjs'

let root = ''

function put(path: string, content: string): void {
  mkdirSync(dirname(join(root, path)), { recursive: true })
  writeFileSync(join(root, path), content)
}

beforeEach(() => {
  root = mkdtempSync(join(tmpdir(), 'fingerprint-'))
  put('app.vue', '<template><p /></template>')
  put('package-lock.json', '{}')
  put('nuxt.config.ts', 'export default {}')
  put('server/api/me.get.ts', 'export default 1')
})

afterEach(() => rmSync(root, { recursive: true }))

describe('the fingerprint of the sources', () => {
  it('changes with a source, a new file, a renamed file and the lock', () => {
    const seen = new Set([fingerprint(root)])
    put('server/api/me.get.ts', 'export default 2')
    seen.add(fingerprint(root))
    put('server/api/you.get.ts', 'export default 2')
    seen.add(fingerprint(root))
    rmSync(join(root, 'server/api/you.get.ts'))
    put('server/api/they.get.ts', 'export default 2')
    seen.add(fingerprint(root))
    put('package-lock.json', '{ "packages": {} }')
    seen.add(fingerprint(root))
    expect(seen.size).toBe(5)
  })

  it('stays the same when only times change, or files that never reach the server', () => {
    const before = fingerprint(root)
    utimesSync(join(root, 'app.vue'), 1, 1)
    put('tests/unit/some.test.ts', '')
    put('.data/postgres/base', 'x')
    put('.output/server/index.mjs', 'x')
    put('node_modules/vue/index.js', 'x')
    put('README.md', 'x')
    put('playwright.config.ts', 'x')
    expect(fingerprint(root)).toBe(before)
  })

  it('reads nested folders even when they are named like one left out at the top', () => {
    put('components/docs/Page.vue', '')
    put('docs/page.md', '')
    expect(sourceFiles(root)).toEqual(['app.vue', 'components/docs/Page.vue', 'nuxt.config.ts', 'package-lock.json', 'server/api/me.get.ts'])
  })

  it('counts a build only when it is finished and of these sources', () => {
    const output = join(root, '.output')
    expect(isBuilt(output, 'a')).toBe(false)
    put('.output/server/index.mjs', '')
    expect(isBuilt(output, 'a')).toBe(false)
    markBuilt(output, 'a')
    expect(isBuilt(output, 'a')).toBe(true)
    expect(isBuilt(output, 'b')).toBe(false)
  })
})
