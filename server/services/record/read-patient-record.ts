import { eq } from 'drizzle-orm'
import { recordPartNames } from '#shared/domain/record/types'
import type { PartProblem, RecordPart, RecordPartName, RecordReading } from '#shared/domain/record/types'
import { patients } from '#server/database/schema/requests'
import { readRecord } from '#server/ehr/read-record'
import { EhrUnavailable } from '#server/ehr/errors'
import type { ServiceContext } from '../context'
import { rulesInForce } from '../rules/in-force'

/** How far back laboratory results are asked for, days: long enough to say "none in three years" and to judge a year's baseline. */
const lookBackDays = 3 * 365

/**
 * One bounded reading of a patient's record. Never throws for an outage: a record that could not be reached is a result of its
 * own, and never the same as one that holds nothing.
 */
export async function readPatientRecord(ctx: ServiceContext, ehrPatientId: string, signal?: AbortSignal): Promise<RecordReading> {
  if (!ctx.ehr) return unreachableReading(ehrPatientId, ctx.now, 'not-connected', 'No hospital record is connected.')
  const [inForce, [known]] = await Promise.all([
    rulesInForce(ctx.db, ctx.now),
    ctx.db.select({ birthDate: patients.birthDate }).from(patients).where(eq(patients.ehrId, ehrPatientId)),
  ])
  try {
    return await readRecord(ctx.ehr, ehrPatientId, {
      since: new Date(ctx.now.getTime() - lookBackDays * 86_400_000).toISOString().slice(0, 10),
      zone: inForce.rules.policy.department.timeZone,
      now: ctx.now.toISOString(),
      expectedBirthDate: known?.birthDate ?? null,
      signal,
    })
  }
  catch (error) {
    if (error instanceof EhrUnavailable) return unreachableReading(ehrPatientId, ctx.now, error.problem, error.message)
    throw error
  }
}

function unreachableReading(ehrPatientId: string, now: Date, problem: PartProblem, words: string): RecordReading {
  const part: RecordPart = { state: 'could-not-look', complete: false, problem, words }
  return {
    state: 'unreachable',
    readAt: now.toISOString(),
    ehrPatientId,
    parts: Object.fromEntries(recordPartNames.map(name => [name, part])) as Record<RecordPartName, RecordPart>,
    patient: null,
    readings: [],
    laboratoryEgfr: [],
    weight: null,
    height: null,
    hints: [],
    exposures: [],
    allergies: [],
    noKnownAllergy: false,
    conditions: [],
    warnings: [],
  }
}
