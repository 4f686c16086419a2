import { readFileSync, readdirSync } from 'node:fs'
import { dirname, join, posix } from 'node:path'
import { fileURLToPath } from 'node:url'
import { describe, expect, it } from 'vitest'

/**
 * "Who may import whom", walked over every import of the checkout. The lint rules say the same; this reads the files by itself,
 * resolves each import to the file's place, and so notices what a pattern on the written words would miss.
 */
const root = join(dirname(fileURLToPath(import.meta.url)), '..', '..', '..')

const topFolders = ['components', 'composables', 'layouts', 'middleware', 'pages', 'plugins', 'server', 'shared', 'stores']

interface Import { from: string, to: string }

function sources(folder: string): string[] {
  const found: string[] = []
  for (const entry of readdirSync(join(root, folder), { withFileTypes: true })) {
    const path = `${folder}/${entry.name}`
    if (entry.isDirectory()) found.push(...sources(path))
    else if (/\.(ts|mjs|vue)$/.test(entry.name)) found.push(path)
  }
  return found
}

/** A file's place below the checkout for our own code, else the package's name as written. */
function resolveImport(from: string, written: string): string {
  const alias = /^(#shared|#server|~~|~|@@|@)(?:\/(.*))?$/.exec(written)
  if (alias && !/^@[a-z]/.test(written)) {
    const base = alias[1] === '#shared' ? 'shared/' : alias[1] === '#server' ? 'server/' : ''
    return `${base}${alias[2] ?? ''}`
  }
  if (!written.startsWith('.')) return `package:${written}`
  return posix.normalize(`${posix.dirname(from)}/${written}`)
}

function importsOf(file: string): Import[] {
  const code = readFileSync(join(root, file), 'utf8').replace(/\/\*[\s\S]*?\*\//g, '')
  const written = [
    ...code.matchAll(/^\s*(?:import|export)\b[^'"\n;]*?(?:\{[^}]*\}[^'"\n;]*?)?from\s*['"]([^'"]+)['"]/gm),
    ...code.matchAll(/^\s*import\s*['"]([^'"]+)['"]/gm),
    ...code.matchAll(/\bimport\(\s*['"]([^'"]+)['"]\s*\)/g),
  ].flatMap(match => match[1] ?? [])
  return written.map(to => ({ from: file, to: resolveImport(file, to) }))
}

const existing = readdirSync(root, { withFileTypes: true }).filter(entry => entry.isDirectory()).map(entry => entry.name)
const files = topFolders.filter(folder => existing.includes(folder)).flatMap(sources)
const imports = files.flatMap(importsOf)

const below = (...places: string[]) => (path: string): boolean => places.some(place => path === place || path.startsWith(`${place}/`))
const packages = (...names: string[]) => (path: string): boolean => below(...names.map(name => `package:${name}`))(path)

/** Sentences such as `server/api/x.ts → server/database/client` for every import that breaks the rule. */
function breaking(from: (path: string) => boolean, forbidden: (path: string, from: string) => boolean): string[] {
  return imports.filter(one => from(one.from) && forbidden(one.to, one.from)).map(one => `${one.from} → ${one.to}`)
}

const http = packages('h3', 'nitropack', '#imports', '#nitro')
const screens = below('pages', 'layouts', 'components', 'composables', 'stores', 'middleware')

describe('who may import whom', () => {
  it('reads imports of every kind', () => {
    expect(files.length).toBeGreaterThan(20)
    expect(imports.some(one => one.to.startsWith('shared/domain/'))).toBe(true)
    expect(imports.some(one => one.to === 'package:drizzle-orm')).toBe(true)
  })

  it('keeps the domain pure: luxon, and minisearch for questions, are its only packages', () => {
    expect(breaking(below('shared/domain'), (to, from) =>
      !below('shared/domain')(to) && to !== 'package:luxon' && !(to === 'package:minisearch' && below('shared/domain/guidance')(from)))).toEqual([])
  })

  it('lets rules of the domain build on lower rules only', () => {
    const order = {
      kidney: [],
      contrast: ['kidney'],
      policy: [],
      access: [],
      record: ['kidney'],
      guidance: ['kidney', 'contrast'],
      safety: ['kidney', 'contrast'],
      assessment: ['guidance', 'safety', 'kidney', 'contrast', 'policy', 'record'],
      request: ['policy', 'access', 'safety'],
      booking: ['policy', 'request'],
      letter: ['policy', 'request', 'safety', 'assessment'],
    } satisfies Record<string, string[]>
    const allowed = new Map<string, string[]>(Object.entries(order))
    const folderOf = (path: string): string => path.split('/')[2] ?? ''
    // Types, closed lists and the measure of plain text, which the whole domain speaks; they hold no medical rule.
    const vocabulary = new Set(['contrast/outcome', 'assessment/needs', 'request/priority', 'request/lifecycle', 'request/form', 'request/messages', 'access/roles', 'letter/kinds', 'letter/readability'])
    const isVocabulary = (path: string): boolean => {
      const rest = path.replace('shared/domain/', '')
      return rest === 'source' || rest.endsWith('/types') || vocabulary.has(rest)
    }
    const folders = readdirSync(join(root, 'shared/domain'), { withFileTypes: true }).filter(entry => entry.isDirectory()).map(entry => entry.name)
    expect(folders.filter(folder => !allowed.has(folder)), 'folders that the table does not know').toEqual([])
    expect(breaking(below('shared/domain'), (to, from) => {
      if (isVocabulary(to) || !below('shared/domain')(to)) return false
      return folderOf(to) !== folderOf(from) && !allowed.get(folderOf(from))?.includes(folderOf(to))
    })).toEqual([])
  })

  it('lets schemas import zod and the domain alone', () => {
    expect(breaking(below('shared/schemas'), to => !packages('zod')(to) && !below('shared')(to))).toEqual([])
  })

  it('keeps screens and server out of everything shared', () => {
    expect(breaking(below('shared'), to => below('server')(to) || screens(to) || http(to) || packages('vue', 'pinia', '#app')(to))).toEqual([])
  })

  it('keeps the database below everything else on the server', () => {
    const database = (path: string): boolean => below('server/database')(path) && !below('server/database/seed')(path)
    expect(breaking(database, to => http(to) || (below('server')(to) && !below('server/database')(to)))).toEqual([])
  })

  it('keeps record and mail apart from services, the database and each other', () => {
    const inner = ['services', 'database', 'jobs', 'api'].map(part => `server/${part}`)
    expect(breaking(below('server/ehr'), to => http(to) || below('server/mail', ...inner)(to))).toEqual([])
    expect(breaking(below('server/mail'), to => http(to) || below('server/ehr', ...inner)(to))).toEqual([])
  })

  it('keeps HTTP and routes out of the services, and jobs but their queue', () => {
    expect(breaking(below('server/services'), to =>
      http(to) || below('server/api', 'server/middleware', 'server/plugins')(to) || (below('server/jobs')(to) && to !== 'server/jobs/queue'))).toEqual([])
  })

  it('lets routes and jobs reach the database through services only', () => {
    const routes = (path: string): boolean => below('server/api', 'server/jobs')(path) && path !== 'server/jobs/queue.ts'
    expect(breaking(routes, to => below('server/database')(to) || packages('pg', 'drizzle-orm')(to))).toEqual([])
  })

  it('keeps domain words, stores and fetching out of base and form components', () => {
    const own = below('components/base', 'components/form')
    expect(breaking(own, to => screens(to) ? !own(to) : below('server')(to) || (below('shared')(to) && !below('shared/utils')(to)))).toEqual([])
  })

  it('keeps the server out of the screens, and imports going downward', () => {
    expect(breaking(screens, to => below('server')(to) || http(to) || below('pages', 'layouts')(to))).toEqual([])
    expect(breaking(below('stores', 'composables'), to => below('components')(to))).toEqual([])
  })
})
