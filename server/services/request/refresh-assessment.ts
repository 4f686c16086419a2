import { eq } from 'drizzle-orm'
import { withEarlier } from '#shared/domain/record/with-earlier'
import { openStates } from '#shared/domain/request/lifecycle'
import type { RequestState } from '#shared/domain/request/lifecycle'
import type { AssessmentView } from '#shared/types/views'
import { requests } from '#server/database/schema/requests'
import { recordAudit } from '../audit/record'
import { permitRequest } from '../context'
import type { ServiceContext } from '../context'
import { readPatientRecord } from '../record/read-patient-record'
import { rulesInForce } from '../rules/in-force'
import { inTransaction } from '../transaction'
import { exposureLedger, gatherInputs, runAssessment } from './assess-request'
import { keepPatient } from './create-draft'
import { loadRequest, scopeOf } from './load'

/**
 * Reads the hospital record anew and answers with the assessment of the form as saved. The stored record is replaced only by a
 * reading that reached it, and never on a request that is over; its version stays, since nothing a person wrote has changed.
 */
export async function refreshAssessment({ ctx, input }: { ctx: ServiceContext, input: { id: string } }): Promise<AssessmentView> {
  const { request, patient } = await loadRequest(ctx.db, input.id)
  permitRequest(ctx, 'request.assess', scopeOf(request))
  const reading = withEarlier(await readPatientRecord(ctx, patient.ehrId), request.record)
  const usable = reading.state !== 'unreachable'
  const inForce = await rulesInForce(ctx.db, ctx.now)
  return await inTransaction(ctx, async (tx) => {
    if (usable && (openStates as readonly RequestState[]).includes(request.state)) {
      // Another date of birth than the one confirmed is for a person to look at, not to be taken over unseen.
      const samePerson = Boolean(reading.patient?.birthDate) && reading.warnings.every(warning => warning.id !== 'birth-date-differs')
      if (samePerson) await keepPatient(tx, ctx, reading)
      await tx.update(requests).set({ record: reading, recordReadAt: new Date(reading.readAt) }).where(eq(requests.id, request.id))
    }
    await recordAudit(tx, ctx, {
      action: 'request.record',
      objectType: 'request',
      objectId: request.id,
      reference: request.reference,
      patientId: patient.id,
      practiceId: request.practiceId,
      detail: { record: reading.state, readings: reading.readings.length },
    })
    // A record that could not be reached must show as such, though an older reading is kept beside it.
    const record = usable ? reading : unreachableWithEarlier(request.record, reading)
    const inputs = await gatherInputs(tx, ctx.now, { form: request.form, record, patient, plannedAt: request.slotStartsAt })
    return {
      assessment: runAssessment(inputs, inForce).result,
      record,
      recordReadAt: usable ? reading.readAt : (request.recordReadAt?.toISOString() ?? null),
      ledger: await exposureLedger(tx, patient.id),
      version: request.version,
    }
  })
}

/** Earlier values with their own dates stay usable; only the state says that nothing newer could be looked for. */
function unreachableWithEarlier<Reading extends { state: string }>(earlier: Reading | null, now: Reading): Reading {
  return earlier && earlier.state !== 'unreachable' ? { ...earlier, state: 'incomplete' } : now
}
