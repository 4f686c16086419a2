import type { z } from 'zod'
import { assessDecision } from '#shared/domain/assessment/assess'
import { differenceBetween } from '#shared/domain/assessment/difference'
import { computeDose } from '#shared/domain/contrast/dose'
import { starterAgents } from '#shared/domain/contrast/agents'
import { isIntravenous, usesContrast } from '#shared/domain/contrast/outcome'
import { weighDecision } from '#shared/domain/request/decision'
import { isTransition } from '#shared/domain/request/lifecycle'
import type { approvalSchema } from '#shared/schemas/requests'
import type { WriteResult } from '#shared/types/views'
import type { Database } from '#server/database/client'
import { decisions } from '#server/database/schema/requests'
import { enqueue } from '#server/jobs/queue'
import { permitRequest, userOf } from '../context'
import { addedNeedEvents } from '#server/database/append'
import type { ServiceContext } from '../context'
import { Invalid, Stale } from '../errors'
import type { FieldProblem } from '../errors'
import { queueLetter } from '../letter/queue-letter'
import { freshRecord } from '../record/fresh-record'
import { rulesInForce } from '../rules/in-force'
import type { RulesInForce } from '../rules/in-force'
import { earlierAnswer } from '../transaction'
import { gatherInputs, runAssessment, storeAssessment } from './assess-request'
import type { Assessed } from './assess-request'
import { changeRequest, conflictError } from './change'
import type { ChangeOutcome } from './change'
import { loadRequest, scopeOf } from './load'
import type { LoadedRequest } from './load'
import { noSlot } from './slot'
import { currentAssessment } from './stored'

type Approval = z.output<typeof approvalSchema>

/**
 * Signs a decision on contrast. The record is read first; if the fresh assessment says something else than the one the signer
 * saw, it is stored and shown before anything is signed.
 *
 * @throws Stale with the changes in words, Invalid where a reason, a word or a dose is missing.
 */
export async function approveRequest({ ctx, input }: { ctx: ServiceContext, input: { id: string, version: number } & Approval }): Promise<WriteResult> {
  const actor = userOf(ctx)
  const before = await loadRequest(ctx.db, input.id)
  // Asked before the hospital record is, and again below on the row as it then stands.
  permitRequest(ctx, 'request.approve', scopeOf(before.request))
  const earlier = await earlierAnswer<WriteResult>(ctx)
  if (earlier) return earlier.response
  const record = await freshRecord(ctx, before)
  const inForce = await rulesInForce(ctx.db, ctx.now)

  // Set inside the transaction: a changed assessment is committed, and only then refused.
  let changedFindings: string[] = []
  const result = await changeRequest({ ...ctx, idempotency: null }, {
    id: input.id,
    version: input.version,
    action: 'request.approve',
    step: null,
    apply: async (tx, loaded): Promise<ChangeOutcome> => {
      const { request, patient } = loaded
      // What was decided stays as it was assessed.
      if (!isTransition(request.state, 'approve')) throw conflictError(loaded)
      const inputs = await gatherInputs(tx, ctx.now, { form: request.form, record, patient, plannedAt: request.slotStartsAt })
      const fresh = runAssessment(inputs, inForce)
      const seen = await currentAssessment(tx, request)
      changedFindings = seen ? differenceBetween(seen.row.result, fresh.result).filter(change => change.kind !== 'need' && change.kind !== 'rules').map(change => change.text) : []
      if (changedFindings.length === 0) return { audit: 'request.record', detail: { record: record?.state ?? 'not-read', changes: 0 } }
      const stored = await storeAssessment(tx, ctx, { ...fresh, requestId: request.id, cause: 'decision', inForce })
      return { set: { ...stored, record, recordReadAt: record ? new Date(record.readAt) : request.recordReadAt }, audit: 'request.record', detail: { changes: changedFindings.length } }
    },
  })
  if (changedFindings.length > 0) {
    throw new Stale('The hospital record has changed since you opened this request. Look at it once more before you sign.', {
      reason: 'record-changed', changes: changedFindings, state: result.state, version: result.version,
    })
  }
  return await sign({ ctx, input, actorId: actor.userId, record, inForce })
}

