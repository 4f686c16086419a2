import type { GadoliniumExposure } from '#shared/domain/safety/types'
import type { Capabilities, EhrSession } from './client'
import { EhrUnavailable } from './errors'
import { gadoliniumOf } from './gadolinium'
import { mapExposures, medicationReferenceOf } from './map-exposures'
import { failedRows, joinRows, patientForms, readRows, type Rows } from './read-rows'
import { administrationResource, procedureResource, type AdministrationResource, type FhirJson, type ProcedureResource } from './resources'
import { localTarget } from './subject'
import type { EhrSettings } from './settings'

/** Most Medication resources fetched in one reading. */
const mostFetched = 20

export interface ReadExposures {
  rows: Rows<{ id: string }>
  exposures: GadoliniumExposure[]
  undated: number
  procedures: ProcedureResource[]
}

/** Earlier gadolinium doses, from medicines given and from procedures. */
export async function readExposures(
  question: { session: EhrSession, settings: EhrSettings, patientId: string, zone: string, capabilities: Promise<Capabilities | null> }, now: string,
): Promise<ReadExposures> {
  const { patientId, settings, zone } = question
  const page = { _count: settings.limits.pageSize }
  const [administrations, procedures] = await Promise.all([
    readRows({
      ...question,
      resourceType: 'MedicationAdministration',
      forms: [{ patient: patientId, status: 'completed', ...page }, ...patientForms(patientId, {}, page)],
      parse: administrationResource,
      owner: ({ subject }) => subject,
    }),
    readRows({
      ...question,
      resourceType: 'Procedure',
      forms: patientForms(patientId, {}, page),
      parse: procedureResource,
      owner: ({ subject }) => subject,
    }),
  ])
  const medications = await readMedications(administrations, question)
  return {
    rows: joinRows(joinRows<{ id: string }>(administrations, procedures), medications.rows),
    ...mapExposures(administrations.rows, procedures.rows, medications.known, { zone, now }),
    procedures: procedures.rows,
  }
}

/** The medicines that administrations only point to. */
async function readMedications(
  administrations: Rows<AdministrationResource>, { session, settings }: { session: EhrSession, settings: EhrSettings },
): Promise<{ known: Map<string, FhirJson>, rows: Rows<{ id: string }> }> {
  const known = new Map<string, FhirJson>()
  const wanted = new Map<string, string>()
  for (const entry of administrations.rows) {
    const reference = medicationReferenceOf(entry)
    const target = reference === null ? null : localTarget(entry.medicationReference, settings)
    if (reference === null || target?.type !== 'Medication') continue
    const sent = administrations.included.find(({ resourceType, id }) => resourceType === 'Medication' && id === target.id)
    if (sent) known.set(reference, sent)
    else if (gadoliniumOf({ coding: [], text: entry.medicationReference?.display }) === null) wanted.set(reference, target.id)
  }
  let rows: Rows<{ id: string }> = {
    rows: [], included: [], looked: true, complete: wanted.size <= mostFetched, messages: 0, foreign: 0, unreadable: 0,
    problem: wanted.size <= mostFetched ? null : 'cut-short',
    words: wanted.size <= mostFetched ? null : 'Not every medicine given could be looked up',
  }
  await Promise.all([...wanted].slice(0, mostFetched).map(async ([reference, id]) => {
    try {
      known.set(reference, await session.read('Medication', id))
    }
    catch (error) {
      // A medicine that is gone cannot be looked up by anybody; any other failure leaves the part incomplete.
      if (!(error instanceof EhrUnavailable && error.problem === 'not-found')) rows = { ...failedRows<{ id: string }>(error), looked: true }
    }
  }))
  return { known, rows }
}
