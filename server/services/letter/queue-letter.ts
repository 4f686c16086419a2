import { and, eq, inArray, isNotNull, isNull, or } from 'drizzle-orm'
import { assessDecision } from '#shared/domain/assessment/assess'
import type { Assessment, AssessmentInputs } from '#shared/domain/assessment/types'
import { starterAgents } from '#shared/domain/contrast/agents'
import type { DecidableOutcome } from '#shared/domain/contrast/outcome'
import type { AgentId } from '#shared/domain/contrast/types'
import { composeLetter } from '#shared/domain/letter/compose'
import type { LetterAgent } from '#shared/domain/letter/compose'
import type { DiffersCause } from '#shared/domain/request/differs'
import type { Letter } from '#shared/domain/letter/types'
import type { Database } from '#server/database/client'
import { letterLinks, letters } from '#server/database/schema/requests'
import { enqueue } from '#server/jobs/queue'
import { recordAudit } from '../audit/record'
import type { ServiceContext } from '../context'
import { StateConflict } from '../errors'
import { currentAssessment, currentDecision } from '../request/stored'
import type { DecisionRecord } from '../request/stored'
import type { LoadedRequest } from '../request/load'
import type { RulesInForce } from '../rules/in-force'

/** What was given, as the record of the exam says. */
interface Given { contrast: DecidableOutcome, agentId: AgentId | null, differsCause: DiffersCause | null, reaction: boolean, extravasation: boolean }

export type LetterRequest =
  | { kind: 'before' }
  | { kind: 'changed', change: 'moved' | 'replanned' | 'called-off' }
  | { kind: 'after', given: Given }

export interface LetterFacts {
  loaded: LoadedRequest
  decision: DecisionRecord
  assessment: { inputs: AssessmentInputs, inForce: RulesInForce, result: Assessment }
  letter: LetterRequest
}

/** Composes a letter from what is stored; nobody types it. @throws StateConflict without a decision or a slot to write about. */
export function writeLetter(ctx: Pick<ServiceContext, 'now'>, { loaded, decision, assessment, letter }: LetterFacts): Letter {
  const { request, patient, scanner } = loaded
  if (!decision.contrast || decision.contrast === 'discuss') throw new StateConflict('There is nothing signed to write about.')
  const decided = { contrast: decision.contrast, agent: decision.agent }
  // Findings and needs of what was signed, which may differ from what was suggested.
  const found = assessDecision(assessment.inputs, assessment.inForce.rules, decided)
  const common = {
    language: 'en' as const,
    now: ctx.now.toISOString(),
    patient: { fullName: patient.displayName, birthDate: assessment.inputs.patient.birthDate, sex: assessment.inputs.patient.sex },
    exam: { region: request.region ?? '', name: request.examName },
    assessment: { ...assessment.result, findings: found.findings, kidney: found.kidney },
    needs: found.needs,
    decision: { contrast: decided.contrast, agent: letterAgent(decided.agent) },
    policy: assessment.inForce.rules.policy,
  }
  if (letter.kind === 'after') {
    const { agentId, ...given } = letter.given
    return composeLetter({ ...common, kind: 'after', given: { ...given, agent: letterAgent(agentId) } })
  }
  if (letter.kind === 'changed' && letter.change === 'called-off') return composeLetter({ ...common, kind: 'changed', change: 'called-off' })
  if (!request.slotStartsAt || !scanner) throw new StateConflict('There is no time set to write about.')
  const slot = { startsAt: request.slotStartsAt.toISOString(), place: `${scanner.place}, ${scanner.name}` }
  return letter.kind === 'before'
    ? composeLetter({ ...common, kind: 'before', slot })
    : composeLetter({ ...common, kind: 'changed', change: letter.change === 'moved' ? 'moved' : 'replanned', slot })
}

/**
 * Fixes the letter's words and queues its delivery in the caller's transaction. A letter about the plan replaces those not yet
 * delivered. Without an address it waits to be handed over on paper.
 */
