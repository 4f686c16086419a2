import { defineEventHandler, setResponseHeader } from 'h3'

/** Whether this process answers at all. */
export default defineEventHandler((event) => {
  setResponseHeader(event, 'cache-control', 'no-store')
  return { status: 'ok' }
})
