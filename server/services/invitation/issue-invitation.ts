import { and, eq, isNull, sql } from 'drizzle-orm'
import type { Database } from '#server/database/client'
import { invitations } from '#server/database/schema/people'
import { enqueue } from '#server/jobs/queue'
import { userOf } from '../context'
import type { ServiceContext } from '../context'

/** How long the link in the message works: for a first password, and for a new one in place of a forgotten one. */
const firstHours = 72
const againMinutes = 30

/**
 * Writes an invitation and queues its message; earlier open ones stop working. The link's token is made when the message is
 * written, so that the database never holds it.
 */
export async function issueInvitation(tx: Database, ctx: ServiceContext, input: { userId: string, first: boolean }): Promise<void> {
  await tx.delete(invitations).where(and(eq(invitations.userId, input.userId), isNull(invitations.acceptedAt)))
  const [made] = await tx.insert(invitations).values({
    userId: input.userId,
    invitedById: userOf(ctx).userId,
    createdAt: sql`now()`,
    expiresAt: input.first ? sql`now() + make_interval(hours => ${firstHours})` : sql`now() + make_interval(mins => ${againMinutes})`,
  }).returning({ id: invitations.id })
  if (made) await enqueue(tx, 'deliver-invitation', { invitationId: made.id })
}
