#!/usr/bin/env node
// A small FHIR R4 server over the invented patients beside it, for trying things out and for tests. Loopback only.
// node fhir-fixtures/server.mjs --port 3940 [--auth backend-services --client-id ID --jwks FILE] [--page-cap 50] [--now ISO]
import { readFileSync } from 'node:fs'
import { createServer } from 'node:http'
import { pathToFileURL } from 'node:url'
import { parseArgs } from 'node:util'
import { capabilityStatement } from './lib/capability.mjs'
import { misbehave, Switches } from './lib/faults.mjs'
import { BadRequest, parameters, resultParameters, sorted } from './lib/match.mjs'
import { Pages } from './lib/paging.mjs'
import { loadStore, put } from './lib/store.mjs'
import { Tokens } from './lib/tokens.mjs'

const fhirJson = 'application/fhir+json; charset=utf-8'

/**
 * @param {{ now?: number, pageCap?: number, client?: { clientId: string, jwks: { keys: object[] }, lifeSeconds?: number } }} options
 *   `client`: the one client registered for Backend Services; without it the server is open.
 */
export function createFake({ now = Date.now(), pageCap = 50, client } = {}) {
  const store = loadStore(now)
  const switches = new Switches()
  const pages = new Pages(pageCap)
  const tokens = client ? new Tokens(client) : null
  const log = []

  const server = createServer((request, response) => {
    handle(request, response).catch((error) => {
      if (response.headersSent || response.destroyed) return
      const wrong = error instanceof BadRequest
      write(response, wrong ? 400 : 500, JSON.stringify(operationOutcome(wrong ? 'invalid' : 'exception', error.message)))
    })
  })

  async function handle(request, response) {
    const base = `http://${request.headers.host}`
    const url = new URL(request.url, base)
    const body = await bodyOf(request)
    const respond = (status, text, headers = {}) => write(response, status, text, headers)
    const send = (status, resource, headers) => respond(status, JSON.stringify(resource), headers)
    const outcome = (status, code, diagnostics, headers) => send(status, operationOutcome(code, diagnostics), headers)

    if (url.pathname.startsWith('/__control')) return control(request, url, body, send)
    const address = `${request.method} ${url.pathname}${decodeURIComponent(url.search.replaceAll('+', ' '))}`
    log.push({ method: request.method, url: request.url, body, headers: request.headers, at: Date.now() })
    const fault = switches.take(address)
    if (fault?.fault === 'expiredToken') tokens?.expireAll()
    else if (fault && await misbehave(fault, { request, response, respond, outcome }) === 'answered') return

    if (url.pathname === '/metadata') return send(200, capabilityStatement(base))
    if (url.pathname === '/.well-known/smart-configuration') return send(200, smartConfiguration(base), { 'content-type': 'application/json' })
    if (url.pathname === '/token' && tokens) {
      const answer = await tokens.exchange(new URLSearchParams(body), `${base}/token`)
      return send(answer.status, answer.body, { 'content-type': 'application/json', 'cache-control': 'no-store' })
    }

    const [type, id, more] = url.pathname.split('/').filter(Boolean).map(decodeURIComponent)
    const pageToken = url.searchParams.get('_page')
    const paged = type === undefined && pageToken !== null ? pages.held.get(pageToken)?.type : null
    const allowed = tokens?.check(request.headers.authorization, type ?? paged ?? 'Patient') ?? 'ok'
    if (allowed === 'login') return outcome(401, 'login', 'A valid token is needed', { 'www-authenticate': 'Bearer' })
    if (allowed === 'forbidden') return outcome(403, 'forbidden', 'The token does not cover this type')

    if (type === undefined && pageToken !== null) {
      const page = pages.next(pageToken, switches.quirks)
      return page ? send(200, page.bundle) : outcome(410, 'not-found', 'This page has expired')
    }
    if (type === undefined || !(type in parameters)) return outcome(404, 'not-supported', 'Unknown resource type')
    if (request.method === 'GET' && id === undefined) return send(200, search(type, url.searchParams, request, base))
    if (request.method === 'POST' && id === '_search' && more === undefined) {
      if (switches.quirks.ignorePostBody) return send(200, search(type, new URLSearchParams('_id=nobody'), request, base))
      const both = new URLSearchParams([...url.searchParams, ...new URLSearchParams(body)])
      return send(200, search(type, both, request, base))
    }
    if (request.method !== 'GET') return outcome(405, 'not-supported', 'Reading only')
    const resource = store.get(type)?.get(id)
    if (!resource || more !== undefined) return outcome(404, 'not-found', 'No such resource')
    return send(200, resource, { etag: `W/"${resource.meta?.versionId ?? '1'}"` })
  }

  function search(type, params, request, base) {
    const { quirks } = switches
    const strict = /handling=strict/.test(request.headers.prefer ?? '') && !quirks.lenient
    const used = new URLSearchParams()
    let rows = [...store.get(type)?.values() ?? []]
    for (const [name, value] of params) {
      const test = parameters[type][name]
      if (!test && !resultParameters.has(name)) {
        if (strict) throw new BadRequest(`Unknown search parameter ${name}`)
        continue
      }
      used.append(name, value)
      if (test && !(quirks.ignoreFilters && name !== 'patient' && name !== 'subject')) rows = rows.filter(resource => test(resource, value))
    }
    const order = params.get('_sort')
    if (order && !quirks.ignoreSort) rows = sorted(rows, order)
    if (quirks.ignoreSort) rows = [...rows].sort((a, b) => a.id.split('').reverse().join('') < b.id.split('').reverse().join('') ? -1 : 1)
    if (quirks.rowOfAnotherPatient && type === 'Observation') {
      const foreign = [...store.get(type).values()].find(row => row.code.coding?.[0]?.code === '2160-0' && !rows.some(({ subject }) => subject.reference === row.subject.reference))
      if (foreign) rows = [foreign, ...rows]
    }
    const count = params.get('_count')
    return pages.first({ rows, base, self: `${base}/${type}?${used}`, asked: count === null ? undefined : Number(count), quirks, type }).bundle
  }

  async function control(request, url, body, send) {
    const json = { 'content-type': 'application/json' }
    if (request.method === 'GET' && url.pathname === '/__control/log') return send(200, log, json)
    if (request.method !== 'POST') return send(405, { error: 'POST switches, GET /__control/log' }, json)
    const wanted = JSON.parse(body || '{}')
    try {
      switches.set(wanted)
    }
    catch (error) {
      return send(400, { error: error.message }, json)
    }
    if (wanted.reset) log.length = 0
    if (wanted.put) put(store, wanted.put)
    return send(200, { ok: true }, json)
  }

  return server
}

