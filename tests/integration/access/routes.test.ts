import { randomUUID } from 'node:crypto'
import { readFileSync, readdirSync } from 'node:fs'
import { join } from 'node:path'
import { fileURLToPath } from 'node:url'
import { eq } from 'drizzle-orm'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { isRequestAction, mayOnRequest, roleMay } from '#shared/domain/access/permissions'
import type { Action, RequestScope } from '#shared/domain/access/permissions'
import { routeActions } from '#shared/domain/access/routes'
import type { Actor } from '#shared/domain/access/roles'
import { users } from '#server/database/schema/people'
import { requests } from '#server/database/schema/requests'
import { startDemoServer } from '../../support/demo-server'
import type { DemoServer } from '../../support/demo-server'
import { createVisitor } from '../../support/visitor'
import type { Visitor } from '../../support/visitor'
import { insertRequest, validBodies } from './bodies'

const root = join(fileURLToPath(import.meta.url), '..', '..', '..', '..')

interface RouteFile { route: string, source: string }

/** Every route that the files on disk make, as the route table writes them. */
function routeFiles(): RouteFile[] {
  const found: RouteFile[] = []
  const walk = (folder: string, base: string): void => {
    for (const entry of readdirSync(join(root, folder), { withFileTypes: true })) {
      if (entry.isDirectory()) {
        walk(`${folder}/${entry.name}`, `${base}/${entry.name}`)
        continue
      }
      const match = /^(.+?)(?:\.(get|post|put|patch|delete))?\.ts$/.exec(entry.name)
      if (!match?.[1]) continue
      const path = match[1] === 'index' ? base : `${base}/${match[1]}`
      found.push({ route: `${(match[2] ?? 'any').toUpperCase()} ${path}`, source: readFileSync(join(root, folder, entry.name), 'utf8') })
    }
  }
  walk('server/api', '/api')
  walk('server/routes', '')
  return found
}

const table: [string, Action | 'public'][] = Object.entries(routeActions)

