import { randomBytes, randomUUID } from 'node:crypto'
import { removeResponseHeader, setResponseHeader, setResponseHeaders } from 'h3'
import type { H3Event } from 'h3'
import { dataPolicy, pagePolicy, stampNonce, standingHeaders } from '#server/utils/security-headers'

const requestIdHeader = 'x-request-id'

/**
 * What every answer carries, static files included: a request id and the standing headers. Pages get a content policy with a
 * nonce of their own, stamped on the tags that the framework wrote; what a page's content holds is never stamped.
 */
export default defineNitroPlugin((nitroApp) => {
  const origin = useRuntimeConfig().origin

  nitroApp.hooks.hook('request', (event) => {
    event.context.requestId = requestIdOf(event)
    setResponseHeaders(event, { ...standingHeaders(origin), [requestIdHeader]: event.context.requestId, 'content-security-policy': dataPolicy })
  })

  nitroApp.hooks.hook('render:html', (html, { event }) => {
    const nonce = randomBytes(16).toString('base64')
    for (const part of ['head', 'bodyPrepend', 'bodyAppend'] as const) html[part] = html[part].map(chunk => stampNonce(chunk, nonce))
    setResponseHeader(event, 'content-security-policy', pagePolicy(nonce, import.meta.dev))
    setResponseHeader(event, 'cache-control', 'no-store')
  })

  nitroApp.hooks.hook('render:response', (response, { event }) => {
    if (response.headers) delete response.headers['x-powered-by']
    removeResponseHeader(event, 'x-powered-by')
  })
})

/** Calls of the server to itself, while it renders a page, keep the id of the visit; nobody outside chooses one. */
function requestIdOf(event: H3Event): string {
  const { headers } = event.node.req
  const inner = '__unenv__' in event.node.req
  const given = headers[requestIdHeader]
  const id = inner && typeof given === 'string' ? given : randomUUID()
  headers[requestIdHeader] = id
  return id
}
