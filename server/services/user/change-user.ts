import { and, eq, isNotNull, isNull, ne, sql } from 'drizzle-orm'
import type { z } from 'zod'
import type { changeUserSchema } from '#shared/schemas/people'
import type { UserView } from '#shared/types/views'
import type { Database } from '#server/database/client'
import { invitations, users } from '#server/database/schema/people'
import { recordAudit } from '../audit/record'
import { permitUser } from '../context'
import type { ServiceContext } from '../context'
import { Forbidden, Stale, StateConflict } from '../errors'
import { issueInvitation } from '../invitation/issue-invitation'
import { endSessionsOf } from '../session/end-session'
import { inTransaction } from '../transaction'
import { maySign } from './invite-user'
import { readUser } from './list-users'
import { setPractices } from './memberships'

/** Any fixed number: changes to accounts take turns, so that two administrators cannot remove each other at once. */
const accountsLock = 7_305_201

/**
 * Changes name, role, rights, practices, or shuts an account. What a person may do changes with their very next call: every
 * session ends unless nothing but the name changed.
 *
 * @throws NotFound, Forbidden on oneself, Stale, StateConflict where no administrator would remain.
 */
export async function changeUser({ ctx, input }: {
  ctx: ServiceContext
  input: { id: string, version: number } & z.output<typeof changeUserSchema>
}): Promise<UserView> {
  permitUser(ctx, 'user.change', { userId: input.id })
  return await inTransaction(ctx, async (tx) => {
    await takeTurn(tx)
    const before = await readUser(tx, input.id)
    if (before.version !== input.version) throw new Stale('Somebody changed this account meanwhile. Look at it again.')
    const after = {
      name: input.name,
      role: input.role,
      maySign: maySign(input),
      guidanceLead: input.role === 'radiologist' && input.guidanceLead,
      practiceIds: input.role === 'orderer' ? [...new Set(input.practiceIds)].sort() : [],
      disabled: input.disabled,
    }
    const wasDisabled = before.state === 'disabled'
    const losesAdministrator = before.role === 'administrator' && !wasDisabled && (after.role !== 'administrator' || after.disabled)
    if (losesAdministrator) await keepOneAdministrator(tx, input.id)

    await tx.update(users).set({
      name: after.name, role: after.role, maySign: after.maySign, guidanceLead: after.guidanceLead,
      disabledAt: after.disabled ? sql`coalesce(${users.disabledAt}, now())` : null,
      version: before.version + 1,
    }).where(eq(users.id, input.id))
    await setPractices(tx, input.id, after.practiceIds)
    if (after.disabled) await tx.delete(invitations).where(and(eq(invitations.userId, input.id), isNull(invitations.acceptedAt)))

    const changed = changedFields(before, after)
    const ended = changed.some(field => field !== 'name') ? await endSessionsOf(tx, input.id) : 0
    await recordAudit(tx, ctx, {
      action: after.disabled === wasDisabled ? 'user.change' : after.disabled ? 'user.disable' : 'user.enable',
      objectType: 'user',
      objectId: input.id,
      detail: { changed, roleBefore: before.role, roleAfter: after.role, sessionsEnded: ended },
    })
    return await readUser(tx, input.id)
  })
}

/** Sends a link to set a new password: to somebody who never accepted, or who forgot theirs. */
export async function inviteAgain({ ctx, input }: { ctx: ServiceContext, input: { id: string } }): Promise<UserView> {
  permitUser(ctx, 'user.change', { userId: input.id })
  return await inTransaction(ctx, async (tx) => {
    const user = await readUser(tx, input.id)
    if (user.state === 'disabled') throw new StateConflict('This account is disabled. Enable it first.')
    const [row] = await tx.select({ demo: users.demo }).from(users).where(eq(users.id, input.id))
    if (row?.demo) throw new Forbidden('Demonstration accounts keep their shared pass phrase.')
    await issueInvitation(tx, ctx, { userId: input.id, first: user.state === 'invited' })
    await recordAudit(tx, ctx, { action: 'user.invite', objectType: 'user', objectId: input.id, detail: { again: true } })
    return user
  })
}

async function takeTurn(tx: Database): Promise<void> {
  await tx.execute(sql`select pg_advisory_xact_lock(${accountsLock})`)
}

async function keepOneAdministrator(tx: Database, leaving: string): Promise<void> {
  const [other] = await tx.select({ id: users.id }).from(users).where(and(
    eq(users.role, 'administrator'), ne(users.id, leaving), isNull(users.disabledAt), isNotNull(users.passwordHash),
  )).limit(1)
  if (!other) throw new StateConflict('This is the last administrator. Make another one first.')
}

function changedFields(
  before: UserView,
  after: { name: string, role: string, maySign: boolean, guidanceLead: boolean, practiceIds: string[], disabled: boolean },
): string[] {
  const changed = (['name', 'role', 'maySign', 'guidanceLead'] as const).filter(field => before[field] !== after[field]).map(String)
  if (before.practices.map(practice => practice.id).sort().join() !== after.practiceIds.join()) changed.push('practices')
  if ((before.state === 'disabled') !== after.disabled) changed.push('disabled')
  return changed
}
