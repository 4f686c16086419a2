import { request } from 'node:http'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { startDemoServer } from '../../support/demo-server'
import type { DemoServer } from '../../support/demo-server'
import { createTestDatabase } from '../../support/database'
import { spawnTestServer, startTestServer } from '../../support/server'
import type { TestServer } from '../../support/server'
import { createVisitor } from '../../support/visitor'

let demo: DemoServer
beforeAll(async () => {
  demo = await startDemoServer()
})
afterAll(async () => {
  await demo.close()
})

async function endOf(server: TestServer): Promise<number | null> {
  const deadline = Date.now() + 20_000
  while (server.exitCode() === null && Date.now() < deadline) await new Promise(resolve => setTimeout(resolve, 50))
  return server.exitCode()
}

describe('starting', () => {
  it.each([
    ['a missing mail server', { NUXT_SMTP_HOST: '' }, /NUXT_SMTP_HOST/],
    ['a short secret', { NUXT_AUTH_SECRET: 'short' }, /NUXT_AUTH_SECRET/],
    ['a secret that nobody drew at random', { NUXT_AUTH_SECRET: 'change-me-change-me-change-me-change-me' }, /NUXT_AUTH_SECRET/],
    ['demo accounts behind a public address', { NUXT_ORIGIN: 'https://wherefore.example.org' }, /NUXT_DEMO/],
    ['demo accounts on every address of the machine', { HOST: '0.0.0.0' }, /NUXT_DEMO/],
  ])('names %s and ends', async (_what, settings, words) => {
    const server = await spawnTestServer(demo.database, settings)
    expect(await endOf(server)).toBe(1)
    expect(server.output()).toMatch(words)
  })

  it('repeats no secret when it refuses', async () => {
    const server = await spawnTestServer(demo.database, { NUXT_AUTH_SECRET: 'my-own-little-secret', NUXT_SMTP_PASSWORD: 'hunter2-of-mail', NUXT_SMTP_HOST: '' })
    await endOf(server)
    expect(server.output()).not.toContain('my-own-little-secret')
    expect(server.output()).not.toContain('hunter2-of-mail')
  })

  it('ends with a word when the database cannot be reached', async () => {
    const server = await spawnTestServer(demo.database, { NUXT_DATABASE_URL: 'postgresql://wherefore_app@127.0.0.1:9/none' })
    expect(await endOf(server)).toBe(1)
    expect(server.output()).toContain('cannot start')
  })

  it('migrates an empty database when it is told the owner\'s address, two servers at once as well', async () => {
    const database = await createTestDatabase()
    const owner = { NUXT_OWNER_DATABASE_URL: database.ownerUrl, NUXT_MIGRATIONS_DIR: 'server/database/migrations' }
    const servers = await Promise.all([startTestServer(database, owner), startTestServer(database, owner)])
    try {
      for (const server of servers) expect((await fetch(`${server.origin}/readyz`)).status).toBe(200)
    }
    finally {
      await Promise.all(servers.map(server => server.stop()))
      await database.drop()
    }
  })
})

describe('health', () => {
  it('says up and ready, and nothing else', async () => {
    const up = await fetch(`${demo.server.origin}/healthz`)
    expect(await up.json()).toEqual({ status: 'ok' })
    const ready = await fetch(`${demo.server.origin}/readyz`)
    expect(await ready.json()).toEqual({ status: 'ok' })
    expect(JSON.stringify([...ready.headers])).not.toMatch(/nuxt|nitro|node\/|\d+\.\d+\.\d+(?!\.)/i)
  })
})

describe('ending', () => {
  it('finishes within ten seconds and without complaint when asked to', async () => {
    const server = await startTestServer(demo.database)
    await fetch(`${server.origin}/sign-in`)
    const asked = Date.now()
    expect(await server.stop('SIGTERM')).toBe(0)
    expect(Date.now() - asked).toBeLessThan(10_000)
  })
})

describe('calls from elsewhere', () => {
  const write = (headers: Record<string, string>, body = '{"shortcuts":true}', cookie = '') =>
    fetch(`${demo.server.origin}/api/me/preferences`, { method: 'PUT', headers: { ...headers, ...(cookie ? { cookie } : {}) }, body })

  it('are refused unless they are clearly ours', async () => {
    const json = { 'content-type': 'application/json' }
    const { cookie } = await demo.signedIn('ines.okafor@millbrook.example')
    const { origin } = demo.server
    expect((await write({ ...json, origin }, undefined, cookie())).status).toBe(200)
    expect((await write({ ...json, 'sec-fetch-site': 'same-origin' }, undefined, cookie())).status).toBe(200)
    expect((await write({ ...json, 'x-wherefore-client': 'script' }, undefined, cookie())).status).toBe(200)
    for (const site of ['cross-site', 'same-site']) {
      expect((await write({ ...json, origin, 'sec-fetch-site': site }, undefined, cookie())).status, site).toBe(403)
    }
    expect((await write({ ...json, origin: 'https://elsewhere.example' }, undefined, cookie())).status).toBe(403)
    expect((await write({ ...json, origin: 'null' }, undefined, cookie())).status).toBe(403)
    expect((await write(json, undefined, cookie())).status).toBe(403)
  })

  it.each(['application/x-www-form-urlencoded', 'text/plain', 'multipart/form-data; boundary=x', 'application/jsonp'])('are refused as %s', async (type) => {
    const { cookie } = await demo.signedIn('ines.okafor@millbrook.example')
    expect((await write({ 'content-type': type, 'origin': demo.server.origin }, '{"shortcuts":true}', cookie())).status).toBe(415)
  })
})

