import { asc, eq, sql } from 'drizzle-orm'
import type { SQL } from 'drizzle-orm'
import type { UserView } from '#shared/types/views'
import type { Database } from '#server/database/client'
import { users } from '#server/database/schema/people'
import type { ServiceContext } from '../context'
import { NotFound } from '../errors'

/** A department has hundreds of accounts; beyond this the list would be of no use to anybody. */
const mostListed = 2_000

/** Every account, by name. */
export async function listUsers({ ctx }: { ctx: ServiceContext }): Promise<{ rows: UserView[] }> {
  return { rows: await selectUsers(ctx.db, sql`true`) }
}

/** One account as the list shows it. @throws NotFound */
export async function readUser(db: Database, id: string): Promise<UserView> {
  const [user] = await selectUsers(db, eq(users.id, id))
  if (!user) throw new NotFound('This account')
  return user
}

async function selectUsers(db: Database, where: SQL): Promise<UserView[]> {
  const rows = await db.select({
    id: users.id,
    name: users.name,
    email: users.email,
    role: users.role,
    maySign: users.maySign,
    guidanceLead: users.guidanceLead,
    version: users.version,
    disabledAt: users.disabledAt,
    accepted: sql<boolean>`${users.passwordHash} is not null`,
    // Spelled out: in a query over one table drizzle drops the table's name from columns, which a subquery needs.
    practices: sql<{ id: string, name: string }[]>`coalesce((
      select json_agg(json_build_object('id', p.id, 'name', p.name) order by lower(p.name))
      from memberships m join practices p on p.id = m.practice_id where m.user_id = users.id), '[]'::json)`,
    lastSeenAt: sql<string | null>`(select max(s.last_seen_at) from sessions s where s.user_id = users.id)`,
  }).from(users).where(where).orderBy(asc(sql`lower(${users.name})`), asc(users.id)).limit(mostListed)
  return rows.map(({ disabledAt, accepted, lastSeenAt, ...row }) => ({
    ...row,
    state: disabledAt ? 'disabled' : accepted ? 'active' : 'invited',
    lastSeenAt: lastSeenAt === null ? null : new Date(lastSeenAt).toISOString(),
  }))
}
