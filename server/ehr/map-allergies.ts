import type { RecordWarning, ScreeningHint } from '#shared/domain/record/types'
import { isSystem, nameOf, snomed } from './codes'
import { readFhirTime } from './fhir-time'
import { gadoliniumOf, namesSomeContrast } from './gadolinium'
import { medicationResource, type AllergyResource, type Concept } from './resources'

/** SNOMED CT, from memory. */
const noKnownAllergyCodes = new Set(['716186003', '409137002'])

export interface MappedAllergies { lines: string[], hints: ScreeningHint[], noKnownAllergy: boolean, warnings: RecordWarning[] }

/** The allergy list: one line each, and what it suggests about an earlier reaction to gadolinium. */
export function mapAllergies(allergies: readonly AllergyResource[], zone: string): MappedAllergies {
  const standing = allergies.filter(({ verificationStatus }) => !['refuted', 'entered-in-error'].includes(codeOf(verificationStatus) ?? ''))
  const none = standing.filter(({ code, clinicalStatus }) => saysNone(code) && [null, 'active'].includes(codeOf(clinicalStatus)))
  const named = standing.filter(({ code }) => !saysNone(code))
  const reactions = named.filter(allergy => gadoliniumNamed(allergy) !== null)
  const unclear = named.filter(allergy => !reactions.includes(allergy) && (namesSomeContrast(allergy.code) || allergy.reaction.some(({ substance }) => namesSomeContrast(substance))))
  const worst = [...reactions].sort((a, b) => severityRank(b) - severityRank(a))[0]
  return {
    lines: [...new Set(named.map(allergy => line(allergy, zone)))],
    noKnownAllergy: none.length > 0 && named.length === 0,
    hints: worst ? reactionHints(worst, zone) : unclear[0] ? unclearHints(unclear[0], zone) : none[0] && named.length === 0 ? noneHints(none[0], zone) : [],
    warnings: unclear.map(({ code }) => ({
      id: 'reaction-to-confirm' as const,
      text: `The record lists "${nameOf(code) ?? 'contrast'}" without saying which kind of contrast; ask whether it was gadolinium`,
    })),
  }
}

function gadoliniumNamed(allergy: AllergyResource) {
  const inside = allergy.contained.flatMap((resource): Array<Concept | undefined> => {
    const parsed = medicationResource.safeParse(resource)
    return parsed.success ? [parsed.data.code, ...parsed.data.ingredient.map(({ itemCodeableConcept }) => itemCodeableConcept)] : []
  })
  const found = [allergy.code, ...allergy.reaction.map(({ substance }) => substance), ...inside].map(gadoliniumOf)
  return found.find(agent => agent !== null && agent !== 'group') ?? found.find(agent => agent !== null) ?? null
}

const severities = ['mild', 'moderate', 'severe'] as const

function severityOf(allergy: AllergyResource): (typeof severities)[number] | 'unknown' {
  const ranked = allergy.reaction.map(({ severity }) => severities.findIndex(known => known === severity))
  return severities[Math.max(-1, ...ranked)] ?? 'unknown'
}

/** An unknown severity ranks above mild: it may have been worse. */
const severityRank = (allergy: AllergyResource): number => ({ mild: 0, unknown: 1, moderate: 2, severe: 3 })[severityOf(allergy)]

const allergicWords = /anaphyl|hives|urticari|angio-?edema|bronchospasm|wheez|laryngeal|swelling|itch|prurit|rash|erythema|hypotension/
const physiologicWords = /nausea|vomit|warmth|headache|dizz|taste|vasovagal|anxiety/

function kindOf(allergy: AllergyResource): 'allergic-like' | 'physiologic' | 'unknown' {
  const words = allergy.reaction.flatMap(({ manifestation, description }) => [...manifestation.map(nameOf), description ?? null]).join(' ').toLowerCase()
  if (allergicWords.test(words)) return 'allergic-like'
  return physiologicWords.test(words) ? 'physiologic' : 'unknown'
}

function reactionHints(allergy: AllergyResource, zone: string): ScreeningHint[] {
  const agent = gadoliniumNamed(allergy)
  const because = `Allergy list: ${line(allergy, zone)}`
  const recordedAt = recordedOf(allergy, zone)
  const certain = codeOf(allergy.verificationStatus) !== 'unconfirmed'
  return [
    { field: 'earlierReaction', value: 'yes', because: certain ? because : `${because} (unconfirmed)`, recordedAt },
    { field: 'reactionAgent', value: agent === 'group' || agent === null ? 'unknown' : agent, because, recordedAt },
    { field: 'reactionKind', value: kindOf(allergy), because, recordedAt },
    { field: 'reactionSeverity', value: severityOf(allergy), because, recordedAt },
  ]
}

function unclearHints(allergy: AllergyResource, zone: string): ScreeningHint[] {
  return [{
    field: 'earlierReaction',
    value: 'unknown',
    because: `Allergy list: "${nameOf(allergy.code) ?? 'contrast'}" does not say which kind of contrast; ask`,
    recordedAt: recordedOf(allergy, zone),
  }]
}

function noneHints(allergy: AllergyResource, zone: string): ScreeningHint[] {
  return [{ field: 'earlierReaction', value: 'no', because: `Allergy list: ${nameOf(allergy.code) ?? 'no known allergy'}`, recordedAt: recordedOf(allergy, zone) }]
}

const recordedOf = (allergy: AllergyResource, zone: string): string | null =>
  readFhirTime(allergy.lastOccurrence ?? allergy.onsetDateTime ?? allergy.recordedDate, zone).at

const codeOf = (concept: Concept | undefined): string | null => concept?.coding.find(({ code }) => code)?.code ?? null

function saysNone(concept: Concept | undefined): boolean {
  return concept?.coding.some(({ system, code }) => isSystem(system, snomed) && code !== undefined && noKnownAllergyCodes.has(code))
    || /^no known (drug )?allerg/i.test(nameOf(concept) ?? '')
}

/** "Gadobutrol: severe, anaphylaxis (2022)". */
function line(allergy: AllergyResource, zone: string): string {
  const status = codeOf(allergy.clinicalStatus)
  const severity = severityOf(allergy)
  const facts = [
    severity === 'unknown' ? null : severity,
    ...allergy.reaction.flatMap(({ manifestation }) => manifestation.map(nameOf)),
    codeOf(allergy.verificationStatus) === 'unconfirmed' ? 'unconfirmed' : null,
    status === 'inactive' || status === 'resolved' ? `${status}, kept as history` : null,
  ].filter(fact => fact !== null)
  const year = recordedOf(allergy, zone)?.slice(0, 4)
  const name = nameOf(allergy.code) ?? nameOf(allergy.reaction[0]?.substance) ?? 'Entry without a name'
  return `${name}${facts.length > 0 ? `: ${facts.join(', ')}` : ''}${year ? ` (${year})` : ''}`
}
