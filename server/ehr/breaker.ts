import type { BreakerState } from '#shared/domain/record/types'
import { EhrUnavailable } from './errors'
import type { EhrLimits } from './settings'

/** Keeps calls away from a server that keeps failing, and lets one through now and then to see whether it is back. */
export interface Breaker {
  /** Runs the call, or throws at once while the breaker is open. */
  run: <T>(call: () => Promise<T>) => Promise<T>
  state: () => BreakerState
}

export type Verdict = 'failure' | 'answer' | 'neither'

/**
 * Opens after `breakerFailures` failed calls within `breakerWindowMs` with no success between them; after
 * `breakerPauseMs` one call goes through as a trial while others wait for how it ends.
 *
 * @param verdictOn whether an error speaks against the server (`failure`), shows it at work (`answer`), or neither.
 */
export function createBreaker(limits: EhrLimits, now: () => number, verdictOn: (error: unknown) => Verdict): Breaker {
  let failures: number[] = []
  let openedAt: number | null = null
  let trial: Promise<void> | null = null

  const recent = () => {
    failures = failures.filter(at => now() - at < limits.breakerWindowMs)
    return failures.length
  }
  const paused = () => openedAt !== null && now() - openedAt < limits.breakerPauseMs
  const refuse = () => new EhrUnavailable('unreachable', 'The hospital record has not been answering; the next try is made shortly')

  function note(error: unknown, isTrial: boolean) {
    const verdict = verdictOn(error)
    if (verdict === 'answer') succeed()
    if (verdict !== 'failure') return
    failures.push(now())
    if (isTrial || recent() >= limits.breakerFailures) openedAt = now()
  }

  function succeed() {
    failures = []
    openedAt = null
  }

  async function attempt<T>(call: () => Promise<T>, isTrial: boolean): Promise<T> {
    try {
      const result = await call()
      succeed()
      return result
    }
    catch (error) {
      note(error, isTrial)
      throw error
    }
  }

  return {
    async run(call) {
      if (openedAt === null) return attempt(call, false)
      if (paused()) throw refuse()
      if (trial) {
        await trial
        if (openedAt !== null) throw refuse()
        return attempt(call, false)
      }
      const running = attempt(call, true)
      trial = running.then(() => {}, () => {}).finally(() => { trial = null })
      return running
    },
    state() {
      const counted = recent()
      if (openedAt === null) return { state: 'closed', failures: counted, retryAt: null }
      return {
        state: paused() ? 'open' : 'half-open',
        failures: counted,
        retryAt: new Date(openedAt + limits.breakerPauseMs).toISOString(),
      }
    },
  }
}
