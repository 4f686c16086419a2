import { eq, sql } from 'drizzle-orm'
import { hashSecret, newSecret } from '#server/auth/secrets'
import { invitations, users } from '#server/database/schema/people'
import { renderMail } from '#server/mail/render'
import { invitationMail } from '#server/mail/templates/invitation'
import type { ServiceContext } from '../context'
import type { MailOut } from '../letter/deliver-letter'
import { rulesInForce } from '../rules/in-force'
import { inTransaction } from '../transaction'

interface Prepared { name: string, email: string, again: boolean, token: string, minutesLeft: number }

/**
 * Sends the link with which a colleague chooses a password. The token is made here and kept only in the message; each try has a
 * token and a Message-ID of its own, since a new token ends the one before.
 *
 * @throws MailFailure
 */
export async function deliverInvitation({ ctx, input, mail }: {
  ctx: ServiceContext
  input: { invitationId: string, attempt: number, signal?: AbortSignal }
  mail: MailOut
}): Promise<'delivered' | 'skipped'> {
  const { department } = (await rulesInForce(ctx.db, ctx.now)).rules.policy
  const prepared = await prepare(ctx, input.invitationId)
  if (!prepared) return 'skipped'
  const rendered = await renderMail(invitationMail({
    name: prepared.name,
    department: department.name,
    phone: department.phone,
    href: `${new URL(mail.origin).origin}/invitation/${prepared.token}`,
    again: prepared.again,
    validFor: durationWords(prepared.minutesLeft),
  }))
  await mail.mailer.send({ ...rendered, to: prepared.email, id: `invitation-${input.invitationId}-${input.attempt}` }, input.signal)
  return 'delivered'
}

/** Null where it was accepted, ran out, was replaced, or its account is disabled. */
async function prepare(ctx: ServiceContext, invitationId: string): Promise<Prepared | null> {
  return await inTransaction(ctx, async (tx) => {
    const [row] = await tx.select({
      name: users.name,
      email: users.email,
      again: sql<boolean>`${users.passwordHash} is not null`,
      disabledAt: users.disabledAt,
      acceptedAt: invitations.acceptedAt,
      minutesLeft: sql<number>`(extract(epoch from ${invitations.expiresAt} - now()) / 60)::double precision`,
    }).from(invitations).innerJoin(users, eq(users.id, invitations.userId))
      .where(eq(invitations.id, invitationId)).for('update', { of: invitations })
    if (!row || row.acceptedAt || row.disabledAt || row.minutesLeft <= 0) return null
    const token = newSecret()
    await tx.update(invitations).set({ tokenHash: hashSecret(token) }).where(eq(invitations.id, invitationId))
    return { name: row.name, email: row.email, again: row.again, token, minutesLeft: row.minutesLeft }
  })
}

/** "3 days", "5 hours", "30 minutes", "1 minute": rounded, in the largest unit of which there are two. */
export function durationWords(minutes: number): string {
  const [count, unit] = minutes >= 2 * 24 * 60 ? [minutes / (24 * 60), 'day'] : minutes >= 2 * 60 ? [minutes / 60, 'hour'] : [minutes, 'minute']
  const whole = Math.max(1, Math.round(count))
  return `${whole} ${unit}${whole === 1 ? '' : 's'}`
}
