import { and, asc, desc, eq, ne, notInArray, sql } from 'drizzle-orm'
import { differenceBetween } from '#shared/domain/assessment/difference'
import { auditSentences } from '#shared/domain/access/audit'
import type { AuditAction } from '#shared/domain/access/audit'
import { mayOnRequest, requestPermissions } from '#shared/domain/access/permissions'
import type { RequestAction } from '#shared/domain/access/permissions'
import { starterAgents } from '#shared/domain/contrast/agents'
import type { AgentId } from '#shared/domain/contrast/types'
import { isTransition, mayBeCopied, transition, undoSeconds } from '#shared/domain/request/lifecycle'
import type { Side, TransitionName } from '#shared/domain/request/lifecycle'
import { roleSide } from '#shared/domain/request/messages'
import { ageWords } from '#shared/domain/record/age-words'
import type { AdministrationView, DecisionView, LetterView, MessageView, PatientView, RequestView, TimelineEntry } from '#shared/types/views'
import type { Database } from '#server/database/client'
import { users } from '#server/database/schema/people'
import { administrations, assessments, decisions, letterLinks, letters, messages, needEvents } from '#server/database/schema/requests'
import { auditEvents } from '#server/database/schema/trail'
import { recordAudit } from '../audit/record'
import { permitRequest, userOf } from '../context'
import type { ServiceContext } from '../context'
import { rulesInForce } from '../rules/in-force'
import { exposureLedger } from './assess-request'
import { loadRequest, scopeOf } from './load'
import type { LoadedRequest, RequestRecord } from './load'
import { needViews } from './need-views'
import { slotView } from './row'
import { currentAssessment } from './stored'
import type { DecisionRecord } from './stored'

/** Everything this person may see of one request. Opening it is itself noted in the trail. */
export async function viewRequest({ ctx, input }: { ctx: ServiceContext, input: { id: string } }): Promise<RequestView> {
  const actor = userOf(ctx)
  const loaded = await loadRequest(ctx.db, input.id)
  const { request, patient, practice } = loaded
  permitRequest(ctx, 'request.read', scopeOf(request))
  const side = roleSide(actor.role)
  const [current, decision, thread, events, given, sent, timeline, ledger, asker, inForce] = await Promise.all([
    currentAssessment(ctx.db, request),
    loadDecision(ctx.db, request),
    loadThread(ctx.db, request.id),
    loadNeedEvents(ctx.db, request.id),
    loadAdministration(ctx.db, request.id),
    loadLetters(ctx.db, request.id),
    loadTimeline(ctx.db, request.id, side),
    exposureLedger(ctx.db, patient.id),
    patient.consentAskedById ? ctx.db.select({ name: users.name }).from(users).where(eq(users.id, patient.consentAskedById)) : [],
    rulesInForce(ctx.db, ctx.now),
  ])
  const changes = current ? await changesSinceSent(ctx.db, request, current.row.id, current.row.result) : []
  await recordAudit(ctx.db, ctx, {
    action: 'request.read', objectType: 'request', objectId: request.id, reference: request.reference, patientId: patient.id, practiceId: request.practiceId,
  })
  return {
    id: request.id,
    reference: request.reference,
    state: request.state,
    version: request.version,
    patient: patientView(loaded, ctx.now, inForce.rules.policy.department.timeZone, asker[0]?.name ?? null),
    practice: { id: practice.id, name: practice.name, phone: practice.phone },
    preparedBy: loaded.preparedBy,
    signedBy: loaded.signedBy,
    sentAt: request.sentAt?.toISOString() ?? null,
    dueAt: request.dueAt?.toISOString() ?? null,
    priority: request.priority,
    form: request.form,
    record: request.record,
    recordReadAt: request.recordReadAt?.toISOString() ?? null,
    assessment: current?.row.result ?? null,
    ledger,
    changes,
    decision: decision ? decisionView(decision, ctx.now) : null,
    needs: current
      ? needViews({
          inputs: { ...current.row.inputs, now: ctx.now.toISOString(), plannedAt: request.slotStartsAt?.toISOString() ?? null },
          rules: current.inForce.rules,
          decision: decision?.row ?? null,
          suggested: current.row.result.needs,
          events,
        })
      : [],
    messages: thread.filter(message => side === 'imaging' || !message.internal).map(({ authorId, ...message }): MessageView => ({
      ...message, mine: authorId === actor.userId, createdAt: message.createdAt.toISOString(),
    })),
    awaiting: request.awaiting,
    replyWaiting: request.replyWaiting,
    slot: slotView({ scannerId: loaded.scanner?.id ?? null, scanner: loaded.scanner?.name ?? null, place: loaded.scanner?.place ?? null, slotStartsAt: request.slotStartsAt, slotEndsAt: request.slotEndsAt }),
    administration: given,
    letters: sent,
    timeline,
    copiedFrom: request.copiedFromId,
    may: actionsNow(ctx, request, decision?.row ?? null),
  }
}

