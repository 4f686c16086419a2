import { eq } from 'drizzle-orm'
import { users } from '#server/database/schema/people'
import { userOf } from '../context'
import type { ServiceContext } from '../context'

/** Turns single-key shortcuts on or off for oneself. */
export async function changePreferences({ ctx, input }: { ctx: ServiceContext, input: { shortcuts: boolean } }): Promise<{ shortcuts: boolean }> {
  await ctx.db.update(users).set({ shortcuts: input.shortcuts }).where(eq(users.id, userOf(ctx).userId))
  return { shortcuts: input.shortcuts }
}
