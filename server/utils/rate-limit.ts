import { RateLimiterRes } from 'rate-limiter-flexible'
import type { RateLimiterPostgres } from 'rate-limiter-flexible'
import { TooMany } from '#server/services/errors'
import { useApp } from './app'
import { createLimiter } from './limiter'

/** How often, within how many seconds. Counted in the database, so that all servers count together. */
const rules = {
  'patient-search': { points: 60, seconds: 60 },
  'record-reading': { points: 6, seconds: 60 },
  'submit': { points: 30, seconds: 60 },
  'link': { points: 10, seconds: 60 },
  'invitation-accept': { points: 10, seconds: 600 },
} as const

export type LimitName = keyof typeof rules

const limiters = new Map<LimitName, RateLimiterPostgres>()

/**
 * Counts one use. `who` is a user id, an address, a patient id: whoever the limit is for.
 *
 * @throws TooMany before any work is done, with the seconds to wait.
 */
export async function limitRate(name: LimitName, who: string): Promise<void> {
  let limiter = limiters.get(name)
  if (!limiter) {
    limiter = createLimiter(useApp().pool, name, rules[name])
    limiters.set(name, limiter)
  }
  try {
    await limiter.consume(who)
  }
  catch (refused) {
    if (refused instanceof RateLimiterRes) throw new TooMany(Math.max(1, Math.ceil(refused.msBeforeNext / 1000)))
    throw refused
  }
}
