import { and, eq, ne, sql } from 'drizzle-orm'
import type { z } from 'zod'
import type { practiceSchema } from '#shared/schemas/people'
import type { PracticeView } from '#shared/types/views'
import type { Database } from '#server/database/client'
import { practices } from '#server/database/schema/people'
import { recordAudit } from '../audit/record'
import type { ServiceContext } from '../context'
import { Invalid, Stale } from '../errors'
import { inTransaction } from '../transaction'
import { readPractice } from './list-practices'

type PracticeInput = z.output<typeof practiceSchema>

/** Adds a practice. @throws Invalid where the name is taken */
export async function createPractice({ ctx, input }: { ctx: ServiceContext, input: PracticeInput }): Promise<PracticeView> {
  return await inTransaction(ctx, async (tx) => {
    await assertNameFree(tx, input.name, null)
    const [made] = await tx.insert(practices).values({ name: input.name, phone: input.phone, disabledAt: input.disabled ? ctx.now : null })
      .returning({ id: practices.id })
    if (!made) throw new Error('The practice was not made.')
    await recordAudit(tx, ctx, { action: 'practice.create', objectType: 'practice', objectId: made.id, practiceId: made.id })
    return await readPractice(tx, made.id)
  })
}

/** Changes name, telephone, or closes it: its people then see none of its requests from their next call on. @throws NotFound, Stale, Invalid */
export async function changePractice({ ctx, input }: { ctx: ServiceContext, input: { id: string, version: number } & PracticeInput }): Promise<PracticeView> {
  return await inTransaction(ctx, async (tx) => {
    const before = await readPractice(tx, input.id)
    await assertNameFree(tx, input.name, input.id)
    const [changed] = await tx.update(practices).set({
      name: input.name,
      phone: input.phone,
      disabledAt: input.disabled ? sql`coalesce(${practices.disabledAt}, now())` : null,
      version: input.version + 1,
    }).where(and(eq(practices.id, input.id), eq(practices.version, input.version))).returning({ id: practices.id })
    if (!changed) throw new Stale('Somebody changed this practice meanwhile. Look at it again.')
    const fields = (['name', 'phone', 'disabled'] as const).filter(field => before[field] !== input[field])
    await recordAudit(tx, ctx, { action: 'practice.change', objectType: 'practice', objectId: input.id, practiceId: input.id, detail: { changed: fields } })
    return await readPractice(tx, input.id)
  })
}

async function assertNameFree(tx: Database, name: string, except: string | null): Promise<void> {
  const [taken] = await tx.select({ id: practices.id }).from(practices)
    .where(and(eq(sql`lower(${practices.name})`, name.toLowerCase()), except ? ne(practices.id, except) : undefined))
  if (taken) throw new Invalid([{ path: 'name', message: 'A practice of this name exists already.' }])
}
