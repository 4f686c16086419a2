import { defineEventHandler, setResponseHeader, setResponseStatus } from 'h3'
import { useApp } from '#server/utils/app'
import { isReady } from '#server/utils/readiness'

/** Whether calls may be sent here: the database answers and has every table this build needs. */
export default defineEventHandler(async (event) => {
  setResponseHeader(event, 'cache-control', 'no-store')
  const ready = await isReady(useApp().pool)
  if (!ready) setResponseStatus(event, 503)
  return { status: ready ? 'ok' : 'unavailable' }
})
