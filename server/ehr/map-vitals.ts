import type { RecordHeight, RecordWeight } from '#shared/domain/record/types'
import { hasLoinc, heightLoinc, ucum, weightLoinc } from './codes'
import { readFhirTime } from './fhir-time'
import type { ObservationResource, Quantity } from './resources'

/** 1 lb = 0.45359237 kg, 1 oz = 1/16 lb (international pound). */
const kgPer: Readonly<Record<string, number>> = {
  'kg': 1, 'g': 0.001, '[lb_av]': 0.45359237, 'lb': 0.45359237, 'lbs': 0.45359237, '[oz_av]': 0.45359237 / 16, 'oz': 0.45359237 / 16,
}

/** 1 in = 2.54 cm. */
const cmPer: Readonly<Record<string, number>> = { 'cm': 1, 'm': 100, 'mm': 0.1, '[in_i]': 2.54, 'in': 2.54, '[ft_i]': 30.48, 'ft': 30.48 }

/** Outside these a number was filed under the wrong unit or test (our rule). */
const plausibleKg = { from: 0.3, to: 400 }
const plausibleCm = { from: 20, to: 260 }

/** Newest usable weight; null where there is none. */
export function mapWeight(observations: readonly ObservationResource[], context: { zone: string, now: string }): RecordWeight | null {
  const found = newest(observations, weightLoinc, kgPer, plausibleKg, context)
  return found ? { kg: found.amount, at: found.at, observationId: found.id } : null
}

/** Newest usable height; null where there is none. */
export function mapHeight(observations: readonly ObservationResource[], context: { zone: string, now: string }): RecordHeight | null {
  const found = newest(observations, heightLoinc, cmPer, plausibleCm, context)
  return found ? { cm: found.amount, at: found.at, observationId: found.id } : null
}

interface Measure { id: string, amount: number, at: string }

function newest(
  observations: readonly ObservationResource[], codes: readonly string[], factors: Readonly<Record<string, number>>,
  plausible: { from: number, to: number }, { zone, now }: { zone: string, now: string },
): Measure | null {
  const usable = observations.flatMap((observation): Measure[] => {
    if (!hasLoinc(observation.code, codes) || !['final', 'amended', 'corrected'].includes(observation.status)) return []
    if ((observation.modifierExtension?.length ?? 0) > 0 || observation.dataAbsentReason) return []
    const amount = amountOf(observation.valueQuantity, factors)
    const { at } = readFhirTime(observation.effectiveDateTime ?? observation.effectiveInstant ?? observation.effectivePeriod?.start, zone)
    if (amount === null || at === null || Date.parse(at) > Date.parse(now) + 600_000) return []
    return amount < plausible.from || amount > plausible.to ? [] : [{ id: observation.id, amount, at }]
  })
  return usable.sort((a, b) => Date.parse(b.at) - Date.parse(a.at))[0] ?? null
}

function amountOf(quantity: Quantity | undefined, factors: Readonly<Record<string, number>>): number | null {
  if (!quantity || typeof quantity.value !== 'number' || (quantity.comparator !== undefined && quantity.comparator !== null)) return null
  const coded = quantity.system?.replace(/\/$/, '') === ucum ? quantity.code : undefined
  const unit = (coded ?? quantity.unit ?? quantity.code)?.trim().toLowerCase()
  const factor = unit === undefined ? undefined : factors[unit]
  return factor === undefined ? null : Math.round(quantity.value * factor * 1000) / 1000
}
