import type { APIResponse } from '@playwright/test'
import { origin } from '../support/e2e/settings'
import { staff } from '../support/e2e/staff'
import { expect, people, test } from '../support/e2e/test'

function nonceOf(answer: APIResponse): string {
  return /'nonce-([^']+)'/.exec(answer.headers()['content-security-policy'] ?? '')?.[1] ?? ''
}

test('each page has a content policy with a nonce of its own, stamped on every script it runs', async ({ request }) => {
  const [first, second] = [await request.get('/sign-in'), await request.get('/sign-in')]
  expect(nonceOf(first)).toMatch(/^[A-Za-z0-9+/=]{20,}$/)
  expect(nonceOf(first)).not.toBe(nonceOf(second))
  const policy = first.headers()['content-security-policy'] ?? ''
  expect(policy).toContain('\'strict-dynamic\'')
  expect(policy).not.toContain('unsafe-eval')
  expect(policy).toContain('frame-ancestors \'none\'')
  const html = await first.text()
  const scripts = html.match(/<script[\s>][^>]*>?/g) ?? []
  expect(scripts.length).toBeGreaterThan(0)
  for (const script of scripts) expect(script).toContain(`nonce="${nonceOf(first)}"`)
})

test('no answer tells what it is made with, and none may be stored, framed or guessed at', async ({ request }) => {
  for (const path of ['/sign-in', '/api/me', '/explanation/none', '/mark.svg', '/nothing-here']) {
    const headers = (await request.get(path)).headers()
    expect(headers['x-powered-by'], path).toBeUndefined()
    expect(headers['x-content-type-options'], path).toBe('nosniff')
    expect(headers['referrer-policy'], path).toBe('no-referrer')
    expect(headers['x-frame-options'], path).toBe('DENY')
  }
  expect((await request.get('/sign-in')).headers()['cache-control']).toContain('no-store')
  expect((await request.get('/api/me')).headers()['cache-control']).toContain('no-store')
})

test('a call from another site is refused, and so is a form where only JSON is read', async () => {
  const { visitor } = await staff(people.clinician)
  const search = { recordNumber: '40-2217' }
  expect((await visitor.send('POST', '/api/patient-searches', search)).status).toBe(200)
  expect((await visitor.send('POST', '/api/patient-searches', search, { headers: { 'sec-fetch-site': 'cross-site' } })).status).toBe(403)
  expect((await visitor.send('POST', '/api/patient-searches', search, { headers: { origin: 'https://elsewhere.example' } })).status).toBe(403)
  expect((await visitor.send('POST', '/api/patient-searches', search, { headers: { 'content-type': 'application/x-www-form-urlencoded' } })).status).toBe(415)
})

test('without a session nothing is answered, and the refusal holds no data', async () => {
  for (const path of ['/api/me', '/api/requests', '/api/review', '/api/preparation', '/api/users', '/api/audit', '/api/connections']) {
    const answer = await fetch(`${origin()}${path}`)
    expect(answer.status, path).toBe(401)
    expect(await answer.text(), path).not.toContain('Lindqvist')
  }
})
