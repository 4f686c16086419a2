import { and, eq, isNull, sql } from 'drizzle-orm'
import type { Database } from '#server/database/client'
import { sessions, users } from '#server/database/schema/people'
import { hashSecret } from '#server/auth/secrets'
import { recordAudit } from '../audit/record'
import type { ServiceContext } from '../context'
import { inTransaction } from '../transaction'

/** Ends one session at sign-out; a cookie copied before opens nothing afterwards. Ending twice is harmless. */
export async function endSession({ ctx, input }: { ctx: ServiceContext, input: { secret: string } }): Promise<void> {
  await inTransaction(ctx, async (tx) => {
    const [ended] = await tx.update(sessions).set({ endedAt: sql`now()` })
      .where(and(eq(sessions.idHash, hashSecret(input.secret)), isNull(sessions.endedAt)))
      .returning({ userId: sessions.userId })
    if (!ended) return
    const [user] = await tx.select({
      userId: users.id, name: users.name, role: users.role, maySign: users.maySign, guidanceLead: users.guidanceLead,
    }).from(users).where(eq(users.id, ended.userId))
    if (!user) return
    await recordAudit(tx, { ...ctx, actor: { kind: 'user', ...user, practiceIds: [] } }, {
      action: 'session.end', objectType: 'user', objectId: user.userId,
    })
  })
}

/** Ends every session of a person at once: the next call of each is refused. */
export async function endSessionsOf(tx: Database, userId: string): Promise<number> {
  const ended = await tx.update(sessions).set({ endedAt: sql`now()` })
    .where(and(eq(sessions.userId, userId), isNull(sessions.endedAt)))
    .returning({ idHash: sessions.idHash })
  return ended.length
}