export function patientView({ patient }: Pick<LoadedRequest, 'patient'>, now: Date, zone: string, askedBy: string | null): PatientView {
  return {
    id: patient.id,
    displayName: patient.displayName,
    birthDate: patient.birthDate,
    ageWords: ageWords(patient.birthDate, now.toISOString(), zone),
    sex: patient.sex,
    recordNumber: patient.recordNumber,
    phone: patient.phone,
    email: patient.email,
    detailsByEmail: patient.detailsByEmail,
    consentAskedBy: askedBy,
    consentAskedAt: patient.consentAskedAt?.toISOString() ?? null,
  }
}

const stepOf: Partial<Record<RequestAction, TransitionName | ((request: RequestRecord) => TransitionName)>> = {
  'request.send': 'send',
  'request.discard': 'discard',
  'request.withdraw': 'withdraw',
  'request.query': 'query',
  'request.approve': 'approve',
  'request.decline': 'decline',
  'request.undo': 'undo',
  'request.reopen': 'reopen',
  'request.book': request => request.state === 'booked' ? 'rebook' : 'book',
  'request.unbook': 'unbook',
  'request.refuse': 'refuse',
}

/** What this person may do to the request as it stands: the permission table and the transition table together. */
function actionsNow(ctx: ServiceContext, request: RequestRecord, decision: DecisionRecord | null): RequestAction[] {
  const actor = userOf(ctx)
  const actions = Object.keys(requestPermissions) as RequestAction[]
  return actions.filter((action) => {
    if (!mayOnRequest(actor, action, scopeOf(request))) return false
    const named = stepOf[action]
    const step = typeof named === 'function' ? named(request) : named
    if (step && !transition(request.state, step, actor.role).ok) return false
    switch (action) {
      case 'request.undo': return decision?.signedById === actor.userId && undoUntil(decision) > ctx.now
      case 'request.record-given': return request.state === 'booked' ? true : request.state === 'done' || request.state === 'closed'
      case 'request.resend': return mayBeCopied(request.state)
      case 'need.mark': return ['sent', 'queried', 'reopened', 'approved', 'booked'].includes(request.state)
      case 'message.post': return request.state !== 'draft' && request.state !== 'discarded'
      case 'letter.manage': return isTransition(request.state, 'complete') || request.state === 'done'
      default: return true
    }
  })
}

function undoUntil(decision: DecisionRecord): Date {
  return new Date(decision.signedAt.getTime() + undoSeconds * 1000)
}

async function loadDecision(db: Database, request: RequestRecord): Promise<{ row: DecisionRecord, signedBy: string } | null> {
  if (!request.currentDecisionId) return null
  const [found] = await db.select({ row: decisions, signedBy: users.name }).from(decisions)
    .innerJoin(users, eq(users.id, decisions.signedById)).where(eq(decisions.id, request.currentDecisionId))
  return found ?? null
}

function decisionView({ row, signedBy }: { row: DecisionRecord, signedBy: string }, now: Date): DecisionView {
  return {
    id: row.id,
    kind: row.kind,
    contrast: row.contrast === 'discuss' ? null : row.contrast,
    agent: row.agent,
    agentName: agentName(row.agent),
    doseMmolPerKg: row.doseMmolPerKg,
    weightKg: row.weightKg,
    amountMmol: row.amountMmol,
    volumeMl: row.volumeMl,
    note: row.note,
    differsReason: row.differsReason,
    declineReason: row.declineReason,
    helpInstead: row.helpInstead,
    signedBy,
    signedById: row.signedById,
    signedAt: row.signedAt.toISOString(),
    undoUntil: undoUntil(row) > now ? undoUntil(row).toISOString() : null,
  }
}

function agentName(id: AgentId | null): string | null {
  return starterAgents.find(agent => agent.id === id)?.name ?? null
}

