import { and, desc, eq, isNull } from 'drizzle-orm'
import { alias } from 'drizzle-orm/pg-core'
import { assess } from '#shared/domain/assessment/assess'
import { inputsFrom } from '#shared/domain/assessment/inputs'
import { kidneyLine } from '#shared/domain/assessment/kidney-line'
import type { Assessment, AssessmentInputs } from '#shared/domain/assessment/types'
import { findAgent } from '#shared/domain/contrast/agents'
import type { RecordReading } from '#shared/domain/record/types'
import type { RequestForm } from '#shared/domain/request/form'
import type { GadoliniumExposure } from '#shared/domain/safety/types'
import type { Sex } from '#shared/domain/kidney/types'
import type { Database } from '#server/database/client'
import { administrations, assessments } from '#server/database/schema/requests'
import type { requests } from '#server/database/schema/requests'
import type { ServiceContext } from '../context'
import type { RulesInForce } from '../rules/in-force'
import type { PatientRecord } from './load'

const correction = alias(administrations, 'correction')

/** Doses given here before to this patient, each in its newest corrected form. */
export async function exposureLedger(db: Database, patientId: string): Promise<GadoliniumExposure[]> {
  const rows = await db.select({ given: administrations }).from(administrations)
    .leftJoin(correction, eq(correction.correctsId, administrations.id))
    .where(and(eq(administrations.patientId, patientId), eq(administrations.given, true), isNull(correction.id)))
    .orderBy(desc(administrations.givenAt)).limit(200)
  return rows.map(({ given }) => ({
    id: `ledger-${given.id}`,
    agent: given.agent,
    agentText: given.agent ? (findAgent(given.agent)?.name ?? given.agent) : 'Gadolinium agent',
    givenAt: given.givenAt.toISOString(),
    amountMmol: given.amountMmol,
    source: 'ledger',
  }))
}

/** What the engine is handed for this request now. */
export async function gatherInputs(db: Database, now: Date, facts: {
  form: RequestForm
  record: RecordReading | null
  patient: PatientRecord
  plannedAt: Date | null
}): Promise<AssessmentInputs> {
  return inputsFrom({
    form: facts.form,
    record: facts.record,
    ledger: await exposureLedger(db, facts.patient.id),
    patient: { birthDate: facts.patient.birthDate, sex: knownSex(facts.patient.sex) },
    plannedAt: facts.plannedAt?.toISOString() ?? null,
    now: now.toISOString(),
  })
}

function knownSex(text: string): Sex {
  return text === 'female' || text === 'male' || text === 'other' ? text : 'unknown'
}

export interface Assessed { inputs: AssessmentInputs, result: Assessment }

export function runAssessment(inputs: AssessmentInputs, inForce: RulesInForce): Assessed {
  return { inputs, result: assess(inputs, inForce.rules) }
}

/** Stores an assessment and says what the request's own columns should hold of it. */
export async function storeAssessment(tx: Database, ctx: ServiceContext, entry: Assessed & {
  requestId: string
  cause: (typeof assessments.$inferInsert)['cause']
  inForce: RulesInForce
}): Promise<Pick<typeof requests.$inferInsert, 'currentAssessmentId' | 'sentence' | 'outcome' | 'gateEgfr' | 'kidneyLine'> & { currentAssessmentId: string }> {
  const [row] = await tx.insert(assessments).values({
    requestId: entry.requestId,
    cause: entry.cause,
    inputs: entry.inputs,
    result: entry.result,
    engineVersion: entry.result.engineVersion,
    guidanceVersionId: entry.inForce.guidanceId,
    policyVersionId: entry.inForce.policyId,
    createdById: ctx.actor.kind === 'user' ? ctx.actor.userId : null,
    createdAt: ctx.now,
  }).returning({ id: assessments.id })
  if (!row) throw new Error('the assessment was not stored')
  return {
    currentAssessmentId: row.id,
    sentence: entry.result.sentence,
    outcome: entry.result.suggestion ?? 'discuss',
    gateEgfr: entry.result.kidney.gateEgfr,
    kidneyLine: kidneyLine(entry.result),
  }
}
