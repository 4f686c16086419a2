/** Somebody with a browser: keeps cookies, names the page its calls come from, and asks as our screens do. */
export interface Visitor {
  get: (path: string, headers?: Record<string, string>) => Promise<Response>
  send: (method: 'POST' | 'PUT', path: string, body: object, options?: SendOptions) => Promise<Response>
  /** Signs in through the library's own steps. @returns the answer's status */
  signIn: (email: string, password: string, headers?: Record<string, string>) => Promise<number>
  signOut: () => Promise<void>
  /** The cookies as the browser would send them now. */
  cookie: () => string
  /** Puts an earlier copy of the cookies back. */
  setCookie: (cookie: string) => void
}

export interface SendOptions { version?: number, key?: string, headers?: Record<string, string> }

export function createVisitor(origin: string): Visitor {
  const jar = new Map<string, string>()
  const cookie = (): string => [...jar].map(([name, value]) => `${name}=${value}`).join('; ')

  async function call(path: string, init: RequestInit): Promise<Response> {
    const headers = new Headers(init.headers)
    if (jar.size > 0) headers.set('cookie', cookie())
    const answer = await fetch(`${origin}${path}`, { ...init, headers, redirect: 'manual' })
    for (const line of answer.headers.getSetCookie()) {
      const [pair = '', ...attributes] = line.split(';')
      const at = pair.indexOf('=')
      const gone = attributes.some(attribute => /^\s*max-age=0$/i.test(attribute)) || pair.length === at + 1
      if (gone) jar.delete(pair.slice(0, at))
      else jar.set(pair.slice(0, at), pair.slice(at + 1))
    }
    return answer
  }

  async function form(path: string, fields: Record<string, string>, headers: Record<string, string> = {}): Promise<Response> {
    const { csrfToken } = await (await call('/api/auth/csrf', {})).json() as { csrfToken: string }
    return await call(path, {
      method: 'POST',
      headers: { 'content-type': 'application/x-www-form-urlencoded', origin, ...headers },
      body: new URLSearchParams({ ...fields, csrfToken, json: 'true' }),
    })
  }

  return {
    get: (path, headers = {}) => call(path, { headers }),
    send: (method, path, body, options = {}) => call(path, {
      method,
      headers: {
        'content-type': 'application/json',
        origin,
        'idempotency-key': options.key ?? crypto.randomUUID(),
        ...(options.version === undefined ? {} : { 'if-match': `"${options.version}"` }),
        ...options.headers,
      },
      body: JSON.stringify(body),
    }),
    async signIn(email, password, headers) {
      return (await form('/api/auth/callback/credentials', { email, password }, headers)).status
    },
    async signOut() {
      await form('/api/auth/signout', {})
    },
    cookie,
    setCookie(text) {
      jar.clear()
      for (const pair of text.split('; ')) {
        const at = pair.indexOf('=')
        jar.set(pair.slice(0, at), pair.slice(at + 1))
      }
    },
  }
}
