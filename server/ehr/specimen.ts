import { wordsOf } from './codes'
import { specimenResource, type FhirJson, type ObservationResource, type SpecimenResource } from './resources'
import { localTarget } from './subject'
import type { EhrSettings } from './settings'

/** Specimens by id, as sent along or fetched. */
export type Specimens = ReadonlyMap<string, SpecimenResource>

export function specimensOf(resources: readonly FhirJson[]): Map<string, SpecimenResource> {
  return new Map(resources.flatMap((resource) => {
    const parsed = specimenResource.safeParse(resource)
    return parsed.success && parsed.data.id ? [[parsed.data.id, parsed.data] as const] : []
  }))
}

/** The specimen an observation was made from, where it came inside it or is among those known. */
export function specimenOf(observation: ObservationResource, known: Specimens, settings: EhrSettings): SpecimenResource | null {
  const reference = observation.specimen?.reference
  if (reference?.startsWith('#')) {
    return specimensOf(observation.contained.filter(({ id }) => id === reference.slice(1))).values().next().value ?? null
  }
  const target = localTarget(observation.specimen, settings)
  return target?.type === 'Specimen' ? known.get(target.id) ?? null : null
}

/** Codes for fluids other than blood: SNOMED CT specimens, HL7 v2 table 0487 (from memory). */
const otherFluidCodes = new Set([
  '122575003', '276833005', '278020009', '122574004', '168139001', '258450006', '309201001', '119323008', '418564007', '168141000',
  'UR', 'URC', 'URT', 'URNS', 'UR24H', 'CSF', 'AMN', 'DIAF', 'PLR', 'PRT', 'FLU', 'SAL', 'SWT',
])

const otherFluidWords = /\burin|\bharn\b|\borina\b|dialysate|\bcsf\b|cerebrospinal|amnio|pleura|periton|ascit|\bdrain|saliva|sweat|\bfluid\b/i

/** The name of the fluid where it is known not to be blood, else null. */
export function otherFluid(observation: ObservationResource, specimen: SpecimenResource | null): string | null {
  const coded = specimen?.type?.coding.find(({ code }) => code !== undefined && otherFluidCodes.has(code.toUpperCase()))
  if (coded) return coded.display ?? specimen?.type?.text ?? 'not blood'
  const named = [wordsOf(specimen?.type), observation.specimen?.display ?? ''].find(words => otherFluidWords.test(words))
  return named === undefined ? null : named.split(' · ')[0] ?? null
}

/** Whether the name of a test says urine, whatever its code. */
export const namesOtherFluid = (words: string): boolean => otherFluidWords.test(words)
