import { eq, inArray } from 'drizzle-orm'
import type { Database } from '#server/database/client'
import { memberships, practices } from '#server/database/schema/people'
import { Invalid } from '../errors'

/** Makes these the person's practices, and no others. @throws Invalid where one does not exist */
export async function setPractices(tx: Database, userId: string, practiceIds: readonly string[]): Promise<void> {
  const wanted = [...new Set(practiceIds)]
  if (wanted.length > 0) {
    const found = await tx.select({ id: practices.id }).from(practices).where(inArray(practices.id, wanted))
    if (found.length !== wanted.length) throw new Invalid([{ path: 'practiceIds', message: 'One of these practices does not exist any more.' }])
  }
  await tx.delete(memberships).where(eq(memberships.userId, userId))
  if (wanted.length > 0) await tx.insert(memberships).values(wanted.map(practiceId => ({ userId, practiceId })))
}