function smartConfiguration(base) {
  return {
    token_endpoint: `${base}/token`,
    grant_types_supported: ['client_credentials'],
    token_endpoint_auth_methods_supported: ['private_key_jwt'],
    token_endpoint_auth_signing_alg_values_supported: ['RS384', 'ES384'],
    scopes_supported: ['system/*.rs'],
    capabilities: ['client-confidential-asymmetric', 'permission-v2'],
  }
}

const operationOutcome = (code, diagnostics) => ({ resourceType: 'OperationOutcome', issue: [{ severity: 'error', code, diagnostics }] })

function write(response, status, text, headers = {}) {
  response.writeHead(status, { 'content-type': fhirJson, ...headers })
  response.end(text)
  return 'answered'
}

async function bodyOf(request) {
  const pieces = []
  for await (const piece of request) pieces.push(piece)
  return Buffer.concat(pieces).toString('utf8')
}

/** Listens on loopback; port 0 takes a free one. Resolves with the port. */
export function listen(server, port) {
  return new Promise((resolve, reject) => {
    server.once('error', reject)
    server.listen(port, '127.0.0.1', () => resolve(server.address().port))
  })
}

async function main() {
  const { values } = parseArgs({
    options: {
      'port': { type: 'string', default: '3940' },
      'auth': { type: 'string', default: 'none' },
      'client-id': { type: 'string' },
      'jwks': { type: 'string' },
      'page-cap': { type: 'string', default: '50' },
      'now': { type: 'string' },
    },
  })
  const guarded = values.auth === 'backend-services'
  if (guarded && !(values['client-id'] && values.jwks)) throw new Error('--auth backend-services needs --client-id and --jwks FILE (public keys)')
  const server = createFake({
    pageCap: Number(values['page-cap']),
    ...(values.now ? { now: Date.parse(values.now) } : {}),
    ...(guarded ? { client: { clientId: values['client-id'], jwks: JSON.parse(readFileSync(values.jwks, 'utf8')) } } : {}),
  })
  const port = await listen(server, Number(values.port))
  console.log(`Fake hospital record on http://127.0.0.1:${port}`)
  const stop = () => {
    server.close(() => process.exit(0))
    server.closeAllConnections()
  }
  process.once('SIGTERM', stop)
  process.once('SIGINT', stop)
}

if (process.argv[1] && import.meta.url === pathToFileURL(process.argv[1]).href) {
  main().catch((error) => {
    console.error(error.message)
    process.exit(1)
  })
}