describe('bodies', () => {
  it('of more than 256 kB are refused, said outright or sent in pieces', async () => {
    const someone = await demo.signedIn('ines.okafor@millbrook.example')
    expect((await someone.send('PUT', '/api/me/preferences', { filler: 'x'.repeat(300_000) })).status).toBe(413)
    expect(await sendInPieces(`${demo.server.origin}/api/auth/callback/credentials`, 40)).toBe(413)
  })

  it('nested too deeply, not JSON, or with unknown fields are refused without an echo', async () => {
    const someone = await demo.signedIn('ines.okafor@millbrook.example')
    const deep = JSON.parse(`${'{"a":'.repeat(30)}1${'}'.repeat(30)}`) as object
    expect((await someone.send('PUT', '/api/me/preferences', deep)).status).toBe(400)
    const answer = await someone.send('PUT', '/api/me/preferences', { shortcuts: true, role: 'administrator-by-wish' })
    expect(answer.status).toBe(422)
    expect(await answer.text()).not.toContain('administrator-by-wish')
  })
})

describe('headers', () => {
  it('give each page a policy with a nonce of its own, and no other page may hold it', async () => {
    const pages = await Promise.all([1, 2].map(async () => {
      const answer = await fetch(`${demo.server.origin}/sign-in`)
      return { policy: answer.headers.get('content-security-policy') ?? '', html: await answer.text(), headers: answer.headers }
    }))
    const nonces = pages.map(page => /'nonce-([^']+)'/.exec(page.policy)?.[1])
    expect(new Set(nonces).size).toBe(2)
    for (const [at, { policy, html, headers }] of pages.entries()) {
      expect(policy).toContain('\'strict-dynamic\'')
      expect(policy.split(';').find(part => part.trim().startsWith('script-src '))).not.toMatch(/unsafe/)
      const scripts = html.match(/<script[^>]*>/g) ?? []
      expect(scripts.length).toBeGreaterThan(0)
      for (const script of scripts) expect(script).toContain(`nonce="${nonces[at]}"`)
      expect(headers.get('cache-control')).toBe('no-store')
      expect(headers.get('x-powered-by')).toBeNull()
      expect(headers.get('referrer-policy')).toBe('no-referrer')
      expect(headers.get('cross-origin-opener-policy')).toBe('same-origin')
      expect(headers.get('strict-transport-security')).toBeNull()
    }
  })

  it('ask for TLS, and a cookie bound to the host, where the public address has TLS', async () => {
    const origin = 'https://wherefore.example.org'
    const server = await spawnTestServer(demo.database, { NUXT_ORIGIN: origin, NUXT_DEMO: 'off' })
    try {
      const port = /Listening on http:\/\/127\.0\.0\.1:(\d+)/
      while (!port.test(server.output()) && server.exitCode() === null) await new Promise(resolve => setTimeout(resolve, 50))
      const answer = await fetch(`http://127.0.0.1:${port.exec(server.output())?.[1]}/api/auth/csrf`)
      expect(answer.headers.get('strict-transport-security')).toContain('max-age=31536000')
      expect(answer.headers.getSetCookie().join()).toContain('__Host-next-auth.csrf-token')
    }
    finally {
      await server.stop()
    }
  })

  it('name each call, whatever the caller wanted it named', async () => {
    const answer = await fetch(`${demo.server.origin}/api/me`, { headers: { 'x-request-id': 'mine' } })
    expect(answer.headers.get('x-request-id')).toMatch(/^[0-9a-f-]{36}$/)
  })

  it('keep a signed-in page from being stored', async () => {
    const someone = await demo.signedIn('ruth.adler@northshore.example')
    for (const path of ['/settings/users', '/api/users']) expect((await someone.get(path)).headers.get('cache-control')).toBe('no-store')
  })
})

describe('pages', () => {
  it('send a stranger to sign in, and keep where they wanted to go', async () => {
    const answer = await createVisitor(demo.server.origin).get('/settings/users')
    expect(answer.status).toBe(302)
    expect(answer.headers.get('location')).toBe('/sign-in?next=/settings/users')
  })

  it('are not shown to a role that has no business there', async () => {
    const someone = await demo.signedIn('leila.farouk@northshore.example')
    expect((await someone.get('/settings/users')).status).toBe(403)
  })
})

/** A chunked body of `pieces` times 16 kB, so that no length is known beforehand. */
function sendInPieces(url: string, pieces: number): Promise<number> {
  return new Promise((resolve, reject) => {
    const call = request(url, { method: 'POST', headers: { 'content-type': 'application/x-www-form-urlencoded', 'origin': new URL(url).origin } }, (answer) => {
      answer.resume()
      resolve(answer.statusCode ?? 0)
    })
    call.on('error', reject)
    for (let at = 0; at < pieces; at++) call.write('x'.repeat(16 * 1024))
    call.end()
  })
}
