import { eq, sql } from 'drizzle-orm'
import type { z } from 'zod'
import type { inviteSchema } from '#shared/schemas/people'
import type { UserView } from '#shared/types/views'
import { users } from '#server/database/schema/people'
import { recordAudit } from '../audit/record'
import type { ServiceContext } from '../context'
import { Invalid } from '../errors'
import { issueInvitation } from '../invitation/issue-invitation'
import { inTransaction } from '../transaction'
import { readUser } from './list-users'
import { setPractices } from './memberships'

/** Makes an account without a password and sends its owner a link to set one. @throws Invalid where the address is taken */
export async function inviteUser({ ctx, input }: { ctx: ServiceContext, input: z.output<typeof inviteSchema> }): Promise<UserView> {
  return await inTransaction(ctx, async (tx) => {
    const email = input.email.toLowerCase()
    const [taken] = await tx.select({ id: users.id }).from(users).where(eq(sql`lower(${users.email})`, email))
    if (taken) throw new Invalid([{ path: 'email', message: 'Somebody with this e-mail address has an account already.' }])
    const [made] = await tx.insert(users).values({
      name: input.name, email, role: input.role, maySign: maySign(input), guidanceLead: input.role === 'radiologist' && input.guidanceLead,
    }).returning({ id: users.id })
    if (!made) throw new Error('The account was not made.')
    await setPractices(tx, made.id, input.role === 'orderer' ? input.practiceIds : [])
    await issueInvitation(tx, ctx, { userId: made.id, first: true })
    await recordAudit(tx, ctx, {
      action: 'user.invite', objectType: 'user', objectId: made.id,
      detail: { role: input.role, maySign: maySign(input), practices: input.practiceIds.length },
    })
    return await readUser(tx, made.id)
  })
}

/** Only those who order or decide sign anything. */
export function maySign(input: { role: string, maySign: boolean }): boolean {
  return input.maySign && (input.role === 'orderer' || input.role === 'radiologist')
}