async function sign({ ctx, input, actorId, record, inForce }: {
  ctx: ServiceContext
  input: { id: string, version: number } & Approval
  actorId: string
  record: Awaited<ReturnType<typeof freshRecord>>
  inForce: RulesInForce
}): Promise<WriteResult> {
  const keepsSlot = ({ request }: LoadedRequest) => request.slotStartsAt !== null && request.slotStartsAt > ctx.now
  return await changeRequest(ctx, {
    id: input.id,
    version: input.version,
    action: 'request.approve',
    step: 'approve',
    keepsSlot,
    apply: async (tx, loaded) => {
      const { request, patient } = loaded
      const inputs = await gatherInputs(tx, ctx.now, { form: request.form, record, patient, plannedAt: request.slotStartsAt })
      const assessed = runAssessment(inputs, inForce)
      const dose = checkDecision(input, assessed, inForce)
      const stored = await storeAssessment(tx, ctx, { ...assessed, requestId: request.id, cause: 'decision', inForce })
      const [decision] = await tx.insert(decisions).values({
        requestId: request.id,
        kind: 'approved',
        contrast: input.contrast,
        agent: input.agent,
        note: input.note,
        differsReason: input.differsReason || null,
        assessmentId: stored.currentAssessmentId,
        signedById: actorId,
        signedAt: ctx.now,
        supersedesId: request.currentDecisionId,
        ...dose,
      }).returning()
      if (!decision) throw new Error('the decision was not stored')
      await waiveNeeds(tx, ctx, request.id, input.waivedNeeds, actorId)
      if (keepsSlot(loaded)) await queueLetter(tx, ctx, { loaded, decision, assessment: { inputs, inForce, result: assessed.result }, letter: { kind: 'changed', change: 'replanned' } })
      await enqueue(tx, 'notify-clinician', { requestId: request.id, event: 'decision' }, { key: `notify-${request.id}-decision`, runAt: new Date(ctx.now.getTime() + 60_000) })
      return {
        // A time that has passed is no longer a slot.
        set: { ...stored, ...(keepsSlot(loaded) ? {} : noSlot), record, recordReadAt: record ? new Date(record.readAt) : request.recordReadAt, currentDecisionId: decision.id, decidedAt: ctx.now, replyWaiting: false, awaiting: request.awaiting === 'ordering' ? null : request.awaiting },
        audit: 'request.approve',
        detail: { contrast: input.contrast, agent: input.agent, suggestion: assessed.result.suggestion, differs: Boolean(input.differsReason), word: input.wordGiven },
      }
    },
  })
}

/** The last check before a signature: reasons, the radiologist's word, the agent and the dose. @returns dose columns. */
function checkDecision(input: Approval, assessed: Assessed, inForce: RulesInForce) {
  const decided = { contrast: input.contrast, agent: input.agent }
  const problems: FieldProblem[] = []
  const agent = starterAgents.find(candidate => candidate.id === input.agent) ?? null
  if (usesContrast(input.contrast) && !agent) problems.push({ path: 'agent', message: 'Choose the agent.' })
  if (!usesContrast(input.contrast) && agent) problems.push({ path: 'agent', message: 'Without contrast there is no agent.' })
  const found = assessDecision(assessed.inputs, inForce.rules, decided)
  const weight = weighDecision(assessed.result.suggestion, found, { ...decided, doseMmolPerKg: input.doseMmolPerKg })
  if (weight.reasonNeeded && !input.differsReason) problems.push({ path: 'differsReason', message: 'Give the reason; it stays with the decision.' })
  if (weight.wordNeeded && !input.wordGiven) problems.push({ path: 'wordGiven', message: 'This needs your word as a radiologist before it is signed.' })
  if (problems.length > 0) throw new Invalid(problems)

  if (!agent || !isIntravenous(input.contrast)) return { doseMmolPerKg: null, weightKg: null, amountMmol: null, volumeMl: agent ? input.volumeMl : null }
  const weightKg = input.weightKg ?? assessed.inputs.patient.weightKg
  if (weightKg === null) return { doseMmolPerKg: input.doseMmolPerKg ?? agent.doseMmolPerKg, weightKg: null, amountMmol: null, volumeMl: null }
  const dose = computeDose({ agent, weightKg, doseMmolPerKg: input.doseMmolPerKg ?? agent.doseMmolPerKg, ageYears: null, limitsKg: inForce.rules.policy.weightLimitsKg.value })
  if (dose.status === 'bad-weight') throw new Invalid([{ path: 'weightKg', message: 'That weight cannot be right; give it in kilograms.' }])
  return { doseMmolPerKg: dose.dose.doseMmolPerKg, weightKg, amountMmol: dose.dose.amountMmol, volumeMl: dose.dose.volumeMl }
}

async function waiveNeeds(tx: Database, ctx: ServiceContext, requestId: string, waived: Approval['waivedNeeds'], byId: string): Promise<void> {
  if (waived.length === 0) return
  await tx.insert(addedNeedEvents).values(waived.map(({ kind, reason }) => ({ requestId, kind, state: 'waived' as const, note: reason, byId })))
}