async function loadThread(db: Database, requestId: string) {
  return await db.select({
    id: messages.id, kind: messages.kind, side: messages.side, author: users.name, authorId: messages.authorId, internal: messages.internal,
    body: messages.body, createdAt: messages.createdAt,
  }).from(messages).innerJoin(users, eq(users.id, messages.authorId)).where(eq(messages.requestId, requestId)).orderBy(asc(messages.createdAt))
}

async function loadNeedEvents(db: Database, requestId: string) {
  return await db.select({ kind: needEvents.kind, state: needEvents.state, note: needEvents.note, at: needEvents.at, by: users.name })
    .from(needEvents).leftJoin(users, eq(users.id, needEvents.byId)).where(eq(needEvents.requestId, requestId)).orderBy(desc(needEvents.id))
}

async function loadAdministration(db: Database, requestId: string): Promise<AdministrationView | null> {
  const [found] = await db.select({ row: administrations, recordedBy: users.name }).from(administrations)
    .innerJoin(users, eq(users.id, administrations.recordedById))
    .where(eq(administrations.requestId, requestId)).orderBy(desc(administrations.recordedAt)).limit(1)
  if (!found || found.row.contrast === 'discuss') return null
  const { row, recordedBy } = found
  return {
    id: row.id,
    given: row.given,
    contrast: found.row.contrast,
    agent: row.agent,
    agentName: agentName(row.agent),
    volumeMl: row.volumeMl,
    amountMmol: row.amountMmol,
    lot: row.lot,
    givenAt: row.givenAt.toISOString(),
    differsCause: row.differsCause,
    differsReason: row.differsReason,
    reaction: row.reaction === 'mild' || row.reaction === 'moderate' || row.reaction === 'severe' ? row.reaction : 'none',
    reactionDetail: row.reactionDetail,
    extravasation: row.extravasation,
    recordedBy,
    recordedAt: row.recordedAt.toISOString(),
  }
}

export async function loadLetters(db: Database, requestId: string): Promise<LetterView[]> {
  const rows = await db.select({
    id: letters.id, kind: letters.kind, state: letters.state, detailed: letters.detailed, toAddress: letters.toAddress, attempts: letters.attempts,
    lastError: letters.lastError, queuedAt: letters.queuedAt, deliveredAt: letters.deliveredAt,
    openedAt: sql<Date | null>`(select max(${letterLinks.openedAt}) from ${letterLinks} where ${letterLinks.letterId} = ${letters.id})`.mapWith(letterLinks.openedAt),
  }).from(letters).where(eq(letters.requestId, requestId)).orderBy(desc(letters.queuedAt))
  return rows.map(row => ({
    ...row,
    queuedAt: row.queuedAt.toISOString(),
    deliveredAt: row.deliveredAt?.toISOString() ?? null,
    openedAt: row.openedAt?.toISOString() ?? null,
  }))
}

const quiet: AuditAction[] = ['request.read', 'request.edit', 'request.record', 'letter.read']

/** That imaging wrote an internal note is itself internal. */
async function loadTimeline(db: Database, requestId: string, side: Side): Promise<TimelineEntry[]> {
  const shown = side === 'imaging' ? undefined : sql`coalesce(${auditEvents.detail} ->> 'internal', 'false') <> 'true'`
  const rows = await db.select({ at: auditEvents.at, who: auditEvents.actorName, action: auditEvents.action }).from(auditEvents)
    .where(and(eq(auditEvents.objectType, 'request'), eq(auditEvents.objectId, requestId), notInArray(auditEvents.action, quiet), shown))
    .orderBy(asc(auditEvents.id)).limit(200)
  return rows.flatMap(({ at, who, action }) => isAuditAction(action) ? [{ at: at.toISOString(), who, action, sentence: auditSentences[action] }] : [])
}

function isAuditAction(text: string): text is AuditAction {
  return text in auditSentences
}

/** What the newest assessment says differently from the one before it; empty for the first. */
async function changesSinceSent(db: Database, request: RequestRecord, currentId: string, result: Parameters<typeof differenceBetween>[1]): Promise<string[]> {
  const [earlier] = await db.select({ result: assessments.result }).from(assessments)
    .where(and(eq(assessments.requestId, request.id), ne(assessments.id, currentId))).orderBy(desc(assessments.createdAt)).limit(1)
  return earlier ? differenceBetween(earlier.result, result).map(change => change.text) : []
}
