import type { SearchParams } from 'fhir-kit-client'
import type { PatientSearch } from '#shared/domain/record/types'
import type { EhrClient } from './client'
import { tokenList } from './codes'
import { mapPatient, nameWords, recordNumbers, words } from './map-patient'
import type { FhirJson } from './resources'
import type { EhrSettings } from './settings'

/** What is known about the person looked for; at least a record number, a name or a date of birth. Every given field must fit. */
export interface PatientQuery {
  recordNumber?: string
  /** Any part of the name, as typed: "lindqvist marta". */
  name?: string
  family?: string
  given?: string
  /** YYYY-MM-DD. */
  birthDate?: string
}

/**
 * Looks for patients on the hospital's server. Servers match names more widely than asked and may ignore what they do not
 * know, so every row is checked again here. Nobody is picked: with several, a person chooses.
 *
 * @throws EhrUnavailable where the server could not be asked
 * @throws RangeError where neither a record number nor a name nor a date of birth is given
 */
export async function searchPatients(client: EhrClient, query: PatientQuery, options: { signal?: AbortSignal } = {}): Promise<PatientSearch> {
  const { settings } = client
  if (!query.recordNumber?.trim() && !query.name?.trim() && !query.family?.trim() && !query.birthDate) {
    throw new RangeError('A record number, a name or a date of birth is needed')
  }
  const session = client.session(options.signal)
  const ask = async (post: boolean) => {
    const answer = await session.search('Patient', formsOf(query, settings), { post })
    return { answer, found: answer.resources.filter(resource => matches(resource, query, settings)) }
  }
  let { answer, found } = await ask(true)
  if (found.length > 0 && client.postSearch.state === 'untried') client.postSearch.state = 'works'
  // A server that does not read the body of a search answers as if nothing had been asked: nothing found proves nothing.
  else if (found.length === 0 && client.postSearch.state === 'untried') ({ answer, found } = await ask(false))
  const patients = found
    .flatMap(resource => mapPatient(resource, settings.recordNumberSystem) ?? [])
    .sort((a, b) => a.displayName.localeCompare(b.displayName) || (a.birthDate ?? '').localeCompare(b.birthDate ?? ''))
  return {
    outcome: patients.length === 0 ? 'none' : patients.length === 1 ? 'one' : 'several',
    patients,
    complete: answer.complete,
    words: answer.words,
  }
}

function formsOf(query: PatientQuery, { recordNumberSystem, limits }: EhrSettings): SearchParams[] {
  const number = query.recordNumber?.trim()
  const filters: SearchParams = {
    ...(number ? { identifier: recordNumberSystem === null ? tokenText(number) : tokenList([{ system: recordNumberSystem, code: number }]) } : {}),
    ...(query.family?.trim() ? { family: tokenText(query.family.trim()) } : {}),
    ...(query.given?.trim() ? { given: tokenText(query.given.trim()) } : {}),
    // Repeated, a parameter means "and": each word must begin some part of the name.
    ...(query.name?.trim() ? { name: query.name.trim().split(/[\s,]+/).filter(Boolean).map(tokenText) } : {}),
    ...(query.birthDate ? { birthdate: query.birthDate } : {}),
  }
  return [{ ...filters, _count: limits.pageSize }, filters]
}

function matches(resource: FhirJson, query: PatientQuery, { recordNumberSystem }: EhrSettings): boolean {
  const number = query.recordNumber?.trim()
  if (number && !recordNumbers(resource, recordNumberSystem).includes(number)) return false
  const names = nameWords(resource)
  if (!words(query.family).every(word => begins(names.family, word))) return false
  if (!words(query.given).every(word => begins(names.given, word))) return false
  if (!words(query.name).every(word => begins(names.all, word))) return false
  if (!query.birthDate) return true
  return mapPatient(resource, recordNumberSystem)?.birthDate === query.birthDate
}

const begins = (candidates: readonly string[], word: string): boolean => candidates.some(candidate => candidate.startsWith(word))
const tokenText = (value: string): string => value.replace(/[\\,|$]/g, '\\$&')
