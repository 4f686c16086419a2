import { defineEventHandler, getHeader, setResponseHeader } from 'h3'
import { BadRequest, Forbidden } from '#server/services/errors'
import { useApp } from '#server/utils/app'
import { readLimitedBody } from '#server/utils/body-limit'
import { judgeCall } from '#server/utils/cross-site'
import { log } from '#server/utils/log'
import { answerProblem } from '#server/utils/problem'

/**
 * Stands before every route: refuses calls that another site may have caused, and bodies too large to read. What it read is
 * handed on, so that routes read it as ever.
 */
export default defineEventHandler(async (event) => {
  if (event.method === 'GET' || event.method === 'HEAD') return
  const { config } = useApp()
  const verdict = judgeCall({
    method: event.method,
    path: event.path,
    origin: new URL(config.origin).origin,
    header: name => getHeader(event, name),
  })
  if (verdict) {
    log.warn({ requestId: event.context.requestId, status: verdict.status }, 'cross-site guard refused a call')
    return answerProblem(event, verdict.status === 403 ? new Forbidden(verdict.detail) : new BadRequest(verdict.detail, 415))
  }
  const request = event.node.req
  if ('__unenv__' in request) return
  const body = await readLimitedBody(request)
  if (body === null) {
    setResponseHeader(event, 'connection', 'close')
    return answerProblem(event, new BadRequest('The body is larger than 256 kB.', 413))
  }
  Object.assign(request, { rawBody: body })
})
