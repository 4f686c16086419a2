import { and, asc, inArray, sql } from 'drizzle-orm'
import type { SQL } from 'drizzle-orm'
import { z } from 'zod'
import { watchedKidneyLines } from '#shared/domain/assessment/kidney-line'
import type { reviewQuery } from '#shared/schemas/requests'
import type { ReviewView } from '#shared/types/views'
import { requests } from '#server/database/schema/requests'
import type { ServiceContext } from '../context'
import { decodeCursor, encodeCursor } from '../cursor'
import { rulesInForce } from '../rules/in-force'
import { rowView, selectRows } from './row'

const mark = z.tuple([z.number().int(), z.iso.datetime(), z.uuid()])
const openForReview = sql`${requests.state} in ('sent', 'queried', 'reopened')`

/** The radiologists' queue: most pressing priority first, then what is due first. Reads open requests only. */
export async function listReview({ ctx, input }: { ctx: ServiceContext, input: z.output<typeof reviewQuery> }): Promise<ReviewView> {
  const filters: SQL[] = [openForReview]
  const chosen = filterFor(input.filter)
  if (chosen) filters.push(chosen)
  const page = [...filters]
  if (input.after) {
    const [rank, due, id] = decodeCursor(input.after, mark)
    page.push(sql`(${requests.priorityRank}, ${requests.dueAt}, ${requests.id}) > (${rank}, ${due}::timestamptz, ${id}::uuid)`)
  }
  const [rows, [count], inForce] = await Promise.all([
    selectRows(ctx.db).where(and(...page)).orderBy(asc(requests.priorityRank), asc(requests.dueAt), asc(requests.id)).limit(input.limit + 1),
    ctx.db.select({ total: sql<number>`count(*)::int` }).from(requests).where(and(...filters)),
    rulesInForce(ctx.db, ctx.now),
  ])
  const shown = rows.slice(0, input.limit)
  const last = shown.at(-1)
  return {
    rows: shown.map(row => rowView(row, ctx.now, inForce.rules.policy.department.timeZone)),
    next: rows.length > input.limit && last?.dueAt ? encodeCursor([last.priorityRank, last.dueAt.toISOString(), last.id]) : null,
    total: count?.total ?? 0,
  }
}

function filterFor(filter: z.output<typeof reviewQuery>['filter']): SQL | null {
  switch (filter) {
    case 'reply': return sql`(${requests.replyWaiting} or ${requests.awaiting} = 'imaging')`
    case 'reopened': return sql`${requests.state} = 'reopened'`
    case 'contrast': return inArray(requests.outcome, ['iv-with-and-without', 'iv-with-only', 'iv-hepatobiliary', 'intra-articular', 'discuss'])
    case 'low-kidney': return sql`(${requests.gateEgfr} < 45 or ${inArray(requests.kidneyLine, [...watchedKidneyLines])})`
    case 'all': return null
  }
}
