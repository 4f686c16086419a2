import { createHash } from 'node:crypto'
import type { Pool } from 'pg'
import type { RateLimiterPostgres } from 'rate-limiter-flexible'
import { createLimiter } from '#server/utils/limiter'

/** Wrong tries an account may have before each further one must wait. */
const freeTries = 5
/** Wrong tries from one address at one account, an hour. */
const pairTries = 10
/** Wrong tries in a row at one account, from wherever: the ceiling of NIST SP 800-63B 5.2.2. */
const accountTries = 100
/** Wrong tries from one address at any account, an hour. A hospital may sit behind one address, so it is generous. */
const addressTries = 200

const hour = 3_600
const day = 86_400

export interface SignInAttempt { account: string, address: string }

export interface SignInThrottle {
  /** Counts the try as wrong beforehand, so that tries sent at once are counted too. @returns whether it may go on */
  begin: (attempt: SignInAttempt) => Promise<boolean>
  /** The try was right: forgets the wrong ones and remembers the address. */
  succeed: (attempt: SignInAttempt) => Promise<void>
  /** A new password was set by invitation: the account starts afresh. */
  forget: (account: string) => Promise<void>
}

/**
 * Slows down guessing. An address from which the account was used before is spared the account's own waits, so that a stranger
 * who guesses cannot keep a colleague out.
 */
export function createSignInThrottle(pool: Pool): SignInThrottle {
  const made = throttles.get(pool)
  if (made) return made
  const throttle = makeThrottle(pool)
  throttles.set(pool, throttle)
  return throttle
}

/** One for each pool: a limiter clears its old counters by a timer that never ends. */
const throttles = new WeakMap<Pool, SignInThrottle>()

function makeThrottle(pool: Pool): SignInThrottle {
  const pair = createLimiter(pool, 'sign-in-pair', { points: pairTries, seconds: hour })
  const address = createLimiter(pool, 'sign-in-address', { points: addressTries, seconds: hour })
  const account = createLimiter(pool, 'sign-in-account', { points: accountTries, seconds: 30 * day })
  const pause = createLimiter(pool, 'sign-in-pause', { points: 1, seconds: hour })
  const known = createLimiter(pool, 'sign-in-known', { points: 1, seconds: 90 * day })

  return {
    async begin(attempt) {
      const keys = keysOf(attempt)
      const [before, paused] = await Promise.all([known.get(keys.pair), isBlocked(pause, keys.account)])
      const within = await Promise.all([count(pair, keys.pair), count(address, keys.address)])
      if (within.some(counted => !counted.allowed)) return false
      // A try that is not looked at tells the guesser nothing, so it does not make the account wait longer either.
      const isKnown = before !== null
      if (paused && !isKnown) return false
      const tries = await count(account, keys.account)
      if (tries.points > freeTries) await pause.block(keys.account, pauseSeconds(tries.points))
      return isKnown || tries.allowed
    },
    async succeed(attempt) {
      const keys = keysOf(attempt)
      await Promise.all([
        pair.delete(keys.pair),
        account.delete(keys.account),
        pause.delete(keys.account),
        address.reward(keys.address),
        known.set(keys.pair, 1, 90 * day),
      ])
    },
    async forget(name) {
      const keys = keysOf({ account: name, address: '' })
      await Promise.all([account.delete(keys.account), pause.delete(keys.account)])
    },
  }
}

/** 30 s after the sixth wrong try, doubling, a quarter of an hour at most. */
export function pauseSeconds(tries: number): number {
  return Math.min(30 * 2 ** Math.max(0, tries - freeTries - 1), 900)
}

function keysOf({ account, address }: SignInAttempt) {
  // Addresses of people who may not even exist do not belong in the table in the clear.
  const name = createHash('sha256').update(account).digest('hex').slice(0, 32)
  return { account: name, address, pair: `${name}:${address}` }
}

async function isBlocked(limiter: RateLimiterPostgres, key: string): Promise<boolean> {
  const found = await limiter.get(key)
  return found !== null && found.msBeforeNext > 0
}

async function count(limiter: RateLimiterPostgres, key: string): Promise<{ allowed: boolean, points: number }> {
  const counted = await limiter.penalty(key)
  return { allowed: counted.consumedPoints <= limiter.points, points: counted.consumedPoints }
}
