import { isDeepStrictEqual } from 'node:util'
import { desc, eq } from 'drizzle-orm'
import type { z } from 'zod'
import { starterAgents } from '#shared/domain/contrast/agents'
import { isIntravenous, usesContrast } from '#shared/domain/contrast/outcome'
import type { administrationSchema } from '#shared/schemas/requests'
import type { WriteResult } from '#shared/types/views'
import { administrations } from '#server/database/schema/requests'
import { userOf } from '../context'
import type { ServiceContext } from '../context'
import { Invalid, StateConflict } from '../errors'
import type { FieldProblem } from '../errors'
import { queueLetter } from '../letter/queue-letter'
import { changeRequest, conflictError } from './change'
import { currentAssessment, currentDecision } from './stored'

/**
 * Records what was really given. The first entry ends the exam and queues the patient's second letter; later ones are
 * corrections that name the entry they replace.
 */
export async function recordGiven({ ctx, input }: { ctx: ServiceContext, input: { id: string, version: number } & z.output<typeof administrationSchema> }): Promise<WriteResult> {
  const actor = userOf(ctx)
  const given = usesContrast(input.contrast)
  return await changeRequest(ctx, {
    id: input.id,
    version: input.version,
    action: 'request.record-given',
    step: ({ request }) => request.state === 'done' || request.state === 'closed' ? null : 'complete',
    apply: async (tx, loaded) => {
      const { request } = loaded
      const [assessment, decision] = [await currentAssessment(tx, request), await currentDecision(tx, request)]
      if (!assessment || !decision?.contrast || decision.contrast === 'discuss') throw new StateConflict('There is no signed decision for this exam.')
      const problems: FieldProblem[] = []
      if (new Date(input.givenAt).getTime() > ctx.now.getTime() + 5 * 60_000) problems.push({ path: 'givenAt', message: 'That time has not come yet.' })
      if (given && input.volumeMl === null) problems.push({ path: 'volumeMl', message: 'Give the volume in mL.' })
      const differs = input.contrast !== decision.contrast || (given && input.agent !== decision.agent)
      if (differs && !input.differsCause) problems.push({ path: 'differsCause', message: 'It differs from what was signed: say why.' })
      if (input.differsCause === 'other' && !input.differsReason) problems.push({ path: 'differsReason', message: 'Say what the reason was.' })
      if (problems.length > 0) throw new Invalid(problems)

      const [earlier] = await tx.select().from(administrations).where(eq(administrations.requestId, request.id)).orderBy(desc(administrations.recordedAt)).limit(1)
      if (Boolean(earlier) !== (request.state === 'done' || request.state === 'closed')) throw conflictError(loaded)
      const agent = starterAgents.find(candidate => candidate.id === input.agent) ?? null
      await tx.insert(administrations).values({
        requestId: request.id,
        patientId: request.patientId,
        given,
        contrast: input.contrast,
        agent: input.agent,
        volumeMl: input.volumeMl,
        // A joint gets a dilution: its amount is not volume times concentration.
        amountMmol: agent && isIntravenous(input.contrast) && input.volumeMl !== null ? input.volumeMl * agent.concentrationMmolPerMl : null,
        lot: input.lot,
        givenAt: new Date(input.givenAt),
        differsReason: input.differsReason,
        differsCause: differs ? input.differsCause : null,
        reaction: input.reaction,
        reactionDetail: input.reactionDetail,
        extravasation: input.extravasation,
        recordedById: actor.userId,
        recordedAt: ctx.now,
        correctsId: earlier?.id ?? null,
      })
      const toldBefore = earlier && {
        contrast: earlier.contrast, agentId: earlier.agent, differsCause: earlier.differsCause, reaction: earlier.reaction !== 'none', extravasation: earlier.extravasation,
      }
      const told = {
        contrast: input.contrast, agentId: input.agent, differsCause: differs ? input.differsCause : null,
        reaction: input.reaction !== 'none', extravasation: input.extravasation,
      }
      // A corrected lot or volume is nothing that the letter says: the patient is not written to twice.
      if (!isDeepStrictEqual(told, toldBefore)) await queueLetter(tx, ctx, {
        loaded,
        decision,
        assessment: { inputs: assessment.row.inputs, inForce: assessment.inForce, result: assessment.row.result },
        letter: { kind: 'after', given: told },
      })
      return {
        set: {},
        audit: earlier ? 'request.correct' : 'request.complete',
        detail: { given, contrast: input.contrast, agent: input.agent, reaction: input.reaction, extravasation: input.extravasation },
      }
    },
  })
}
