import type { SearchParams } from 'fhir-kit-client'
import type { LabReading } from '#shared/domain/kidney/types'
import type { PartProblem } from '#shared/domain/record/types'
import type { Capabilities, EhrSession } from './client'
import { creatinineLoinc, cystatinLoinc, loincRefs, panelLoinc, tokenList } from './codes'
import { EhrUnavailable } from './errors'
import { daysBefore } from './fhir-time'
import { asObservation, isPanel, mapLaboratory } from './map-laboratory'
import { observationResource, type FhirJson, type ObservationResource } from './resources'
import { joinRows, patientForms, readRows, type Rows } from './read-rows'
import { specimenOf, specimensOf } from './specimen'
import { localTarget, namesPatient } from './subject'
import type { EhrSettings } from './settings'

export interface LaboratoryQuestion {
  session: EhrSession
  settings: EhrSettings
  patientId: string
  since: string | null
  zone: string
  capabilities: Promise<Capabilities | null>
}

/** Most single resources (panel parts, specimens) fetched in one reading. */
const mostFetched = 20

/**
 * Every creatinine and cystatin C of the patient: by code, inside panels, as panel members, and by name under codes this
 * department has not been told about. Newest first.
 */
export async function readLaboratory(question: LaboratoryQuestion): Promise<{ rows: Rows<ObservationResource>, readings: LabReading[] }> {
  const [coded, named] = await Promise.all([readCoded(question), readNamed(question)])
  const members = await readMembers(coded.rows, question)
  const known = new Set(coded.rows.map(({ id }) => id))
  const observations = [...coded.rows, ...[...members.rows, ...named].filter(({ id }) => !known.has(id) && known.add(id))]
  const specimens = specimensOf([...coded.included, ...await readSpecimens(observations, coded.included, question)])
  const readings = observations.flatMap(observation => mapLaboratory(observation, { ...question, specimens }))
  const rows = members.problem === null ? coded : { ...coded, complete: false, problem: members.problem, words: 'Parts of a panel could not be fetched' }
  return { rows, readings: readings.sort(newestFirst) }
}

async function readCoded(question: LaboratoryQuestion): Promise<Rows<ObservationResource>> {
  const creatinine = [...loincRefs([...creatinineLoinc, ...cystatinLoinc]), ...question.settings.creatinineCodes]
  const search = (filters: SearchParams) => readRows({
    ...question,
    resourceType: 'Observation',
    forms: patientForms(question.patientId, filters, resultOrder(question)),
    parse: observationResource,
    owner: ({ subject }) => subject,
  })
  const insidePanels = async () => {
    const capabilities = await question.capabilities
    const offered = capabilities?.types.get('Observation')?.params.has('component-code')
    return offered ? search({ 'component-code': tokenList(creatinine) }) : null
  }
  const [byCode, inPanels] = await Promise.all([search({ code: tokenList([...creatinine, ...loincRefs(panelLoinc)]) }), insidePanels()])
  return inPanels ? joinRows(byCode, inPanels) : byCode
}

/** A date without a zone is taken in the server's own: one day more is asked for, and left out again on our side. */
function resultOrder({ since, settings }: LaboratoryQuestion): SearchParams {
  const order = { _sort: '-date', _count: settings.limits.pageSize }
  return since === null ? order : { date: `ge${daysBefore(since, 1)}`, ...order }
}

/** Results that say creatinine by name only. Servers need not know this question: where they do not, nothing is lost. */
async function readNamed(question: LaboratoryQuestion): Promise<ObservationResource[]> {
  const { session, settings, patientId } = question
  try {
    const answer = await session.search('Observation', [{ 'patient': patientId, 'code:text': 'creatinine', ...resultOrder(question) }], { maxPages: 3 })
    return answer.resources.flatMap(resource => asObservation(resource) ?? []).filter(({ subject }) => namesPatient(subject, patientId, settings))
  }
  catch (error) {
    if (error instanceof EhrUnavailable) return []
    throw error
  }
}

/** Parts of panels that no search brought. A panel with a creatinine already among its known parts needs none. */
async function readMembers(
  observations: readonly ObservationResource[], { session, settings, patientId }: LaboratoryQuestion,
): Promise<{ rows: ObservationResource[], problem: PartProblem | null }> {
  const known = new Set(observations.map(({ id }) => id))
  const missing = new Set(observations.filter(isPanel).flatMap((panel) => {
    const ids = panel.hasMember.flatMap(reference => localTarget(reference, settings) ?? []).filter(({ type }) => type === 'Observation').map(({ id }) => id)
    return ids.some(id => known.has(id)) ? [] : ids
  }))
  const { resources, problem } = await fetchEach('Observation', missing, session)
  return {
    rows: resources.flatMap(resource => asObservation(resource) ?? []).filter(({ subject }) => namesPatient(subject, patientId, settings)),
    problem,
  }
}

/** Specimens of the newest results, so that urine under a serum code is noticed. */
async function readSpecimens(observations: readonly ObservationResource[], included: readonly FhirJson[], question: LaboratoryQuestion): Promise<FhirJson[]> {
  const known = specimensOf(included)
  const wanted = new Set(observations
    .filter(observation => mapLaboratory(observation, { ...question, specimens: known }).some(({ refusal }) => refusal === null))
    .filter(observation => specimenOf(observation, known, question.settings) === null)
    .sort((a, b) => (b.effectiveDateTime ?? '').localeCompare(a.effectiveDateTime ?? ''))
    .flatMap(observation => localTarget(observation.specimen, question.settings) ?? [])
    .filter(({ type }) => type === 'Specimen')
    .map(({ id }) => id))
  // The code already says blood; a specimen that cannot be fetched takes nothing away from that.
  return (await fetchEach('Specimen', wanted, question.session)).resources
}

async function fetchEach(type: string, ids: ReadonlySet<string>, session: EhrSession): Promise<{ resources: FhirJson[], problem: PartProblem | null }> {
  let problem: PartProblem | null = ids.size > mostFetched ? 'cut-short' : null
  const resources = await Promise.all([...ids].slice(0, mostFetched).map(async (id) => {
    try {
      return [await session.read(type, id)]
    }
    catch (error) {
      if (!(error instanceof EhrUnavailable)) throw error
      // What is gone cannot be fetched by anybody.
      if (error.problem !== 'not-found') problem = error.problem
      return []
    }
  }))
  return { resources: resources.flat(), problem }
}

function newestFirst(a: LabReading, b: LabReading): number {
  return (b.collectedAt ?? '').localeCompare(a.collectedAt ?? '') || (b.issuedAt ?? '').localeCompare(a.issuedAt ?? '')
}
