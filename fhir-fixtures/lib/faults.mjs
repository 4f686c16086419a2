// Switches that make the server misbehave, set at /__control.
import { setTimeout as sleep } from 'node:timers/promises'

/** Answers for a whole request, or `null` to go on as usual. */
const faults = {
  delay: async ({ fault }) => { await sleep(fault.delayMs ?? 1000, undefined, { ref: false }) },
  hang: ({ request, response }) => new Promise((resolve) => {
    const done = () => resolve('answered')
    request.socket.once('close', done)
    response.once('close', done)
  }),
  unreachable: ({ request }) => {
    request.socket.destroy()
    return 'answered'
  },
  html200: ({ respond }) => respond(200, '<!doctype html><title>Sign in</title><p>Your session has ended.', { 'content-type': 'text/html' }),
  notFhir: ({ respond }) => respond(404, 'Not found', { 'content-type': 'text/plain' }),
  truncatedJson: ({ respond }) => respond(200, '{"resourceType":"Bundle","type":"searchset","entry":[{"resource":{"resourceType":"Obser'),
  malformedJson: ({ respond }) => respond(200, '{"resourceType":"Bundle",,}'),
  emptyBody: ({ respond }) => respond(200, ''),
  huge: ({ respond }) => respond(200, `{"resourceType":"Bundle","type":"searchset","note":"${'x'.repeat(6 * 1024 * 1024)}"}`),
  deep: ({ respond }) => respond(200, `{"resourceType":"Bundle","type":"searchset","entry":${'['.repeat(100_000)}${']'.repeat(100_000)}}`),
  redirect: ({ respond, fault }) => respond(302, '', { location: fault.location ?? 'http://127.0.0.1:9/' }),
  retryAfterSeconds: ({ outcome, fault }) => outcome(429, 'throttled', 'Too many requests', { 'retry-after': String(fault.seconds ?? 1) }),
  retryAfterDate: ({ outcome, fault }) => outcome(429, 'throttled', 'Too many requests', {
    'retry-after': new Date(Math.ceil(Date.now() / 1000) * 1000 + (fault.seconds ?? 1) * 1000).toUTCString(),
  }),
}

const statusFaults = {
  400: 'invalid', 401: 'login', 403: 'forbidden', 404: 'not-found', 410: 'deleted', 412: 'conflict', 429: 'throttled',
  500: 'exception', 501: 'not-supported', 502: 'transient', 503: 'transient', 504: 'timeout',
}

/** How a page of results is put together differently; see paging.mjs. */
export const quirkNames = [
  'ignoreSort', 'relativeNext', 'foreignNext', 'loopNext', 'smallPages', 'rowOfAnotherPatient', 'ignoreFilters', 'emptyPages', 'expirePages',
  'repeatRows', 'outcomeEntry', 'incompleteEntry', 'noTotal', 'numberAsString', 'unknownExtensions', 'lenient', 'ignorePostBody',
]

export class Switches {
  faults = []
  quirks = {}

  /** Sets one fault, sets quirks, or `{ "reset": true }`. */
  set(body) {
    if (body.reset) {
      this.faults = []
      this.quirks = {}
    }
    for (const [name, value] of Object.entries(body.quirks ?? {})) {
      if (!quirkNames.includes(name)) throw new Error(`Unknown quirk ${name}`)
      this.quirks[name] = value
    }
    if (body.fault === undefined) return
    const name = String(body.fault)
    if (!(name in faults) && !(name in statusFaults) && name !== 'expiredToken') throw new Error(`Unknown fault ${name}`)
    this.faults.push({ ...body, fault: name, left: body.count ?? Number.POSITIVE_INFINITY, passed: 0 })
  }

  /** The fault that a request meets: the first whose pattern fits, after `skip` requests, while its count lasts. */
  take(address) {
    const fault = this.faults.find(entry => entry.left > 0 && (entry.pattern === undefined || new RegExp(entry.pattern).test(address)))
    if (!fault) return null
    fault.passed += 1
    if (fault.passed <= (fault.skip ?? 0)) return null
    fault.left -= 1
    return fault
  }
}

/** @returns {Promise<'answered' | null>} whether the request has been dealt with */
export async function misbehave(fault, tools) {
  if (fault.fault in statusFaults) return tools.outcome(Number(fault.fault), statusFaults[fault.fault], 'Set at the control address')
  return await faults[fault.fault]({ ...tools, fault }) ?? null
}
