import { DateTime } from 'luxon'
import type { GadoliniumExposure } from '#shared/domain/safety/types'
import { nameOf } from './codes'
import { readFhirTime } from './fhir-time'
import { gadoliniumOf } from './gadolinium'
import { medicationResource, type AdministrationResource, type Concept, type FhirJson, type ProcedureResource, type Quantity } from './resources'

export interface MappedExposures {
  exposures: GadoliniumExposure[]
  /** Doses on record without any date. */
  undated: number
}

/** Earlier gadolinium doses that were really given, newest first. Not-done, planned and mistaken entries do not count. */
export function mapExposures(
  administrations: readonly AdministrationResource[], procedures: readonly ProcedureResource[],
  medications: ReadonlyMap<string, FhirJson>, { zone, now }: { zone: string, now: string },
): MappedExposures {
  const given = administrations.filter(({ status }) => status === 'completed').flatMap(entry => dose(
    `MedicationAdministration/${entry.id}`, conceptsOf(entry, medications),
    latestMoment(entry.effectiveDateTime ?? entry.effectivePeriod?.start, zone, now), mmolOf(entry.dosage?.dose),
  ))
  const performed = procedures.filter(({ status }) => status === 'completed').flatMap(entry => dose(
    `Procedure/${entry.id}`, [...entry.usedCode, entry.code],
    latestMoment(entry.performedDateTime ?? entry.performedPeriod?.start, zone, now), null,
  ))
  // A procedure and the medicine given in it are one dose.
  const separate = performed.filter(entry => !given.some(other =>
    other.givenAt !== null && other.givenAt.slice(0, 10) === entry.givenAt?.slice(0, 10) && (entry.agent === null || entry.agent === other.agent)))
  const doses = [...given, ...separate]
  return {
    exposures: doses.flatMap(({ givenAt, ...rest }) => givenAt === null ? [] : [{ ...rest, givenAt }])
      .sort((a, b) => b.givenAt.localeCompare(a.givenAt)),
    undated: doses.filter(({ givenAt }) => givenAt === null).length,
  }
}

/** The instant of a dose. A month or year stands for its last moment so far: the shortest time since the dose. */
function latestMoment(text: string | undefined, zone: string, now: string): string | null {
  const { at } = readFhirTime(text, zone)
  if (at !== null || text === undefined) return at
  const partial = /^(\d{4})(?:-(\d{2}))?$/.exec(text.trim())
  if (!partial) return null
  const start = DateTime.fromISO(text.trim(), { zone })
  const end = start.endOf(partial[2] === undefined ? 'year' : 'month')
  return DateTime.min(end, DateTime.fromISO(now)).toUTC().toISO()
}

/** The address of the Medication an administration points to, where it is a resource of its own. */
export function medicationReferenceOf(entry: AdministrationResource): string | null {
  const reference = entry.medicationReference?.reference
  return reference && !reference.startsWith('#') ? reference : null
}

function conceptsOf(entry: AdministrationResource, medications: ReadonlyMap<string, FhirJson>): Array<Concept | undefined> {
  const reference = entry.medicationReference
  const target = reference?.reference?.startsWith('#')
    ? entry.contained.find(({ id }) => id === reference.reference?.slice(1))
    : medications.get(reference?.reference ?? '')
  const parsed = medicationResource.safeParse(target)
  return [
    entry.medicationCodeableConcept,
    ...(parsed.success ? [parsed.data.code, ...parsed.data.ingredient.map(({ itemCodeableConcept }) => itemCodeableConcept)] : []),
    ...(reference?.display ? [{ coding: [], text: reference.display }] : []),
  ]
}

type Dose = Omit<GadoliniumExposure, 'givenAt'> & { givenAt: string | null }

function dose(id: string, concepts: ReadonlyArray<Concept | undefined>, givenAt: string | null, amountMmol: number | null): Dose[] {
  const named = concepts.map(concept => ({ concept, agent: gadoliniumOf(concept) })).filter(({ agent }) => agent !== null)
  const best = named.find(({ agent }) => agent !== 'group') ?? named[0]
  if (!best) return []
  const agent = best.agent === 'group' ? null : best.agent
  return [{ id, agent, agentText: nameOf(best.concept) ?? 'gadolinium', givenAt, amountMmol, source: 'record' }]
}

/** Only a dose in mmol is an amount: a volume says nothing without the strength of what was drawn up. */
function mmolOf(amount: Quantity | undefined): number | null {
  const unit = (amount?.code ?? amount?.unit ?? '').trim().toLowerCase()
  return typeof amount?.value === 'number' && amount.value > 0 && unit === 'mmol' ? amount.value : null
}
