import { DateTime } from 'luxon'
import { convertCreatinine } from '#shared/domain/kidney/units'
import type { Comparator, LabReading } from '#shared/domain/kidney/types'
import type { LaboratoryEgfr } from '#shared/domain/record/types'
import {
  codingText, creatinineLoinc, cystatinLoinc, egfrFormulas, hasCode, hasLoinc, isSystem, loinc, loincRefs, namesNever, panelLoinc, ucum, wordsOf,
} from './codes'
import { readFhirTime, type FhirTime } from './fhir-time'
import { observationResource, type Concept, type ObservationComponent, type ObservationResource, type Quantity } from './resources'
import { namesOtherFluid, otherFluid, specimenOf, type Specimens } from './specimen'
import type { EhrSettings } from './settings'

export interface LaboratoryContext {
  settings: EhrSettings
  zone: string
  specimens: Specimens
  /** Earliest collection date asked for, YYYY-MM-DD in the zone; null: no limit. */
  since: string | null
}

export const unrecognizedRefusal = (concept: Concept): string =>
  `Found, not recognized: the code ${codingText(concept.coding[0])} is not on this department's list of serum creatinine`

/** Every creatinine and cystatin C an Observation carries, refused ones too; empty for another kind of result. */
export function mapLaboratory(observation: ObservationResource, context: LaboratoryContext): LabReading[] {
  const inside = observation.component.flatMap(part => reading(observation, part, context))
  const valueless = inside.length > 0 && observation.valueQuantity === undefined
  return valueless ? inside : [...reading(observation, null, context), ...inside]
}

/** Results whose parts are separate resources to be fetched. */
export const isPanel = (observation: ObservationResource): boolean => hasLoinc(observation.code, panelLoinc)

/** An estimated GFR the laboratory sent, or null. */
export function mapLaboratoryEgfr(observation: ObservationResource, zone: string): LaboratoryEgfr | null {
  const coded = observation.code.coding.find(({ system, code }) => isSystem(system, loinc) && code !== undefined && code in egfrFormulas)
  const value = observation.valueQuantity?.value
  const comparator = comparatorOf(observation.valueQuantity)
  if (!coded?.code || typeof value !== 'number' || comparator === 'unknown') return null
  if (!['final', 'amended', 'corrected'].includes(observation.status)) return null
  return {
    observationId: observation.id,
    value,
    comparator,
    unit: unitOf(observation.valueQuantity),
    formula: egfrFormulas[coded.code] ?? 'formula not stated',
    collectedAt: collectionOf(observation, null, zone).at,
  }
}

type Analyte = { kind: LabReading['analyte'], refusal: string | null }

