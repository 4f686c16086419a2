import { and, desc, eq, inArray, lt, or, sql } from 'drizzle-orm'
import type { SQL } from 'drizzle-orm'
import { z } from 'zod'
import type { requestListQuery } from '#shared/schemas/requests'
import type { Page, RequestRow } from '#shared/types/views'
import { patients, requests } from '#server/database/schema/requests'
import { userOf } from '../context'
import type { ServiceContext } from '../context'
import { decodeCursor, encodeCursor, likePrefix } from '../cursor'
import { rulesInForce } from '../rules/in-force'
import { rowView, selectRows } from './row'

const mark = z.tuple([z.iso.datetime(), z.uuid()])

/** A practice's requests, or the department's for imaging staff: newest change first, one indexed query a page. */
export async function listRequests({ ctx, input }: { ctx: ServiceContext, input: z.output<typeof requestListQuery> }): Promise<Page<RequestRow>> {
  const actor = userOf(ctx)
  const filters: SQL[] = [sql`${requests.state} <> 'discarded'`]
  if (actor.role === 'orderer') {
    if (actor.practiceIds.length === 0) return { rows: [], next: null }
    filters.push(inArray(requests.practiceId, [...actor.practiceIds]))
  }
  else {
    filters.push(sql`${requests.state} <> 'draft'`)
  }
  const group = groupFilter(input.group)
  if (group) filters.push(group)
  if (input.search && input.search.length >= 2) filters.push(searchFilter(input.search))
  if (input.after) {
    const [at, id] = decodeCursor(input.after, mark)
    const after = or(lt(requests.updatedAt, new Date(at)), and(eq(requests.updatedAt, new Date(at)), lt(requests.id, id)))
    if (after) filters.push(after)
  }
  const [rows, inForce] = await Promise.all([
    selectRows(ctx.db).where(and(...filters)).orderBy(desc(requests.updatedAt), desc(requests.id)).limit(input.limit + 1),
    rulesInForce(ctx.db, ctx.now),
  ])
  const zone = inForce.rules.policy.department.timeZone
  const page = rows.slice(0, input.limit)
  const last = page.at(-1)
  return {
    rows: page.map(row => rowView(row, ctx.now, zone)),
    next: rows.length > input.limit && last ? encodeCursor([last.updatedAt.toISOString(), last.id]) : null,
  }
}

function groupFilter(group: z.output<typeof requestListQuery>['group']): SQL | null {
  switch (group) {
    case 'waiting': return sql`(${requests.awaiting} = 'ordering' and ${requests.state} in ('sent', 'queried', 'reopened', 'approved', 'booked'))`
    case 'progress': return sql`(${requests.awaiting} is distinct from 'ordering' and ${requests.state} in ('sent', 'queried', 'reopened', 'approved', 'booked', 'done'))`
    case 'drafts': return sql`${requests.state} = 'draft'`
    case 'past': return sql`${requests.state} in ('closed', 'declined', 'withdrawn', 'refused')`
    case 'all': return null
  }
}

/** Any part of the name, or the start of a request or record number. */
export function searchFilter(text: string): SQL {
  const pattern = likePrefix(text.toLowerCase())
  return sql`(lower(${patients.displayName}) like ${`%${pattern}%`} or lower(${requests.reference}) like ${`${pattern}%`} or lower(${patients.recordNumber}) like ${`${pattern}%`})`
}
