import { and, desc, eq, gt, isNull, ne, sql } from 'drizzle-orm'
import type { ExplanationView } from '#shared/types/views'
import { hashSecret } from '#server/auth/secrets'
import { explanationVisits, letterLinks, letters } from '#server/database/schema/requests'
import type { ServiceContext } from '../context'
import { rulesInForce } from '../rules/in-force'
import { ExplanationClosed } from './closed'

/**
 * What the patient's page shows during a visit: the newest letter on the same exam, so that nobody reads an old time from an old
 * link.
 *
 * @throws ExplanationClosed where the visit is over.
 */
export async function readExplanation({ ctx, input }: { ctx: ServiceContext, input: { visit: string | null } }): Promise<ExplanationView> {
  const { department } = (await rulesInForce(ctx.db, ctx.now)).rules.policy
  if (!input.visit) throw new ExplanationClosed(department)
  const [visit] = await ctx.db.select({ requestId: letters.requestId }).from(explanationVisits)
    .innerJoin(letterLinks, eq(letterLinks.tokenHash, explanationVisits.tokenHash))
    .innerJoin(letters, eq(letters.id, letterLinks.letterId))
    .where(and(
      eq(explanationVisits.idHash, hashSecret(input.visit)),
      gt(explanationVisits.expiresAt, sql`now()`),
      gt(letterLinks.expiresAt, sql`now()`),
      isNull(letterLinks.revokedAt),
    ))
  if (!visit) throw new ExplanationClosed(department)
  const [newest] = await ctx.db.select({ content: letters.content }).from(letters)
    .where(and(eq(letters.requestId, visit.requestId), ne(letters.state, 'cancelled')))
    .orderBy(desc(letters.queuedAt)).limit(1)
  if (!newest) throw new ExplanationClosed(department)
  const { name, phone, callHours, timeZone } = department
  return { letter: newest.content, department: { name, phone, callHours, timeZone } }
}
