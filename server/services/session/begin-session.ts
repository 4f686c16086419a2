import { and, eq, isNull, sql } from 'drizzle-orm'
import { sessions, users } from '#server/database/schema/people'
import { absoluteSeconds } from '#server/auth/cookie'
import { hashSecret, newSecret } from '#server/auth/secrets'
import { hashPassword, needsRehash, verifyPassword } from '#server/auth/password'
import type { SignInThrottle } from '#server/auth/throttle'
import { recordAudit } from '../audit/record'
import type { ServiceContext } from '../context'
import { inTransaction } from '../transaction'

export interface BeginSessionInput {
  email: string
  password: string
  address: string
  /** Demo accounts are let in only where the demo setting is on. */
  demo: boolean
  throttle: SignInThrottle
}

/** Who signed in, with the secret for the cookie. */
export interface BegunSession { userId: string, secret: string }

/**
 * Checks e-mail address and password and begins a session. Every refusal is the same null after the same work: an unknown
 * address, a wrong password, an account that is disabled, not yet accepted, slowed down or for demonstration only.
 *
 * @throws Unavailable when too many passwords are being checked.
 */
export async function beginSession({ ctx, input }: { ctx: ServiceContext, input: BeginSessionInput }): Promise<BegunSession | null> {
  const email = input.email.trim().toLowerCase()
  const attempt = { account: email, address: input.address }
  const allowed = await input.throttle.begin(attempt)
  const [user] = await ctx.db.select({
    id: users.id, name: users.name, role: users.role, maySign: users.maySign, guidanceLead: users.guidanceLead,
    passwordHash: users.passwordHash, demo: users.demo, disabledAt: users.disabledAt,
  }).from(users).where(eq(sql`lower(${users.email})`, email))
  const matches = await verifyPassword(user?.passwordHash ?? null, input.password)

  if (!user || !matches || !allowed || user.disabledAt || (user.demo && !input.demo)) {
    await recordAudit(ctx.db, ctx, {
      action: 'session.refuse',
      objectType: 'user',
      objectId: user?.id ?? null,
      outcome: 'refused',
      detail: { address: input.address, why: whyRefused({ known: user !== undefined, matches, allowed, disabled: user?.disabledAt !== null }) },
    })
    return null
  }

  const secret = newSecret()
  const renewed = user.passwordHash && needsRehash(user.passwordHash) ? await hashPassword(input.password) : null
  const actor = { userId: user.id, name: user.name, role: user.role, maySign: user.maySign, guidanceLead: user.guidanceLead, practiceIds: [] }
  await inTransaction(ctx, async (tx) => {
    await tx.insert(sessions).values({
      idHash: hashSecret(secret),
      userId: user.id,
      createdAt: sql`now()`,
      lastSeenAt: sql`now()`,
      expiresAt: sql`now() + make_interval(secs => ${absoluteSeconds})`,
    })
    if (renewed) {
      await tx.update(users).set({ passwordHash: renewed })
        .where(and(eq(users.id, user.id), eq(users.passwordHash, user.passwordHash ?? ''), isNull(users.disabledAt)))
    }
    await recordAudit(tx, { ...ctx, actor: { kind: 'user', ...actor } }, {
      action: 'session.begin', objectType: 'user', objectId: user.id, detail: { address: input.address, factor: 'password' },
    })
  })
  await input.throttle.succeed(attempt)
  return { userId: user.id, secret }
}

/** For the trail alone; the person at the door is told nothing. */
function whyRefused(facts: { known: boolean, matches: boolean, allowed: boolean, disabled: boolean }): string {
  if (!facts.allowed) return 'too many tries'
  if (!facts.known) return 'unknown address'
  if (!facts.matches) return 'wrong password'
  return facts.disabled ? 'disabled' : 'demo account'
}
