import { setTimeout as sleep } from 'node:timers/promises'
import { EhrUnavailable } from './errors'
import type { EhrLimits } from './settings'

/** Longest wait a server may ask for and still be waited on, milliseconds. */
const longestWaitMs = 60_000

export interface RetryClock {
  now: () => number
  /** Between 0 and 1; spreads retries of many callers. */
  random: () => number
}

/**
 * Runs a read again after a failure that may pass: at most `tries` times and `callMs` of work, of which each call is told
 * how much it may use. A wait the server asks for
 * is kept where it ends before `deadline`; where it would not, the failure is reported at once.
 */
export async function withRetries<T>(
  call: (budgetMs: number) => Promise<T>, limits: EhrLimits, clock: RetryClock, signal: AbortSignal, deadline: number,
): Promise<T> {
  let worked = 0
  for (let attempt = 1; ; attempt += 1) {
    const started = clock.now()
    try {
      return await call(Math.min(limits.requestMs, limits.callMs - worked))
    }
    catch (error) {
      worked += clock.now() - started
      if (!(error instanceof EhrUnavailable) || !mayPass(error) || attempt >= limits.tries || signal.aborted) throw error
      const wait = error.retryAfterMs ?? backOff(attempt, clock.random())
      if (worked >= limits.callMs || wait > longestWaitMs || clock.now() + wait >= deadline) throw error
      await sleep(wait, undefined, { signal }).catch(() => { throw error })
    }
  }
}

/** 0.5 s, 1 s, 2 s, each between half and the whole of it. */
const backOff = (attempt: number, random: number): number => 500 * 2 ** (attempt - 1) * (0.5 + random / 2)

function mayPass(error: EhrUnavailable): boolean {
  if (error.problem === 'busy') return true
  if (error.problem === 'unreachable') return error.status === null || error.status >= 500
  return error.problem === 'unreadable' && error.status === null
}
