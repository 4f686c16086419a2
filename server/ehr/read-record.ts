import type { LaboratoryEgfr, PartProblem, PartState, RecordPart, RecordPatient, RecordReading, RecordWarning, ScreeningHint } from '#shared/domain/record/types'
import type { Capabilities, EhrClient, EhrSession } from './client'
import { egfrFormulas, heightLoinc, loincRefs, pregnancyStatusLoinc, pregnancyTestLoinc, tokenList, weightLoinc } from './codes'
import { EhrUnavailable } from './errors'
import { daysBefore } from './fhir-time'
import { mapAllergies } from './map-allergies'
import { mapConditions, mapDialysisSessions, onePerField } from './map-conditions'
import { mapLaboratoryEgfr } from './map-laboratory'
import { mapPatient, patientWarnings } from './map-patient'
import { mapPregnancy } from './map-pregnancy'
import { mapHeight, mapWeight } from './map-vitals'
import { readExposures } from './read-exposures'
import { readLaboratory } from './read-laboratory'
import { patientForms, readRows, type Rows } from './read-rows'
import { allergyResource, conditionResource, observationResource } from './resources'

export interface ReadRecordOptions {
  /** Earliest collection date of laboratory results, YYYY-MM-DD in the zone; null: no limit. */
  since: string | null
  /** The department's IANA zone: plain dates are read in it. */
  zone: string
  /** ISO instant; the database's clock where there is one. */
  now: string
  /** Date of birth our side holds. Where the record's differs, its results are not used. */
  expectedBirthDate?: string | null
  signal?: AbortSignal
}

/** Weights, heights and pregnancy observations older than this are not asked for, days. */
const vitalsLookBackDays = 730

/**
 * Reads everything an assessment needs from the hospital record, all parts at once within one time limit. An outage of one
 * part leaves the rest usable; the reading says which part could not be looked at, and never calls that "none found".
 *
 * @param ehrPatientId logical id of the patient on the hospital's server, without `Patient/`
 */
export async function readRecord(client: EhrClient, ehrPatientId: string, options: ReadRecordOptions): Promise<RecordReading> {
  const { zone, now, since } = options
  const { settings } = client
  const session = client.session(options.signal)
  const capabilities = readCapabilities(session)
  const question = { session, settings, patientId: ehrPatientId, since, zone, capabilities: capabilities.then(({ known }) => known) }
  const recent = { date: `ge${daysBefore(now.slice(0, 10), vitalsLookBackDays)}`, _sort: '-date', _count: settings.limits.pageSize }
  const observations = (codes: readonly string[]) => readRows({
    ...question,
    resourceType: 'Observation',
    forms: patientForms(ehrPatientId, { code: tokenList(loincRefs(codes)) }, recent),
    parse: observationResource,
    owner: ({ subject }) => subject,
  })
  const everyRow = patientForms(ehrPatientId, {}, { _count: settings.limits.pageSize })
  const [patient, laboratory, vitals, beside, conditions, allergies, exposures] = await Promise.all([
    readPatient(session, ehrPatientId, settings.recordNumberSystem, capabilities),
    readLaboratory(question),
    observations([...weightLoinc, ...heightLoinc]),
    observations([...pregnancyStatusLoinc, ...pregnancyTestLoinc, ...Object.keys(egfrFormulas)]),
    readRows({ ...question, resourceType: 'Condition', forms: everyRow, parse: conditionResource, owner: ({ subject }) => subject }),
    readRows({ ...question, resourceType: 'AllergyIntolerance', forms: everyRow.slice(0, 2), parse: allergyResource, owner: row => row.patient }),
    readExposures(question, now),
  ])
  const problems = mapConditions(conditions.rows, { zone, now })
  const reactions = mapAllergies(allergies.rows, zone)
  const pregnancy = mapPregnancy(beside.rows, { zone, now })
  const weight = mapWeight(vitals.rows, { zone, now })
  const height = mapHeight(vitals.rows, { zone, now })
  const parts: RecordReading['parts'] = {
    patient: patient.part,
    laboratory: partOf(laboratory.rows, laboratory.readings.length > 0),
    weight: partOf(vitals, weight !== null),
    height: partOf(vitals, height !== null),
    pregnancy: partOf(beside, pregnancy !== null),
    conditions: partOf(conditions, conditions.rows.length > 0),
    allergies: partOf(allergies, allergies.rows.length > 0),
    exposures: partOf(exposures.rows, exposures.exposures.length > 0),
  }
  const reading: RecordReading = {
    state: 'complete',
    readAt: now,
    ehrPatientId,
    parts,
    patient: patient.patient,
    readings: laboratory.readings,
    laboratoryEgfr: laboratoryEgfr(beside, zone),
    weight,
    height,
    hints: onePerField([...hintsOf(pregnancy, problems.hints, mapDialysisSessions(exposures.procedures, { zone, now })), ...reactions.hints]),
    exposures: exposures.exposures,
    allergies: reactions.lines,
    noKnownAllergy: reactions.noKnownAllergy,
    conditions: problems.lines,
    warnings: [
      ...(patient.patient ? patientWarnings(patient.patient) : []),
      ...rowWarnings([laboratory.rows, vitals, beside, conditions, allergies, exposures.rows]),
      ...partWarnings(parts),
      ...laboratory.readings.filter(({ refusal }) => refusal?.startsWith('Found, not recognized')).map(unrecognized),
      ...(exposures.undated > 0 ? [{ id: 'skipped-row' as const, text: 'The record holds a gadolinium dose without a date; ask when it was given' }] : []),
      ...reactions.warnings,
    ],
  }
  return settle(reading, options.expectedBirthDate ?? null)
}

