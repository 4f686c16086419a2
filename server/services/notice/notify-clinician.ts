import { eq } from 'drizzle-orm'
import type { RequestState } from '#shared/domain/request/lifecycle'
import { alias } from 'drizzle-orm/pg-core'
import { users } from '#server/database/schema/people'
import { requests } from '#server/database/schema/requests'
import { renderMail } from '#server/mail/render'
import { noticeMail } from '#server/mail/templates/notice'
import type { NoticeEvent } from '#server/mail/templates/notice'
import type { ServiceContext } from '../context'
import type { MailOut } from '../letter/deliver-letter'
import { rulesInForce } from '../rules/in-force'

const signer = alias(users, 'signer')
const preparer = alias(users, 'preparer')

/** States in which the news still is news; anything else means that it was taken back or overtaken. */
const stillTrue = {
  query: ['queried'],
  answer: ['sent', 'queried', 'approved', 'booked', 'reopened', 'declined', 'refused', 'done', 'closed'],
  decision: ['approved', 'booked', 'declined', 'refused', 'done', 'closed'],
  reopened: ['reopened'],
} as const satisfies Record<NoticeEvent, readonly RequestState[]>

/**
 * Writes to the clinician who signed the request, or to who prepared it where that account is closed. Only the request's number
 * is in it.
 *
 * @throws MailFailure
 */
export async function notifyClinician({ ctx, input, mail }: {
  ctx: ServiceContext
  input: { requestId: string, event: NoticeEvent, messageId: string, signal?: AbortSignal }
  mail: MailOut
}): Promise<'delivered' | 'skipped'> {
  const [row] = await ctx.db.select({ reference: requests.reference, state: requests.state, awaiting: requests.awaiting, signer, preparer }).from(requests)
    .innerJoin(preparer, eq(preparer.id, requests.preparedById))
    .leftJoin(signer, eq(signer.id, requests.signedById))
    .where(eq(requests.id, input.requestId))
  if (!row?.reference || !(stillTrue[input.event] as readonly RequestState[]).includes(row.state)) return 'skipped'
  if (input.event === 'query' && row.awaiting !== 'ordering') return 'skipped'
  const reader = [row.signer, row.preparer].find(user => user && !user.disabledAt)
  if (!reader) return 'skipped'
  const { department } = (await rulesInForce(ctx.db, ctx.now)).rules.policy
  const rendered = await renderMail(noticeMail({
    event: input.event,
    reference: row.reference,
    department: department.name,
    phone: department.phone,
    href: `${new URL(mail.origin).origin}/requests/${row.reference}`,
  }))
  await mail.mailer.send({ ...rendered, to: reader.email, id: input.messageId }, input.signal)
  return 'delivered'
}
