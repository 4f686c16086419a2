import { asc, eq, sql } from 'drizzle-orm'
import type { SQL } from 'drizzle-orm'
import type { PracticeView } from '#shared/types/views'
import type { Database } from '#server/database/client'
import { practices } from '#server/database/schema/people'
import type { ServiceContext } from '../context'
import { NotFound } from '../errors'

/** Far more than a department works with. */
const mostListed = 2_000

/** Every practice, by name. */
export async function listPractices({ ctx }: { ctx: ServiceContext }): Promise<{ rows: PracticeView[] }> {
  return { rows: await selectPractices(ctx.db, sql`true`) }
}

/** One practice as the list shows it. @throws NotFound */
export async function readPractice(db: Database, id: string): Promise<PracticeView> {
  const [practice] = await selectPractices(db, eq(practices.id, id))
  if (!practice) throw new NotFound('This practice')
  return practice
}

async function selectPractices(db: Database, where: SQL): Promise<PracticeView[]> {
  return await db.select({
    id: practices.id,
    name: practices.name,
    phone: practices.phone,
    version: practices.version,
    disabled: sql<boolean>`${practices.disabledAt} is not null`,
    // Spelled out: in a query over one table drizzle drops the table's name from columns, which a subquery needs.
    users: sql<number>`(select count(*)::integer from memberships m where m.practice_id = practices.id)`,
  }).from(practices).where(where).orderBy(asc(sql`lower(${practices.name})`), asc(practices.id)).limit(mostListed)
}
