import type { ConnectionReport } from '#shared/domain/record/types'
import type { EhrClient } from './client'
import { EhrUnavailable } from './errors'

const needed = ['Patient', 'Observation', 'Condition', 'AllergyIntolerance', 'Procedure', 'MedicationAdministration']

/** Asks the hospital's server what it is and offers, for the connections screen. Never throws. */
export async function checkConnection(client: EhrClient | null, { now }: { now: string }): Promise<ConnectionReport> {
  const empty = { checkedAt: now, fhirVersion: null, software: null, missing: [], elapsedMs: null }
  if (!client) return { ...empty, state: 'not-configured', words: 'No hospital record is connected', breaker: null }
  const started = client.now()
  try {
    const capabilities = await client.session().capabilities({ fresh: true })
    const answered = { ...empty, elapsedMs: client.now() - started, breaker: client.breaker() }
    if (!capabilities) return { ...answered, state: 'degraded', words: 'The hospital record answers, but not with a FHIR capability statement' }
    const { fhirVersion, software, types } = capabilities
    const missing = needed.filter(type => !types.has(type))
    const known = { ...answered, fhirVersion, software, missing }
    if (!fhirVersion?.startsWith('4.0')) return { ...known, state: 'degraded', words: `The hospital record speaks FHIR ${fhirVersion ?? 'of an unknown version'}; 4.0 is needed` }
    if (missing.length > 0) return { ...known, state: 'degraded', words: `Connected. Not offered: ${missing.join(', ')}` }
    return { ...known, state: 'ok', words: 'Connected' }
  }
  catch (error) {
    const words = error instanceof EhrUnavailable ? error.message : 'The hospital record cannot be reached'
    return { ...empty, state: 'unreachable', words, breaker: client.breaker() }
  }
}
