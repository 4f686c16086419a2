import { describe, expect, it } from 'vitest'
import { judgeCall } from '#server/utils/cross-site'

const origin = 'https://wherefore.example.org'
const json = { 'content-type': 'application/json' }

function judge(headers: Record<string, string>, { method = 'POST', path = '/api/requests' } = {}) {
  return judgeCall({ method, path, origin, header: name => headers[name] })?.status ?? 'passes'
}

describe('the cross-site guard', () => {
  it.each(['GET', 'HEAD', 'OPTIONS'])('lets %s through: reading changes nothing', (method) => {
    expect(judge({ 'sec-fetch-site': 'cross-site' }, { method })).toBe('passes')
  })

  it.each(['POST', 'PUT', 'PATCH', 'DELETE'])('refuses %s from another site, whatever else it says', (method) => {
    expect(judge({ ...json, 'sec-fetch-site': 'cross-site', origin, 'x-wherefore-client': '1' }, { method })).toBe(403)
    expect(judge({ ...json, 'sec-fetch-site': 'same-site', origin }, { method })).toBe(403)
  })

  it('believes the browser before the origin, and the origin before a header of ours', () => {
    expect(judge({ ...json, 'sec-fetch-site': 'same-origin' })).toBe('passes')
    expect(judge({ ...json, origin })).toBe('passes')
    expect(judge({ ...json, 'origin': 'https://elsewhere.example', 'x-wherefore-client': '1' })).toBe(403)
    expect(judge({ ...json, 'x-wherefore-client': '1' })).toBe('passes')
    expect(judge(json)).toBe(403)
  })

  it('does not take a name that only begins or ends like ours for ours', () => {
    for (const near of [`${origin}.evil.example`, 'https://evil-wherefore.example.org', 'http://wherefore.example.org', `${origin}:8443`, 'null']) {
      expect(judge({ ...json, origin: near }), near).toBe(403)
    }
  })

  it.each(['text/plain', 'application/x-www-form-urlencoded', 'multipart/form-data', 'application/json-patch+json', 'text/json', ''])('reads no body of type "%s"', (type) => {
    expect(judge({ 'content-type': type, origin })).toBe(415)
  })

  it('reads JSON with parameters, in any case', () => {
    expect(judge({ 'content-type': 'Application/JSON; charset=utf-8', origin })).toBe('passes')
  })

  it('refuses a body without a type', () => {
    expect(judge({ origin })).toBe(415)
  })

  it('lets sign-in send forms, which has a guard of its own, but not from another site', () => {
    const form = { 'content-type': 'application/x-www-form-urlencoded' }
    const path = '/api/auth/callback/credentials'
    expect(judge({ ...form, origin }, { path })).toBe('passes')
    expect(judge({ ...form, origin: 'https://elsewhere.example' }, { path })).toBe(403)
    expect(judge({ ...form, origin }, { path: '/api/authors' })).toBe(415)
  })

  it('lets the patient\'s page send its form without scripts, but not from another site', () => {
    const form = { 'content-type': 'application/x-www-form-urlencoded' }
    const path = '/explanation-form/abc'
    expect(judge({ ...form, 'sec-fetch-site': 'same-origin', 'origin': 'null' }, { path })).toBe('passes')
    expect(judge({ ...form, 'sec-fetch-site': 'cross-site' }, { path })).toBe(403)
  })
})
