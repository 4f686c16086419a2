import { AsyncLocalStorage } from 'node:async_hooks'

/** What next-auth's callbacks cannot see of the call they run in. */
export interface AuthCall {
  requestId: string
  address: string
  /** Set where the server was too busy to check a password; the answer is then 503. */
  busy: boolean
}

const calls = new AsyncLocalStorage<AuthCall>()

export function runAuthCall<T>(call: AuthCall, work: () => Promise<T>): Promise<T> {
  return calls.run(call, work)
}

/** The call now being answered. @throws Error outside of one */
export function currentAuthCall(): AuthCall {
  const call = calls.getStore()
  if (!call) throw new Error('No sign-in call is being answered here.')
  return call
}
