import type { ScreeningHint } from '#shared/domain/record/types'
import { hasLoinc, nameOf, pregnancyStatusLoinc, pregnancyTestLoinc } from './codes'
import { daysBetween, readFhirTime } from './fhir-time'
import type { ObservationResource } from './resources'

/** A pregnancy noted longer ago than this may have ended (our rule). */
export const pregnancyStaleAfterDays = 300
/** "Not pregnant" and a negative test say nothing about later weeks (our rule). */
const notPregnantHoldsDays = 7

/** LOINC answer and SNOMED CT codes of the pregnancy status (answers checked, SNOMED CT from memory). */
const pregnantCodes = new Set(['LA15173-0', '77386006'])
const notPregnantCodes = new Set(['LA26683-5', '60001007'])
const positiveCodes = new Set(['10828004', 'POS', 'LA6576-8'])
const negativeCodes = new Set(['260385009', 'NEG', 'LA6577-6'])

/** What the newest pregnancy observation suggests; null where the record has none that still counts. */
export function mapPregnancy(observations: readonly ObservationResource[], { zone, now }: { zone: string, now: string }): ScreeningHint | null {
  const dated = observations.flatMap((observation) => {
    const status = hasLoinc(observation.code, pregnancyStatusLoinc)
    if (!status && !hasLoinc(observation.code, pregnancyTestLoinc)) return []
    if (!['final', 'amended', 'corrected'].includes(observation.status)) return []
    const { at } = readFhirTime(observation.effectiveDateTime ?? observation.effectivePeriod?.start, zone)
    const age = daysBetween(at, now)
    return at === null || age === null || age < 0 ? [] : [{ observation, status, at, age }]
  }).sort((a, b) => Date.parse(b.at) - Date.parse(a.at))
  for (const { observation, status, at, age } of dated) {
    const hint = status ? fromStatus(observation, at, age) : fromTest(observation, at, age)
    if (hint) return hint
  }
  return null
}

function fromStatus(observation: ObservationResource, at: string, age: number): ScreeningHint | null {
  const codes = observation.valueCodeableConcept?.coding.map(({ code }) => code ?? '') ?? []
  const name = nameOf(observation.valueCodeableConcept) ?? 'unknown'
  if (codes.some(code => pregnantCodes.has(code))) {
    return age > pregnancyStaleAfterDays
      ? { field: 'pregnancy', value: 'unknown', because: `Pregnancy status in the record: ${name}, noted ${age} days ago; ask`, recordedAt: at }
      : { field: 'pregnancy', value: 'yes', because: `Pregnancy status in the record: ${name}`, recordedAt: at }
  }
  if (codes.some(code => notPregnantCodes.has(code))) {
    return age > notPregnantHoldsDays ? null : { field: 'pregnancy', value: 'no', because: `Pregnancy status in the record: ${name}`, recordedAt: at }
  }
  return { field: 'pregnancy', value: 'unknown', because: `Pregnancy status in the record: ${name}`, recordedAt: at }
}

function fromTest(observation: ObservationResource, at: string, age: number): ScreeningHint | null {
  const codes = [observation.valueCodeableConcept, ...observation.interpretation].flatMap(concept => concept?.coding.map(({ code }) => code ?? '') ?? [])
  const words = (observation.valueString ?? observation.valueCodeableConcept?.text ?? '').trim().toLowerCase()
  if (age <= pregnancyStaleAfterDays && (codes.some(code => positiveCodes.has(code)) || words === 'positive' || words === 'detected')) {
    return { field: 'pregnancy', value: 'possible', because: 'Pregnancy test positive', recordedAt: at }
  }
  if (age <= notPregnantHoldsDays && (codes.some(code => negativeCodes.has(code)) || words === 'negative' || words === 'not detected')) {
    return { field: 'pregnancy', value: 'no', because: 'Pregnancy test negative', recordedAt: at }
  }
  return null
}
