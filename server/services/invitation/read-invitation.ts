import { and, eq, gt, isNull, sql } from 'drizzle-orm'
import type { InvitationView } from '#shared/types/views'
import { hashSecret } from '#server/auth/secrets'
import type { Database } from '#server/database/client'
import { invitations, users } from '#server/database/schema/people'
import type { ServiceContext } from '../context'
import { NotFound } from '../errors'
import { rulesInForce } from '../rules/in-force'

export interface OpenInvitation { id: string, userId: string, name: string, email: string, passwordHash: string | null }

/** Whose invitation a link is. Reading it neither uses it up nor changes anything. @throws NotFound, the same for unknown, used and expired ones */
export async function readInvitation({ ctx, input }: { ctx: ServiceContext, input: { token: string } }): Promise<InvitationView> {
  const { name, email, passwordHash } = await findOpenInvitation(ctx.db, input.token)
  const { rules } = await rulesInForce(ctx.db, ctx.now)
  return { name, email, department: rules.policy.department.name, again: passwordHash !== null }
}

/** @throws NotFound */
export async function findOpenInvitation(db: Database, token: string, lock = false): Promise<OpenInvitation> {
  const query = db.select({
    id: invitations.id, userId: users.id, name: users.name, email: users.email, passwordHash: users.passwordHash,
  }).from(invitations).innerJoin(users, eq(users.id, invitations.userId)).where(and(
    eq(invitations.tokenHash, hashSecret(token)),
    isNull(invitations.acceptedAt),
    gt(invitations.expiresAt, sql`now()`),
    isNull(users.disabledAt),
  ))
  const [found] = lock ? await query.for('update', { of: invitations }) : await query
  if (!found) throw new NotFound('This invitation')
  return found
}
