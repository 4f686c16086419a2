import { and, asc, eq, sql } from 'drizzle-orm'
import type { SQL } from 'drizzle-orm'
import type { z } from 'zod'
import type { RecordPatient } from '#shared/domain/record/types'
import type { patientSearchSchema } from '#shared/schemas/requests'
import type { PatientSearchView } from '#shared/types/views'
import { patients } from '#server/database/schema/requests'
import { EhrUnavailable } from '#server/ehr/errors'
import { searchPatients } from '#server/ehr/search-patients'
import { recordAudit } from '../audit/record'
import type { ServiceContext } from '../context'
import { likePrefix } from '../cursor'

type Query = z.output<typeof patientSearchSchema>

/**
 * Looks a patient up in the hospital record. While that cannot be reached, people already known here are searched instead, and
 * the answer says so. Several matches are always left to a person.
 */
export async function searchForPatient({ ctx, input }: { ctx: ServiceContext, input: Query }): Promise<PatientSearchView> {
  const found = await fromRecord(ctx, input) ?? await knownHere(ctx, input)
  await recordAudit(ctx.db, ctx, {
    action: 'patient.search', objectType: 'patient', objectId: null,
    detail: { by: Object.entries(input).filter(([, value]) => value).map(([field]) => field), found: found.patients.length, source: found.source },
  })
  return found
}

async function fromRecord(ctx: ServiceContext, input: Query): Promise<PatientSearchView | null> {
  if (!ctx.ehr) return null
  try {
    return { ...await searchPatients(ctx.ehr, input), source: 'record' }
  }
  catch (error) {
    if (error instanceof EhrUnavailable) return null
    throw error
  }
}

async function knownHere(ctx: ServiceContext, input: Query): Promise<PatientSearchView> {
  const filters: SQL[] = []
  if (input.name) for (const word of input.name.split(/[\s,]+/).filter(Boolean)) filters.push(sql`lower(${patients.displayName}) like ${`%${likePrefix(word.toLowerCase())}%`}`)
  if (input.recordNumber) filters.push(eq(patients.recordNumber, input.recordNumber))
  if (input.birthDate) filters.push(eq(patients.birthDate, input.birthDate))
  const rows = await ctx.db.select().from(patients).where(and(...filters)).orderBy(asc(patients.displayName)).limit(25)
  return {
    outcome: rows.length === 0 ? 'none' : rows.length === 1 ? 'one' : 'several',
    patients: rows.map(asRecordPatient),
    complete: false,
    words: 'The hospital record cannot be reached. Only people already known here were searched.',
    source: 'known-here',
  }
}

function asRecordPatient(row: typeof patients.$inferSelect): RecordPatient {
  return {
    ehrId: row.ehrId,
    recordNumber: row.recordNumber,
    familyName: row.familyName,
    givenName: row.givenName,
    displayName: row.displayName,
    birthDate: row.birthDate,
    sex: row.sex === 'female' || row.sex === 'male' || row.sex === 'other' ? row.sex : 'unknown',
    email: row.email,
    phone: row.phone,
    language: row.language,
    deceased: false,
    active: true,
    replacedBy: null,
  }
}
