import { and, eq, gt, isNull, sql } from 'drizzle-orm'
import type { Actor } from '#shared/domain/access/roles'
import type { Database } from '#server/database/client'
import { memberships, practices, sessions, users } from '#server/database/schema/people'
import { idleMinutes } from '#server/auth/cookie'

export interface FoundSession { actor: Actor, demo: boolean, isStale: boolean }

/** How exactly idleness is known, seconds: a busy screen writes no more often than this. */
const seenEverySeconds = 30

/**
 * The person behind a session that is still open, with role and practices as they are at this moment. One query; the database's
 * clock decides on idleness and expiry.
 */
export async function findSession(db: Database, idHash: string): Promise<FoundSession | null> {
  const [row] = await db.select({
    userId: users.id,
    name: users.name,
    role: users.role,
    maySign: users.maySign,
    guidanceLead: users.guidanceLead,
    demo: users.demo,
    practiceIds: sql<string[]>`array(
      select ${memberships.practiceId} from ${memberships}
      join ${practices} on ${practices.id} = ${memberships.practiceId} and ${practices.disabledAt} is null
      where ${memberships.userId} = ${users.id})`,
    isStale: sql<boolean>`${sessions.lastSeenAt} < now() - make_interval(secs => ${seenEverySeconds})`,
  }).from(sessions).innerJoin(users, eq(users.id, sessions.userId)).where(and(
    eq(sessions.idHash, idHash),
    isNull(sessions.endedAt),
    isNull(users.disabledAt),
    gt(sessions.expiresAt, sql`now()`),
    gt(sessions.lastSeenAt, sql`now() - make_interval(mins => ${idleMinutes})`),
  ))
  if (!row) return null
  const { demo, isStale, ...actor } = row
  return { actor, demo, isStale }
}

/** Notes that a person did something, so that the session does not end for idleness. */
export async function touchSession(db: Database, idHash: string): Promise<void> {
  await db.update(sessions).set({ lastSeenAt: sql`now()` }).where(and(
    eq(sessions.idHash, idHash),
    isNull(sessions.endedAt),
    sql`${sessions.lastSeenAt} < now() - make_interval(secs => ${seenEverySeconds})`,
  ))
}
