import { asObservation, mapLaboratory, type LaboratoryContext } from '#server/ehr/map-laboratory'
import type { ObservationResource } from '#server/ehr/resources'
import { parseEhrSettings, type EhrSettings } from '#server/ehr/settings'

export function settingsFor(raw: Record<string, unknown> = {}): EhrSettings {
  const settings = parseEhrSettings({ baseUrl: 'https://ehr.example/fhir/', ...raw })
  if (!settings) throw new Error('No settings')
  return settings
}

/** A plain serum creatinine, changed as a test needs. */
export function observation(change: Record<string, unknown> = {}): ObservationResource {
  const resource = asObservation({
    resourceType: 'Observation',
    id: 'o1',
    status: 'final',
    code: { coding: [{ system: 'http://loinc.org', code: '2160-0' }] },
    subject: { reference: 'Patient/p1' },
    effectiveDateTime: '2026-11-12T13:00:00Z',
    valueQuantity: { value: 0.94, unit: 'mg/dL', system: 'http://unitsofmeasure.org', code: 'mg/dL' },
    ...change,
  })
  if (!resource) throw new Error('Not an observation')
  return resource
}

export const readingsOf = (change: Record<string, unknown> = {}, context: Partial<LaboratoryContext> = {}) =>
  mapLaboratory(observation(change), { settings: settingsFor(), zone: 'America/Chicago', specimens: new Map(), since: null, ...context })

export const readingOf = (change: Record<string, unknown> = {}, context: Partial<LaboratoryContext> = {}) => readingsOf(change, context)[0]

export const loincCode = (code: string, display?: string) => ({ coding: [{ system: 'http://loinc.org', code, ...(display ? { display } : {}) }] })
