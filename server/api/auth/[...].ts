import { createError, defineEventHandler, setResponseHeader, setResponseStatus } from 'h3'
import { NuxtAuthHandler } from '#auth'
import { runAuthCall } from '#server/auth/attempt'
import { authOptions } from '#server/auth/options'
import { useApp } from '#server/utils/app'
import { clientAddress } from '#server/utils/client-address'

/** The library's steps that are used; its own pages, its log collector and other providers' steps are not. */
const steps = new Set(['GET csrf', 'GET session', 'GET providers', 'GET signin', 'GET error', 'POST callback/credentials', 'POST signout'])

const handler = NuxtAuthHandler(authOptions())

export default defineEventHandler(async (event) => {
  setResponseHeader(event, 'cache-control', 'no-store')
  const step = `${event.method} ${event.context.params?._ ?? ''}`
  if (!steps.has(step)) throw createError({ statusCode: 404, statusMessage: 'Not found' })
  const call = {
    requestId: event.context.requestId,
    address: clientAddress(event, useApp().config.trustedProxies),
    busy: false,
  }
  const answer: unknown = await runAuthCall(call, () => Promise.resolve(handler(event)))
  if (call.busy) {
    setResponseStatus(event, 503)
    setResponseHeader(event, 'retry-after', 5)
  }
  if (step === 'POST signout') setResponseHeader(event, 'clear-site-data', '"cache", "storage"')
  return answer
})