interface CapabilityAnswer { known: Capabilities | null, nothingThere: boolean }

async function readCapabilities(session: EhrSession): Promise<CapabilityAnswer> {
  try {
    return { known: await session.capabilities(), nothingThere: false }
  }
  catch (error) {
    if (!(error instanceof EhrUnavailable)) throw error
    return { known: null, nothingThere: error.status === 404 || (error.problem === 'unreadable' && error.status !== null) }
  }
}

async function readPatient(
  session: EhrSession, id: string, recordNumberSystem: string | null, capabilities: Promise<CapabilityAnswer>,
): Promise<{ part: RecordPart, patient: RecordPatient | null }> {
  const failed = (problem: PartProblem, words: string, state: PartState = 'could-not-look') =>
    ({ part: { state, complete: false, problem, words }, patient: null })
  try {
    const patient = mapPatient(await session.read('Patient', id), recordNumberSystem)
    if (!patient) return failed('unreadable', 'The hospital record sent a patient that cannot be read')
    if (patient.ehrId !== id) return failed('other-patient', 'The hospital record sent another patient than the one asked for')
    return { part: { state: 'found', complete: true, problem: null, words: null }, patient }
  }
  catch (error) {
    if (!(error instanceof EhrUnavailable)) throw error
    if (error.problem !== 'not-found') return failed(error.problem, error.message)
    // A wrong address answers 404 to everything: that says nothing about the patient.
    return !error.inFhir && (await capabilities).nothingThere
      ? failed('unreachable', 'There is no FHIR server at the configured address')
      : failed('not-found', 'The hospital record has no such patient', 'none')
  }
}

function partOf(rows: Rows<unknown>, found: boolean): RecordPart {
  const state = !rows.looked ? 'could-not-look' : found ? 'found' : rows.complete ? 'none' : 'could-not-look'
  return { state, complete: rows.complete, problem: rows.problem, words: rows.words }
}

function laboratoryEgfr(beside: Rows<Parameters<typeof mapLaboratoryEgfr>[0]>, zone: string): LaboratoryEgfr[] {
  return beside.rows.flatMap(row => mapLaboratoryEgfr(row, zone) ?? [])
    .sort((a, b) => (b.collectedAt ?? '').localeCompare(a.collectedAt ?? ''))
}

/** A pregnancy on the problem list goes before "not pregnant" elsewhere: a person is asked. */
const hintsOf = (pregnancy: ScreeningHint | null, problems: ScreeningHint[], sessions: ScreeningHint[]): ScreeningHint[] =>
  [...sessions, ...problems, ...(pregnancy ? [pregnancy] : [])]

function rowWarnings(all: ReadonlyArray<Rows<unknown>>): RecordWarning[] {
  const warnings: RecordWarning[] = []
  if (all.some(({ foreign }) => foreign > 0)) {
    warnings.push({ id: 'row-of-another-patient', text: 'The hospital record sent entries that are not this patient\'s; they were left out' })
  }
  if (all.some(({ unreadable }) => unreadable > 0)) {
    warnings.push({ id: 'skipped-row', text: 'Some entries could not be read and were left out' })
  }
  if (all.some(({ messages }) => messages > 0)) {
    warnings.push({ id: 'server-message', text: 'The hospital record sent a remark with its answer' })
  }
  return warnings
}

function partWarnings(parts: RecordReading['parts']): RecordWarning[] {
  return Object.entries(parts).filter(([, { problem }]) => problem === 'not-offered')
    .map(([name]) => ({ id: 'not-offered' as const, text: `The hospital record does not offer this part: ${name}` }))
}

const unrecognized = ({ refusal }: { refusal: string | null }): RecordWarning => ({ id: 'unrecognized-code', text: refusal ?? '' })

/** Says how far the whole reading can be relied on. */
function settle(reading: RecordReading, expectedBirthDate: string | null): RecordReading {
  const found = reading.patient?.birthDate ?? null
  if (expectedBirthDate !== null && found !== null && !sameBirthDate(expectedBirthDate, found)) {
    const text = 'The date of birth in the hospital record differs from the one held here; its results are not used'
    const readings = reading.readings.map(entry => ({ ...entry, refusal: entry.refusal ?? text }))
    return { ...reading, state: 'incomplete', readings, warnings: [{ id: 'birth-date-differs', text }, ...reading.warnings] }
  }
  if (reading.parts.patient.problem === 'not-found') {
    const part: RecordPart = { state: 'could-not-look', complete: false, problem: 'not-found', words: reading.parts.patient.words }
    return {
      ...reading,
      state: 'incomplete',
      parts: { ...reading.parts, laboratory: part, weight: part, height: part, pregnancy: part, conditions: part, allergies: part, exposures: part },
    }
  }
  const { patient, laboratory, ...others } = reading.parts
  if ([patient, laboratory, ...Object.values(others)].every(({ state }) => state === 'could-not-look')) return { ...reading, state: 'unreachable' }
  const whole = patient.complete && laboratory.complete && Object.values(others).every(({ complete, problem }) => complete || problem === 'not-offered')
  return { ...reading, state: whole ? 'complete' : 'incomplete' }
}

/** A record that knows only the year or month agrees as far as it goes. */
const sameBirthDate = (a: string, b: string): boolean => a.startsWith(b) || b.startsWith(a)
