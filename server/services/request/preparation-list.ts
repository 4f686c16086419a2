import { and, asc, desc, eq, inArray, sql } from 'drizzle-orm'
import type { z } from 'zod'
import { preparationTabs } from '#shared/types/views'
import type { NeedView, PreparationRow, PreparationTab, PreparationView } from '#shared/types/views'
import type { preparationQuery } from '#shared/schemas/requests'
import { users } from '#server/database/schema/people'
import { assessments, decisions, letters, needEvents, patients, requests } from '#server/database/schema/requests'
import type { Database } from '#server/database/client'
import type { ServiceContext } from '../context'
import { rulesById, rulesInForce } from '../rules/in-force'
import { searchFilter } from './list'
import { needViews } from './need-views'
import type { NeedEvent } from './need-views'
import { rowView, selectRows } from './row'
import { groupBy } from '#shared/utils/group-by'
import { examMinutes } from '#shared/domain/booking/exam-minutes'

/** Exams the booking desk works on are bounded by its open work; this is far above a large department's. */
const openWorkLimit = 2_000

const preparing = sql`${requests.state} in ('approved', 'booked', 'reopened')
  or (${requests.state} in ('queried', 'sent') and ${requests.slotStartsAt} is not null)`
const doneLately = sql`${requests.state} = 'done'`

/**
 * Approved exams with what each still needs. Needs are derived, so tabs and counts are made from one reading of the open work;
 * nothing here grows with exams that are past.
 */
export async function listPreparation({ ctx, input }: { ctx: ServiceContext, input: z.output<typeof preparationQuery> }): Promise<PreparationView> {
  const conditions = [sql`(${preparing} or ${doneLately})`]
  if (input.search && input.search.length >= 2) conditions.push(searchFilter(input.search))
  const inForce = await rulesInForce(ctx.db, ctx.now)
  const { policy } = inForce.rules
  const rows = await selectRows(ctx.db).where(and(...conditions))
    // Exams that are over come last, so that they never crowd out those to come.
    .orderBy(sql`${doneLately}`, sql`${requests.slotStartsAt} asc nulls first`, asc(requests.priorityRank), asc(requests.id)).limit(openWorkLimit)
  const ids = rows.map(row => row.id)
  const [extras, events, written] = ids.length === 0
    ? [[], [], []]
    : await Promise.all([loadExtras(ctx.db, ids), loadEvents(ctx.db, ids), loadWritten(ctx.db, ids)])
  const extraById = new Map(extras.map(extra => [extra.id, extra]))
  const eventsById = groupBy(events, event => event.requestId)
  const withLetter = new Set(written.map(letter => letter.requestId))

  const prepared = await Promise.all(rows.map(async (row): Promise<PreparationRow> => {
    const extra = extraById.get(row.id)
    const needs = extra ? await needsOf(ctx, extra, eventsById.get(row.id) ?? [], row.slotStartsAt) : []
    return {
      ...rowView(row, ctx.now, policy.department.timeZone),
      needs,
      phone: extra?.phone ?? null,
      minutes: examMinutes(row.decided === 'discuss' ? null : row.decided, needs.map(need => need.kind), policy),
      hasLetter: withLetter.has(row.id),
    }
  }))
  const counts = Object.fromEntries(preparationTabs.map(tab => [tab, prepared.filter(row => onTab(row, tab)).length])) as Record<PreparationTab, number>
  return { rows: prepared.filter(row => onTab(row, input.tab)), counts, next: null }
}

/** Which tabs an exam stands on; an exam may be on several. */
export function onTab(row: Pick<PreparationRow, 'state' | 'needs' | 'slot'>, tab: PreparationTab): boolean {
  const held = row.state === 'reopened' || row.state === 'queried' || row.state === 'sent'
  if (tab === 'done') return row.state === 'done'
  if (row.state === 'done') return false
  if (tab === 'held') return held
  if (held) return false
  const open = row.needs.filter(need => need.state !== 'met' && need.state !== 'waived')
  switch (tab) {
    case 'not-booked': return row.state === 'approved'
    case 'needs-something': return open.length > 0
    case 'lab-work': return open.some(need => need.kind === 'creatinine')
    case 'iv-start': return open.some(need => need.kind === 'iv-start')
    case 'ready': return row.state === 'booked' && open.length === 0
  }
}

type Extra = Awaited<ReturnType<typeof loadExtras>>[number]

async function loadExtras(db: Database, ids: string[]) {
  return await db.select({
    id: requests.id, phone: patients.phone, inputs: assessments.inputs, suggested: assessments.result,
    guidanceVersionId: assessments.guidanceVersionId, policyVersionId: assessments.policyVersionId,
    kind: decisions.kind, contrast: decisions.contrast, agent: decisions.agent,
  }).from(requests)
    .innerJoin(patients, eq(patients.id, requests.patientId))
    .innerJoin(assessments, eq(assessments.id, requests.currentAssessmentId))
    .leftJoin(decisions, eq(decisions.id, requests.currentDecisionId))
    .where(inArray(requests.id, ids))
}

async function loadEvents(db: Database, ids: string[]): Promise<(NeedEvent & { requestId: string })[]> {
  return await db.select({ requestId: needEvents.requestId, kind: needEvents.kind, state: needEvents.state, note: needEvents.note, at: needEvents.at, by: users.name })
    .from(needEvents).leftJoin(users, eq(users.id, needEvents.byId))
    .where(inArray(needEvents.requestId, ids)).orderBy(desc(needEvents.id))
}

async function loadWritten(db: Database, ids: string[]) {
  return await db.selectDistinct({ requestId: letters.requestId }).from(letters)
    .where(and(inArray(letters.requestId, ids), sql`${letters.state} <> 'cancelled'`))
}

async function needsOf(ctx: ServiceContext, extra: Extra, events: NeedEvent[], slot: Date | null): Promise<NeedView[]> {
  const { rules } = await rulesById(ctx.db, extra.guidanceVersionId, extra.policyVersionId)
  return needViews({
    inputs: { ...extra.inputs, now: ctx.now.toISOString(), plannedAt: slot?.toISOString() ?? null },
    rules,
    decision: extra.kind ? { kind: extra.kind, contrast: extra.contrast, agent: extra.agent } : null,
    suggested: extra.suggested.needs,
    events,
  })
}
