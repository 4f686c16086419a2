import { and, asc, eq, inArray, isNull, sql } from 'drizzle-orm'
import type { Actor } from '#shared/domain/access/roles'
import type { MeView } from '#shared/types/views'
import { idleMinutes } from '#server/auth/cookie'
import type { Database } from '#server/database/client'
import { practices, users } from '#server/database/schema/people'
import { requests } from '#server/database/schema/requests'
import { userOf } from '../context'
import type { ServiceContext } from '../context'
import { Unauthenticated } from '../errors'
import { rulesInForce } from '../rules/in-force'

/** A badge shows no more than this; counting stops there, however long the list. */
const mostCounted = 999

/** Who is signed in, what they may see of their department, and how much open work waits. */
export async function readMe({ ctx }: { ctx: ServiceContext }): Promise<MeView> {
  const actor = userOf(ctx)
  const [own, { rules }, [preferences], counts] = await Promise.all([
    ownPractices(ctx.db, actor),
    rulesInForce(ctx.db, ctx.now),
    ctx.db.select({ shortcuts: users.shortcuts }).from(users).where(eq(users.id, actor.userId)),
    countOpenWork(ctx.db, actor),
  ])
  if (!preferences) throw new Unauthenticated()
  const { name, timeZone, phone } = rules.policy.department
  const { userId, role, maySign, guidanceLead, practiceIds } = actor
  return {
    actor: { userId, name: actor.name, role, maySign, guidanceLead, practiceIds },
    practices: own,
    shortcuts: preferences.shortcuts,
    department: { name, timeZone, phone },
    counts,
    idleMinutes,
  }
}

async function ownPractices(db: Database, actor: Actor): Promise<MeView['practices']> {
  if (actor.practiceIds.length === 0) return []
  return await db.select({ id: practices.id, name: practices.name }).from(practices)
    .where(and(inArray(practices.id, [...actor.practiceIds]), isNull(practices.disabledAt))).orderBy(asc(practices.name))
}

async function countOpenWork(db: Database, actor: Actor): Promise<MeView['counts']> {
  const nothing = { requests: 0, review: 0, preparation: 0 }
  if (actor.role === 'orderer' && actor.practiceIds.length > 0) {
    return {
      ...nothing,
      requests: await countUpTo(db, and(inArray(requests.practiceId, [...actor.practiceIds]), eq(requests.awaiting, 'ordering'), inArray(requests.state, ['queried', 'approved', 'booked', 'reopened']))),
    }
  }
  if (actor.role === 'radiologist') {
    return { ...nothing, review: await countUpTo(db, inArray(requests.state, ['sent', 'reopened'])) }
  }
  if (actor.role === 'scheduler') {
    return { ...nothing, preparation: await countUpTo(db, inArray(requests.state, ['approved', 'booked'])) }
  }
  return nothing
}

async function countUpTo(db: Database, where: ReturnType<typeof and>): Promise<number> {
  const some = db.select({ one: sql`1` }).from(requests).where(where).limit(mostCounted).as('some')
  const [row] = await db.select({ count: sql<number>`count(*)::integer` }).from(some)
  return row?.count ?? 0
}