function analyteOf(code: Concept, settings: EhrSettings): Analyte | null {
  if (hasLoinc(code, cystatinLoinc)) return { kind: 'cystatin-c', refusal: null }
  const words = wordsOf(code)
  const accepted = hasCode(code, [...loincRefs(creatinineLoinc), ...settings.creatinineCodes])
  const never = namesNever(code)
  if (!accepted && !never && !/[ck]reatinin/.test(words)) return null
  if (!accepted && /egfr|\bgfr\b|filtration/.test(words)) return null
  if (never || namesOtherFluid(words) || (!accepted && /ratio|clearance|\//.test(words))) {
    return { kind: 'creatinine', refusal: 'Not a creatinine in blood: urine, a ratio or a clearance' }
  }
  return { kind: 'creatinine', refusal: accepted ? null : unrecognizedRefusal(code) }
}

function reading(observation: ObservationResource, part: ObservationComponent | null, context: LaboratoryContext): LabReading[] {
  const analyte = analyteOf((part ?? observation).code, context.settings)
  if (!analyte) return []
  const specimen = specimenOf(observation, context.specimens, context.settings)
  const fluid = otherFluid(observation, specimen)
  const collected = collectionOf(observation, specimen, context.zone)
  const held = valueOf(part ?? observation, observation.status)
  const elsewhere = analyte.refusal ?? (fluid === null ? null : `Not from blood: ${fluid}`)
  // An empty urine result says nothing about a blood sample of the same moment, and must not stand for its correction.
  if (elsewhere !== null && held.value === null) return []
  return [{
    id: part ? `${observation.id}#${part.code.coding[0]?.code ?? 'part'}` : observation.id,
    analyte: analyte.kind,
    source: 'record',
    sourceLabel: observation.performer.find(({ display }) => display)?.display ?? 'Hospital record',
    value: held.value,
    comparator: held.comparator,
    unit: held.unit,
    collectedAt: collected.at,
    collectedText: collected.text,
    precision: collected.precision,
    issuedAt: readFhirTime(observation.issued, context.zone).at,
    status: observation.status,
    refusal: elsewhere
      ?? ((observation.modifierExtension?.length ?? 0) > 0 ? 'Carries a remark that changes its meaning, which this system cannot read' : null)
      ?? held.refusal
      ?? beforeSince(collected, context),
  }]
}

function beforeSince(collected: FhirTime, { since, zone }: LaboratoryContext): string | null {
  if (since === null || collected.at === null) return null
  const start = DateTime.fromISO(since, { zone }).startOf('day')
  return DateTime.fromISO(collected.at) < start ? `Collected before ${since}, the earliest date asked for` : null
}

/**
 * When the sample was taken: `effective[x]`, of a period the older end, else the specimen's own collection time. `issued`
 * is when a version was released and never stands in (R4 Observation, "effective[x]", "issued").
 */
function collectionOf(observation: ObservationResource, specimen: { collection?: { collectedDateTime?: string, collectedPeriod?: { start?: string, end?: string } } } | null, zone: string): FhirTime {
  const text = observation.effectiveDateTime ?? observation.effectiveInstant
    ?? observation.effectivePeriod?.start ?? observation.effectivePeriod?.end
    ?? earliest(observation.effectiveTiming?.event)
    ?? specimen?.collection?.collectedDateTime ?? specimen?.collection?.collectedPeriod?.start ?? specimen?.collection?.collectedPeriod?.end
  return readFhirTime(text, zone)
}

const earliest = (events: string[] | undefined): string | undefined =>
  [...events ?? []].sort((a, b) => Date.parse(a) - Date.parse(b))[0]

interface HeldValue { value: number | null, comparator: Comparator | null, unit: string | null, refusal: string | null }

function valueOf(holder: Pick<ObservationResource, 'valueQuantity' | 'valueString' | 'valueCodeableConcept' | 'dataAbsentReason'>, status: LabReading['status']): HeldValue {
  const quantity = holder.valueQuantity
  const unit = unitOf(quantity)
  const none = (refusal: string): HeldValue => ({ value: null, comparator: null, unit, refusal })
  const absent = holder.dataAbsentReason?.coding.find(({ code }) => code)?.code ?? (holder.dataAbsentReason ? 'unknown' : null)
  if (absent === 'masked' || absent === 'not-permitted') return none('The record holds a value but does not show it to this system')
  if (absent !== null && quantity) return none('Sent both with a value and with a reason why there is none')
  if (absent !== null) return none(`No value: ${absent.replaceAll('-', ' ')}`)
  if (!quantity) {
    const text = holder.valueString ?? holder.valueCodeableConcept?.text
    if (text !== undefined) return none(`The value is text, not a number: "${text.slice(0, 80)}"`)
    return none(status === 'registered' ? 'Ordered, no result yet' : 'No usable value')
  }
  if (typeof quantity.value !== 'number' || !Number.isFinite(quantity.value)) return none('The value is not sent as a number')
  const comparator = comparatorOf(quantity)
  if (comparator === 'unknown') return none('Carries a comparison sign this system does not know')
  return { value: quantity.value, comparator, unit, refusal: contradiction(quantity) }
}

function comparatorOf(quantity: Quantity | undefined): Comparator | null | 'unknown' {
  const sign = quantity?.comparator
  if (sign === undefined || sign === null) return null
  return sign === '<' || sign === '<=' || sign === '>=' || sign === '>' ? sign : 'unknown'
}

/** A UCUM code wins over the unit shown; a code of another system does not (R4 Datatypes, "Quantity"). */
function unitOf(quantity: Quantity | undefined): string | null {
  if (!quantity) return null
  const code = quantity.code?.trim() || null
  const shown = quantity.unit?.trim() || null
  if (code !== null && quantity.system?.replace(/\/$/, '') === ucum) return code
  return shown ?? code
}

function contradiction({ code, unit }: Quantity): string | null {
  const coded = convertCreatinine(1, code ?? null)
  const shown = convertCreatinine(1, unit ?? null)
  return coded.status === 'ok' && shown.status === 'ok' && coded.mgPerDl !== shown.mgPerDl
    ? `The unit shown (${unit}) and its code (${code}) do not agree`
    : null
}

/** Parses an Observation; null where it is not one. */
export function asObservation(json: unknown): ObservationResource | null {
  const parsed = observationResource.safeParse(json)
  return parsed.success ? parsed.data : null
}
