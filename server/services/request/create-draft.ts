import { eq, sql } from 'drizzle-orm'
import type { z } from 'zod'
import { emptyScreening } from '#shared/domain/safety/screening'
import type { RecordReading } from '#shared/domain/record/types'
import { mayBeCopied } from '#shared/domain/request/lifecycle'
import type { RequestForm } from '#shared/domain/request/form'
import type { createRequestSchema } from '#shared/schemas/requests'
import type { WriteResult } from '#shared/types/views'
import type { Database } from '#server/database/client'
import { patients, requests } from '#server/database/schema/requests'
import { recordAudit } from '../audit/record'
import { permitRequest, userOf } from '../context'
import type { ServiceContext } from '../context'
import { Forbidden, Invalid, StateConflict, Unavailable } from '../errors'
import { readPatientRecord } from '../record/read-patient-record'
import { earlierAnswer, inTransaction } from '../transaction'
import { conflictError } from './change'
import { loadRequest, scopeOf } from './load'

const emptyForm: RequestForm = {
  region: null,
  questionId: null,
  answers: {},
  priority: 'routine',
  setting: 'outpatient',
  history: '',
  wish: null,
  weightKg: null,
  heightCm: null,
  screening: emptyScreening,
  typedReadings: [],
  screeningConfirmed: false,
  contactNumber: '',
  detailsByEmail: null,
  patientEmail: null,
}

/**
 * Begins a draft for a patient whom the clinician has confirmed. The record is read first, outside the transaction; where it
 * cannot be reached, somebody already known here may still be asked for.
 *
 * @throws Invalid, StateConflict for a person no longer alive or a record that was replaced, Unavailable.
 */
export async function createDraft({ ctx, input }: { ctx: ServiceContext, input: z.output<typeof createRequestSchema> }): Promise<WriteResult> {
  const actor = userOf(ctx)
  if (!actor.practiceIds.includes(input.practiceId)) throw new Invalid([{ path: 'practiceId', message: 'Choose one of your own practices.' }])
  const earlier = await earlierAnswer<WriteResult>(ctx)
  if (earlier) return earlier.response
  const copied = input.copyOf ? await copiedForm(ctx, { ...input, id: input.copyOf }) : null
  const reading = await readPatientRecord(ctx, input.ehrPatientId)
  if (reading.patient?.deceased) throw new StateConflict('The hospital record says that this person has died; no exam can be requested.')
  if (reading.patient && !reading.patient.birthDate) throw new StateConflict('The hospital record holds no date of birth for this person. Have it completed there first.')
  if (reading.patient?.replacedBy) throw new StateConflict('This record was merged into another one. Search again and choose that one.')

  return await inTransaction(ctx, async (tx) => {
    const patientId = reading.patient ? await keepPatient(tx, ctx, reading) : await knownPatient(tx, input.ehrPatientId)
    const [draft] = await tx.insert(requests).values({
      practiceId: input.practiceId,
      patientId,
      preparedById: actor.userId,
      form: copied?.form ?? emptyForm,
      record: reading,
      recordReadAt: reading.state === 'unreachable' ? null : new Date(reading.readAt),
      copiedFromId: copied?.id ?? null,
      createdAt: ctx.now,
      updatedAt: ctx.now,
    }).returning({ id: requests.id, version: requests.version })
    if (!draft) throw new Error('the draft was not stored')
    await recordAudit(tx, ctx, {
      action: copied ? 'request.copy' : 'request.create',
      objectType: 'request',
      objectId: draft.id,
      patientId,
      practiceId: input.practiceId,
      detail: { record: reading.state },
    })
    return { id: draft.id, reference: null, state: 'draft', version: draft.version }
  })
}

/**
 * A corrected copy starts from what was sent. Safety answers are to be confirmed afresh, and the patient's wish on e-mail, which may
 * have changed since, is not carried over.
 */
async function copiedForm(
  ctx: ServiceContext,
  { id, ehrPatientId, practiceId }: { id: string, ehrPatientId: string, practiceId: string },
): Promise<{ id: string, form: RequestForm }> {
  const loaded = await loadRequest(ctx.db, id)
  const { request, patient } = loaded
  permitRequest(ctx, 'request.resend', scopeOf(request))
  if (!mayBeCopied(request.state)) throw conflictError(loaded)
  if (patient.ehrId !== ehrPatientId) throw new Forbidden('A copy stays with the same patient.')
  if (request.practiceId !== practiceId) throw new Forbidden('A copy stays with the practice that asked.')
  return { id, form: { ...request.form, screeningConfirmed: false, detailsByEmail: null, patientEmail: null } }
}

/** Stores or refreshes the person as the record knows them. What the patient told us about e-mail stays. */
export async function keepPatient(tx: Database, ctx: ServiceContext, reading: RecordReading): Promise<string> {
  const { patient } = reading
  if (!patient) throw new Error('a reading without a patient cannot be kept')
  const facts = {
    recordNumber: patient.recordNumber ?? patient.ehrId,
    familyName: patient.familyName ?? '',
    givenName: patient.givenName ?? '',
    displayName: patient.displayName,
    birthDate: patient.birthDate ?? '',
    sex: patient.sex,
    phone: patient.phone,
    language: patient.language ?? 'en',
    readAt: new Date(reading.readAt),
  }
  const [row] = await tx.insert(patients).values({ ehrId: patient.ehrId, email: patient.email, createdAt: ctx.now, ...facts })
    .onConflictDoUpdate({ target: patients.ehrId, set: { ...facts, email: sql`coalesce(${patients.email}, excluded.email)` } })
    .returning({ id: patients.id })
  if (!row) throw new Error('the patient was not stored')
  return row.id
}

async function knownPatient(tx: Database, ehrId: string): Promise<string> {
  const [row] = await tx.select({ id: patients.id }).from(patients).where(eq(patients.ehrId, ehrId))
  if (!row) throw new Unavailable('The hospital record cannot be reached, and this patient is not known here yet. Try again in a few minutes, or call imaging for an urgent exam.', 30)
  return row.id
}