describe('the route table', () => {
  const files = routeFiles()

  it('has a row for every route file, and a file for every row', () => {
    expect(files.map(file => file.route).sort()).toEqual(table.map(([route]) => route).sort())
  })

  it('names the action that the file itself asks for', () => {
    const wrong = files.flatMap(({ route, source }) => {
      const named = /define(?:Authed|Stream)\w*\(\s*'([\w.-]+)'/.exec(source)?.[1] ?? 'public'
      const listed = table.find(([listedRoute]) => listedRoute === route)?.[1]
      return named === listed ? [] : [`${route}: the table says ${listed}, the file ${named}`]
    })
    expect(wrong).toEqual([])
  })
})

describe('every route over HTTP', () => {
  let demo: DemoServer
  const visitors = new Map<string, { visitor: Visitor, actor: Actor }>()
  const rows = new Map<string, { id: string, scope: RequestScope }>()
  let versionsBefore: string

  const emails = {
    'clinician': 'ines.okafor@millbrook.example',
    'their staff': 'sam.whitfield@millbrook.example',
    'clinician elsewhere': 'priya.raman@riverside.example',
    'radiologist': 'tomas.brandt@northshore.example',
    'scheduler': 'leila.farouk@northshore.example',
    'administrator': 'ruth.adler@northshore.example',
  }

  async function versions(): Promise<string> {
    const found = await demo.db.select({ id: requests.id, version: requests.version, state: requests.state }).from(requests)
    return JSON.stringify(found.sort((a, b) => a.id.localeCompare(b.id)))
  }

  beforeAll(async () => {
    demo = await startDemoServer()
    for (const [who, email] of Object.entries(emails)) {
      const visitor = await demo.signedIn(email)
      const me = await (await visitor.get('/api/me')).json() as { actor: Actor }
      visitors.set(who, { visitor, actor: me.actor })
    }
    const clinician = visitors.get('clinician')?.actor
    if (!clinician) throw new Error('nobody signed in')
    for (const state of ['draft', 'sent'] as const) rows.set(state, await insertRequest(demo.db, clinician, state))
    versionsBefore = await versions()
  })
  afterAll(async () => {
    await demo.close()
  })

  function ask(visitor: Visitor, route: string, id: string): Promise<Response> {
    const [method = 'GET', pattern = ''] = route.split(' ')
    const path = pattern.replace('[id]', id).replace('[token]', 'A'.repeat(43))
    if (method === 'GET') return visitor.get(path)
    return visitor.send(method === 'PUT' ? 'PUT' : 'POST', path, validBodies[route] ?? {}, { version: 1 })
  }

  const guarded = table.filter((entry): entry is [string, Action] => entry[1] !== 'public')

  it.each(guarded)('%s is closed to nobody', async (route) => {
    const answer = await ask(createVisitor(demo.server.origin), route, rows.get('sent')?.id ?? '')
    expect(answer.status).toBe(401)
    expect(answer.headers.get('cache-control')).toBe('no-store')
  })

  const roleCases = guarded.flatMap(([route, action]) => Object.keys(emails).map(who => ({ route, action, who })))

  it.each(roleCases)('$route as $who follows the table', async ({ route, action, who }) => {
    const entry = visitors.get(who)
    if (!entry) throw new Error(`nobody signed in as ${who}`)
    const { visitor, actor } = entry
    if (!roleMay(actor.role, action)) {
      const answer = await ask(visitor, route, rows.get('sent')?.id ?? '')
      expect(answer.status).toBe(403)
      return
    }
    if (!isRequestAction(action) || !route.includes('[id]')) {
      if (!route.startsWith('GET ')) return
      const answer = await ask(visitor, route, randomUUID())
      expect([401, 403, 500]).not.toContain(answer.status)
      return
    }
    for (const { id, scope } of rows.values()) {
      if (mayOnRequest(actor, action, scope)) {
        if (route.startsWith('GET ')) expect([401, 403, 404, 500]).not.toContain((await ask(visitor, route, id)).status)
        continue
      }
      const expected = mayOnRequest(actor, 'request.read', scope) ? 403 : 404
      expect((await ask(visitor, route, id)).status, `${scope.state} request`).toBe(expected)
    }
    const missing = await ask(visitor, route, randomUUID())
    expect(missing.status, 'a request that does not exist').toBe(404)
  })

  it('answers for another practice\'s request exactly as for one that does not exist', async () => {
    const stranger = visitors.get('clinician elsewhere')?.visitor
    if (!stranger) throw new Error('nobody signed in')
    const words = async (id: string): Promise<unknown> => {
      const { requestId: _requestId, ...body } = await (await stranger.get(`/api/requests/${id}`)).json() as Record<string, unknown>
      return body
    }
    expect(await words(rows.get('sent')?.id ?? '')).toEqual(await words(randomUUID()))
  })

  it('does not let an administrator change their own account', async () => {
    const entry = visitors.get('administrator')
    if (!entry) throw new Error('nobody signed in')
    const { visitor, actor } = entry
    expect((await visitor.send('PUT', `/api/users/${actor.userId}`, validBodies['PUT /api/users/[id]'] ?? {}, { version: 1 })).status).toBe(403)
  })

  it('leaves every request as it was after all those refusals', async () => {
    expect(await versions()).toBe(versionsBefore)
  })

  it('refuses each call of a person from the moment the account is disabled', async () => {
    const visitor = await demo.signedIn('jonas.weiss@hillstreet.example')
    expect((await visitor.get('/api/requests')).status).toBe(200)
    await demo.db.update(users).set({ disabledAt: new Date() }).where(eq(users.email, 'jonas.weiss@hillstreet.example'))
    for (const [route] of guarded) expect((await ask(visitor, route, rows.get('sent')?.id ?? '')).status, route).toBe(401)
  })
})
