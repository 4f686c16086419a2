import { eq } from 'drizzle-orm'
import { assessDecision } from '#shared/domain/assessment/assess'
import type { WriteResult } from '#shared/types/views'
import { scanners } from '#server/database/schema/rules'
import type { ServiceContext } from '../context'
import { Invalid, StateConflict } from '../errors'
import { queueLetter } from '../letter/queue-letter'
import { gatherInputs } from './assess-request'
import { changeRequest } from './change'
import { currentAssessment, currentDecision } from './stored'

/**
 * Sets or moves the exam's time and scanner, and queues the patient's letter with it. Two exams never share a scanner: the
 * database refuses.
 *
 * @throws Invalid for a time that has passed or one after the dialysis it should come before.
 */
export async function bookExam({ ctx, input }: {
  ctx: ServiceContext
  input: { id: string, version: number, scannerId: string, startsAt: string, minutes: number }
}): Promise<WriteResult> {
  const starts = new Date(input.startsAt)
  if (starts <= ctx.now) throw new Invalid([{ path: 'startsAt', message: 'Choose a time that is still to come.' }])
  return await changeRequest(ctx, {
    id: input.id,
    version: input.version,
    action: 'request.book',
    step: ({ request }) => request.state === 'booked' ? 'rebook' : 'book',
    apply: async (tx, loaded) => {
      const { request, patient } = loaded
      const [scanner] = await tx.select().from(scanners).where(eq(scanners.id, input.scannerId))
      if (!scanner) throw new Invalid([{ path: 'scannerId', message: 'Choose one of the department\'s scanners.' }])
      const [assessment, decision] = [await currentAssessment(tx, request), await currentDecision(tx, request)]
      if (!assessment || !decision?.contrast || decision.contrast === 'discuss') throw new StateConflict('There is no signed decision to book.')
      const inputs = await gatherInputs(tx, ctx.now, { form: request.form, record: request.record, patient, plannedAt: starts })
      const needs = assessDecision(inputs, assessment.inForce.rules, { contrast: decision.contrast, agent: decision.agent }).needs
      const dialysis = inputs.screening.nextDialysisAt
      if (dialysis && needs.some(need => need.kind === 'dialysis-after') && new Date(dialysis) > ctx.now && starts >= new Date(dialysis)) {
        throw new Invalid([{ path: 'startsAt', message: 'The exam must come before the next dialysis session, so that dialysis can follow it.' }])
      }
      const moved = request.state === 'booked'
      const slot = { scannerId: scanner.id, slotStartsAt: starts, slotEndsAt: new Date(starts.getTime() + input.minutes * 60_000) }
      await queueLetter(tx, ctx, {
        loaded: { ...loaded, request: { ...request, ...slot }, scanner },
        decision,
        assessment: { inputs, inForce: assessment.inForce, result: assessment.row.result },
        letter: moved ? { kind: 'changed', change: 'moved' } : { kind: 'before' },
      })
      return { set: slot, audit: moved ? 'request.move' : 'request.book', detail: { scanner: scanner.name, minutes: input.minutes } }
    },
  })
}
