import { and, desc, eq, inArray, ne } from 'drizzle-orm'
import type { LetterPreview } from '#shared/types/views'
import type { Database } from '#server/database/client'
import { administrations, letters } from '#server/database/schema/requests'
import { recordAudit } from '../audit/record'
import { permitRequest } from '../context'
import type { ServiceContext } from '../context'
import { StateConflict } from '../errors'
import { loadRequest, scopeOf } from '../request/load'
import { currentAssessment, currentDecision } from '../request/stored'
import { writeLetter } from './queue-letter'
import type { LetterRequest } from './queue-letter'

/**
 * What the patient reads or will read: the newest letter of this kind as it was written, else the one that would be written now.
 *
 * @throws StateConflict where there is nothing to write about yet.
 */
export async function previewLetter({ ctx, input }: { ctx: ServiceContext, input: { id: string, kind?: 'before' | 'after' } }): Promise<LetterPreview> {
  const loaded = await loadRequest(ctx.db, input.id)
  const { request, patient } = loaded
  permitRequest(ctx, 'letter.read', scopeOf(request))
  const kind = input.kind ?? (request.state === 'done' || request.state === 'closed' ? 'after' : 'before')
  await recordAudit(ctx.db, ctx, {
    action: 'letter.read', objectType: 'request', objectId: request.id, reference: request.reference, patientId: request.patientId, practiceId: request.practiceId,
    detail: { kind },
  })
  const [written] = await ctx.db.select().from(letters).where(and(
    eq(letters.requestId, request.id),
    inArray(letters.kind, kind === 'after' ? ['after'] : ['before', 'changed']),
    ne(letters.state, 'cancelled'),
  )).orderBy(desc(letters.queuedAt)).limit(1)
  if (written) return { letter: written.content, detailed: written.detailed, toAddress: written.toAddress, kind: written.kind }

  const [assessment, decision] = await Promise.all([currentAssessment(ctx.db, request), currentDecision(ctx.db, request)])
  if (!assessment || !decision) throw new StateConflict('There is nothing to tell the patient before a radiologist has signed.')
  if (kind === 'before' && !request.slotStartsAt) throw new StateConflict('The letter names the time of the exam. Book the exam, then it can be shown.')
  const letter = writeLetter(ctx, {
    loaded,
    decision,
    assessment: { inputs: assessment.row.inputs, inForce: assessment.inForce, result: assessment.row.result },
    letter: kind === 'before' ? { kind: 'before' } : await afterLetter(ctx.db, request.id),
  })
  return { letter, detailed: patient.detailsByEmail === true, toAddress: patient.email, kind }
}

async function afterLetter(db: Database, requestId: string): Promise<LetterRequest> {
  const [given] = await db.select().from(administrations).where(eq(administrations.requestId, requestId)).orderBy(desc(administrations.recordedAt)).limit(1)
  if (!given || given.contrast === 'discuss') throw new StateConflict('This letter says what was used. Record the exam, then it can be shown.')
  return {
    kind: 'after',
    given: {
      contrast: given.contrast, agentId: given.agent, differsCause: given.differsCause, reaction: given.reaction !== 'none', extravasation: given.extravasation,
    },
  }
}
