import { hash, verify } from '@node-rs/argon2'
import { Unavailable } from '#server/services/errors'

/** argon2id (the library's default kind) with the least that OWASP's password storage sheet accepts: 19 MiB, two passes, one lane. */
const cost = { memoryCost: 19_456, timeCost: 2, parallelism: 1 } as const

/** A hash takes a whole core for some 25 ms; two at once leave the worklists room on a small server. */
const atOnce = 2
const mostWaiting = 40

let running = 0
const waiting: (() => void)[] = []

/** Compared against when nobody has the address, so that a guess at an address costs the same time as a guess at a password. */
let decoy: Promise<string> | undefined

/** The hash to store, its parameters inside. @throws Unavailable when too many wait */
export function hashPassword(password: string): Promise<string> {
  return takingTurns(() => hash(normalize(password), cost))
}

/**
 * Whether the password is the one behind the hash. Without a hash it answers false after the same work.
 *
 * @throws Unavailable when too many wait
 */
export async function verifyPassword(stored: string | null, password: string): Promise<boolean> {
  decoy ??= hash('no such account', cost)
  const against = stored ?? await decoy
  const matches = await takingTurns(() => verify(against, normalize(password)))
  return matches && stored !== null
}

/** Whether a stored hash was made with less than today's cost and should be made again. */
export function needsRehash(stored: string): boolean {
  return !stored.startsWith(`$argon2id$v=19$m=${cost.memoryCost},t=${cost.timeCost},p=${cost.parallelism}$`)
}

/** The same password typed on another keyboard may come in another Unicode form (NIST SP 800-63B 5.1.1.2). */
function normalize(password: string): string {
  return password.normalize('NFKC')
}

async function takingTurns<T>(work: () => Promise<T>): Promise<T> {
  if (running >= atOnce) {
    if (waiting.length >= mostWaiting) throw new Unavailable('Too many people are signing in at this moment. Try again in a few seconds.')
    // The one who finishes hands its turn over, so `running` stays as it is.
    await new Promise<void>(resolve => waiting.push(resolve))
  }
  else {
    running += 1
  }
  try {
    return await work()
  }
  finally {
    const next = waiting.shift()
    if (next) next()
    else running -= 1
  }
}
