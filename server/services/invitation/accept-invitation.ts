import { and, eq, isNull, sql } from 'drizzle-orm'
import { hashPassword } from '#server/auth/password'
import type { SignInThrottle } from '#server/auth/throttle'
import { invitations, users } from '#server/database/schema/people'
import { judgePassword } from '#shared/domain/access/password'
import { recordAudit } from '../audit/record'
import type { ServiceContext } from '../context'
import { Invalid } from '../errors'
import { rulesInForce } from '../rules/in-force'
import { endSessionsOf } from '../session/end-session'
import { inTransaction } from '../transaction'
import { findOpenInvitation } from './read-invitation'

/**
 * Sets the password that the invited person chose. The link is used up, every session of the account ends, and nobody is
 * signed in by it.
 *
 * @throws NotFound for a link that is unknown, used or expired; Invalid where the password is too easy to guess.
 */
export async function acceptInvitation({ ctx, input }: {
  ctx: ServiceContext
  input: { token: string, password: string, throttle: SignInThrottle }
}): Promise<{ email: string }> {
  const invited = await findOpenInvitation(ctx.db, input.token)
  const { rules } = await rulesInForce(ctx.db, ctx.now)
  const weakness = judgePassword(input.password, { name: invited.name, email: invited.email, department: rules.policy.department.name })
  if (weakness) throw new Invalid([{ path: 'password', message: weakness }])
  // Outside the transaction: hashing may wait its turn.
  const passwordHash = await hashPassword(input.password)
  await inTransaction(ctx, async (tx) => {
    const open = await findOpenInvitation(tx, input.token, true)
    await tx.update(users).set({ passwordHash, version: sql`${users.version} + 1` }).where(eq(users.id, open.userId))
    await tx.update(invitations).set({ acceptedAt: sql`now()` }).where(eq(invitations.id, open.id))
    await tx.delete(invitations).where(and(eq(invitations.userId, open.userId), isNull(invitations.acceptedAt)))
    const sessionsEnded = await endSessionsOf(tx, open.userId)
    await recordAudit(tx, ctx, { action: 'user.accept', objectType: 'user', objectId: open.userId, detail: { again: open.passwordHash !== null, sessionsEnded } })
  })
  await input.throttle.forget(invited.email.toLowerCase())
  return { email: invited.email }
}