export async function queueLetter(tx: Database, ctx: ServiceContext, facts: LetterFacts): Promise<void> {
  const { request, patient } = facts.loaded
  const letter = await asHeard(tx, facts)
  const content = writeLetter(ctx, { ...facts, letter })
  await cancelUndelivered(tx, request.id)
  const [row] = await tx.insert(letters).values({
    requestId: request.id,
    patientId: patient.id,
    kind: letter.kind,
    content,
    detailed: patient.detailsByEmail === true,
    toAddress: patient.email,
    state: patient.email ? 'queued' : 'no-address',
    queuedAt: ctx.now,
    createdById: ctx.actor.kind === 'user' ? ctx.actor.userId : null,
  }).returning({ id: letters.id })
  if (!row) throw new Error('the letter was not stored')
  if (patient.email) await enqueue(tx, 'deliver-letter', { letterId: row.id }, { key: `letter-${row.id}` })
  await recordAudit(tx, ctx, {
    action: 'letter.queue', objectType: 'letter', objectId: row.id, reference: request.reference, patientId: patient.id, practiceId: request.practiceId,
    detail: { kind: letter.kind, detailed: patient.detailsByEmail === true, address: patient.email !== null },
  })
}

/**
 * Tells a patient who already had word of the plan that the exam is off, and calls back what has not gone out. A patient who
 * never heard of it is left in peace.
 */
export async function callOffLetters(tx: Database, ctx: ServiceContext, loaded: LoadedRequest): Promise<void> {
  const { request } = loaded
  const told = await lettersHeard(tx, request.id)
  await cancelUndelivered(tx, request.id)
  await revokeLinks(tx, ctx, told.map(letter => letter.id))
  if (told.length === 0 || request.slotStartsAt === null) return
  const [assessment, decision] = [await currentAssessment(tx, request), await currentDecision(tx, request)]
  if (!assessment || !decision?.contrast) return
  await queueLetter(tx, ctx, {
    loaded,
    decision,
    assessment: { inputs: assessment.row.inputs, inForce: assessment.inForce, result: assessment.row.result },
    letter: { kind: 'changed', change: 'called-off' },
  })
}

/** Letters about the plan that reached the patient. Once delivered is told, even where its link was closed afterwards. */
async function lettersHeard(tx: Database, requestId: string): Promise<{ id: string }[]> {
  return await tx.select({ id: letters.id }).from(letters).where(and(
    eq(letters.requestId, requestId),
    or(inArray(letters.state, ['delivered', 'handed-over']), isNotNull(letters.deliveredAt)),
    inArray(letters.kind, ['before', 'changed']),
  ))
}

/** "Has a new time" makes no sense to somebody who never heard of the old one: they get the first letter instead. */
async function asHeard(tx: Database, { loaded, letter }: LetterFacts): Promise<LetterRequest> {
  if (letter.kind !== 'changed' || letter.change === 'called-off') return letter
  return (await lettersHeard(tx, loaded.request.id)).length > 0 ? letter : { kind: 'before' }
}

async function cancelUndelivered(tx: Database, requestId: string): Promise<void> {
  await tx.update(letters).set({ state: 'cancelled' })
    .where(and(eq(letters.requestId, requestId), inArray(letters.state, ['queued', 'failed', 'held', 'no-address'])))
}

async function revokeLinks(tx: Database, ctx: ServiceContext, letterIds: string[]): Promise<void> {
  if (letterIds.length === 0) return
  await tx.update(letterLinks).set({ revokedAt: ctx.now }).where(and(inArray(letterLinks.letterId, letterIds), isNull(letterLinks.revokedAt)))
}

function letterAgent(id: AgentId | null): LetterAgent | null {
  const agent = starterAgents.find(candidate => candidate.id === id)
  return agent ? { name: agent.name, macrocyclic: agent.structure === 'macrocyclic' } : null
}
