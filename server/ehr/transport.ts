import { EhrUnavailable } from './errors'
import type { EhrLimits } from './settings'

export interface HttpAsk {
  method: string
  url: string
  headers: Record<string, string>
  body?: string
  signal: AbortSignal
}

export interface HttpAnswer {
  status: number
  retryAfterMs: number | null
  /** Parsed JSON; undefined for an empty body. */
  body: unknown
}

/** One HTTP request: never follows a redirect, never reads more than the limit, never waits longer than it. */
export async function exchange(send: typeof fetch, ask: HttpAsk, limits: EhrLimits, now: () => number): Promise<HttpAnswer> {
  const timeout = AbortSignal.timeout(limits.requestMs)
  let response: Response
  let text: string
  try {
    response = await send(ask.url, {
      method: ask.method,
      headers: ask.headers,
      redirect: 'manual',
      signal: AbortSignal.any([ask.signal, timeout]),
      ...(ask.body === undefined ? {} : { body: ask.body }),
    })
    text = await readText(response, limits.maxBytes)
  }
  catch (error) {
    if (error instanceof EhrUnavailable) throw error
    if (calledOff(ask.signal)) throw ask.signal.reason
    if (timeout.aborted || ask.signal.aborted) throw new EhrUnavailable('unreachable', 'The hospital record did not answer in time', { cause: error })
    throw new EhrUnavailable('unreachable', 'The hospital record cannot be reached', { cause: error })
  }
  const retryAfterMs = retryAfterOf(response.headers.get('retry-after'), now())
  const ok = response.status >= 200 && response.status < 300
  return { status: response.status, retryAfterMs, body: ok ? jsonOrThrow(text, response) : jsonOrNothing(text) }
}

/** Whether the caller itself lost interest, as against time running out. */
export function calledOff(signal: AbortSignal): boolean {
  return signal.aborted && !(signal.reason instanceof Error && signal.reason.name === 'TimeoutError')
}

/**
 * Retry-After in milliseconds, from seconds or an HTTP date (RFC 9110, "Retry-After"). Null where absent or unreadable.
 */
export function retryAfterOf(header: string | null, nowMs: number): number | null {
  if (header === null) return null
  const trimmed = header.trim()
  if (/^\d{1,6}$/.test(trimmed)) return Number(trimmed) * 1000
  const at = Date.parse(trimmed)
  return Number.isNaN(at) ? null : Math.max(0, at - nowMs)
}

async function readText(response: Response, maxBytes: number): Promise<string> {
  if (!response.body) return ''
  const reader = response.body.getReader()
  const decoder = new TextDecoder('utf-8')
  const pieces: string[] = []
  let size = 0
  for (;;) {
    const { done, value } = await reader.read()
    if (done) break
    size += value.byteLength
    if (size > maxBytes) {
      await reader.cancel()
      throw new EhrUnavailable('unreadable', 'The hospital record sent more than can be taken in at once', { status: response.status })
    }
    pieces.push(decoder.decode(value, { stream: true }))
  }
  pieces.push(decoder.decode())
  return pieces.join('')
}

function jsonOrThrow(text: string, response: Response): unknown {
  if (text.trim() === '') return undefined
  try {
    return JSON.parse(text)
  }
  catch (error) {
    const page = /html/i.test(response.headers.get('content-type') ?? '') || text.trimStart().startsWith('<')
    const words = page
      ? 'The hospital record answered with a web page instead of data; its sign-in may have run out'
      : 'The hospital record sent an answer that breaks off or cannot be read'
    // A page is what the server means to send; an answer that breaks off may arrive whole the next time.
    throw new EhrUnavailable('unreadable', words, { status: page ? response.status : null, cause: error instanceof Error ? error.name : undefined })
  }
}

function jsonOrNothing(text: string): unknown {
  try {
    return JSON.parse(text)
  }
  catch {
    return undefined
  }
}
