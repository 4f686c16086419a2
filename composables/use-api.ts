import { FetchError } from 'ofetch'

/** A failed call in words a person may read, from the server's problem details. */
export interface ApiProblem {
  status: number
  code: string
  title: string
  detail: string
  /** Field paths with what is wrong, for the fields and the summary. */
  errors: { path: string, message: string }[]
  /** What the server said beside it: current state, who changed it. */
  extra: Record<string, unknown>
}

export type ApiResult<T> = { ok: true, data: T, version: number | null } | { ok: false, problem: ApiProblem }

export interface WriteOptions {
  /** The version that was read; becomes If-Match. */
  version?: number
  /** Names this write. Keep one key for all retries of one intent, so that it happens once. */
  key?: string
}

export interface Api {
  /** A `background` call, such as polling, does not count as something the person did: the session may end for idleness. */
  get: <T>(path: string, query?: Record<string, string | number | undefined>, options?: { background?: boolean }) => Promise<ApiResult<T>>
  post: <T>(path: string, body: object, options?: WriteOptions) => Promise<ApiResult<T>>
  put: <T>(path: string, body: object, options?: WriteOptions) => Promise<ApiResult<T>>
}

/** A fresh key for one intended write. */
export function newWriteKey(): string {
  return crypto.randomUUID()
}

/** Calls the server's routes; on the server it passes the visitor's cookie on. Never throws. */
export function useApi(): Api {
  // While rendering on the server the visitor's cookie and the visit's id go along; in the browser this is empty.
  const visitor = useRequestHeaders(['cookie', 'x-request-id'])

  async function send<T>(method: 'GET' | 'POST' | 'PUT', path: string, options: {
    body?: object
    query?: Record<string, string | number | undefined>
    write?: WriteOptions
    background?: boolean
  }): Promise<ApiResult<T>> {
    const headers: Record<string, string> = { ...visitor, ...(options.background ? { 'x-wherefore-background': '1' } : {}) }
    if (options.write?.version !== undefined) headers['if-match'] = `"${options.write.version}"`
    if (method === 'POST') headers['idempotency-key'] = options.write?.key ?? newWriteKey()
    try {
      const response = await $fetch.raw<T>(path, { method, headers, body: options.body, query: options.query, retry: false })
      const tag = /^"(\d+)"$/.exec(response.headers.get('etag') ?? '')
      return { ok: true, data: response._data as T, version: tag?.[1] ? Number(tag[1]) : null }
    }
    catch (error) {
      return { ok: false, problem: toProblem(error) }
    }
  }

  return {
    get: (path, query, options) => send('GET', path, { query, ...options }),
    post: (path, body, write) => send('POST', path, { body, write }),
    put: (path, body, write) => send('PUT', path, { body, write }),
  }
}

/** Reads problem details; anything else becomes words about the connection. */
export function toProblem(error: unknown): ApiProblem {
  const status = error instanceof FetchError ? (error.status ?? 0) : 0
  const data: unknown = error instanceof FetchError ? error.data : null
  if (typeof data === 'object' && data !== null && 'title' in data && 'detail' in data) {
    const { type, title, detail, errors, status: _status, requestId: _requestId, ...extra } = data as Record<string, unknown>
    return {
      status,
      code: String(type ?? '').replace('urn:wherefore:problem:', ''),
      title: String(title),
      detail: String(detail),
      errors: Array.isArray(errors) ? errors.filter(isFieldProblem) : [],
      extra,
    }
  }
  return {
    status,
    code: 'no-connection',
    title: 'No connection',
    detail: 'Wherefore could not be reached. What you typed is still here; try again in a moment.',
    errors: [],
    extra: {},
  }
}

function isFieldProblem(value: unknown): value is { path: string, message: string } {
  return typeof value === 'object' && value !== null && 'path' in value && 'message' in value
    && typeof value.path === 'string' && typeof value.message === 'string'
}
