import type { RecordReading } from '#shared/domain/record/types'
import { withEarlier } from '#shared/domain/record/with-earlier'
import type { ServiceContext } from '../context'
import type { LoadedRequest } from '../request/load'
import { readPatientRecord } from './read-patient-record'

/** A reading this young is taken as it is, milliseconds. */
const youngMs = 2 * 60_000
/** Sending and signing wait this long for the hospital record, then go on with the earlier reading, milliseconds. */
const patienceMs = 6_000

/**
 * The freshest record to be had in bounded time: the stored one while young, else a new reading, else the stored one again,
 * marked as no longer complete, so that nobody takes it for a fresh look. What a partial reading missed is kept from the stored one.
 */
export async function freshRecord(ctx: ServiceContext, { request, patient }: Pick<LoadedRequest, 'request' | 'patient'>): Promise<RecordReading | null> {
  const stored = request.record
  if (stored?.state === 'complete' && ctx.now.getTime() - Date.parse(stored.readAt) < youngMs) return stored
  const reading = await readPatientRecord(ctx, patient.ehrId, AbortSignal.timeout(patienceMs))
  if (reading.state !== 'unreachable') return withEarlier(reading, stored)
  return stored && stored.state !== 'unreachable' ? { ...stored, state: 'incomplete' } : reading
}
