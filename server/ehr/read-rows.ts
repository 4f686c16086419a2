import type { z } from 'zod'
import type { SearchParams } from 'fhir-kit-client'
import type { PartProblem } from '#shared/domain/record/types'
import type { Capabilities, EhrSession } from './client'
import { EhrUnavailable } from './errors'
import type { FhirJson, Reference } from './resources'
import { namesPatient } from './subject'
import type { EhrSettings } from './settings'

/** Rows of one kind that belong to the patient, and how looking for them went. */
export interface Rows<T> {
  rows: T[]
  included: FhirJson[]
  /** False where nothing could be looked at. */
  looked: boolean
  complete: boolean
  problem: PartProblem | null
  words: string | null
  messages: number
  /** Rows of somebody else, dropped. */
  foreign: number
  /** Rows of a form that cannot be read, dropped. */
  unreadable: number
}

export interface RowQuestion<T> {
  session: EhrSession
  settings: EhrSettings
  patientId: string
  resourceType: string
  /** What the server says it offers. */
  capabilities: Promise<Capabilities | null>
  forms: readonly SearchParams[]
  parse: z.ZodType<T>
  owner: (row: T) => Reference | undefined
}

/** Searches, keeps what is this patient's, and turns an outage into a state. Never throws for an outage. */
export async function readRows<T>(question: RowQuestion<T>): Promise<Rows<T>> {
  const { session, resourceType, forms, patientId, settings } = question
  try {
    const answer = await session.search(resourceType, forms)
    const rows: T[] = []
    let foreign = 0
    let unreadable = 0
    for (const resource of answer.resources) {
      const parsed = question.parse.safeParse(resource)
      if (!parsed.success) unreadable += 1
      else if (namesPatient(question.owner(parsed.data), patientId, settings)) rows.push(parsed.data)
      else foreign += 1
    }
    const problem = answer.problem ?? (foreign > 0 ? 'other-patient' : unreadable > 0 ? 'unreadable' : null)
    return {
      rows, foreign, unreadable, included: answer.included, messages: answer.messages,
      looked: true, complete: problem === null, problem, words: answer.words ?? wordsFor(problem),
    }
  }
  catch (error) {
    const failed = failedRows<T>(error)
    const offered = failed.problem === 'not-offered' && (await question.capabilities)?.types.has(resourceType)
    return offered ? { ...failed, problem: 'refused', words: 'The hospital record offers this part, but did not answer for it' } : failed
  }
}

/** An outage as rows that could not be looked at; any other error is thrown on. */
export function failedRows<T>(error: unknown): Rows<T> {
  if (!(error instanceof EhrUnavailable)) throw error
  // Searching a kind of entry the server does not know is answered with 404 as well.
  const problem = error.problem === 'not-found' ? 'not-offered' : error.problem
  return {
    rows: [], included: [], looked: false, complete: false, problem, messages: 0, foreign: 0, unreadable: 0,
    words: problem === 'not-offered' ? 'The hospital record does not offer this part' : error.message,
  }
}

/** Rows of two questions about one part; the part is only as complete as both. */
export function joinRows<T extends { id: string }>(first: Rows<T>, second: Rows<T>): Rows<T> {
  const known = new Set(first.rows.map(({ id }) => id))
  const worse = first.complete ? second : first
  return {
    rows: [...first.rows, ...second.rows.filter(({ id }) => !known.has(id))],
    included: [...first.included, ...second.included],
    looked: first.looked && second.looked,
    complete: first.complete && second.complete,
    problem: worse.problem,
    words: worse.words,
    messages: first.messages + second.messages,
    foreign: first.foreign + second.foreign,
    unreadable: first.unreadable + second.unreadable,
  }
}

/** The same question in the forms servers understand, from the most to the least precise. */
export function patientForms(patientId: string, filters: SearchParams, extras: SearchParams): SearchParams[] {
  return [
    { patient: patientId, ...filters, ...extras },
    { patient: patientId, ...filters },
    { subject: `Patient/${patientId}`, ...filters },
  ]
}

function wordsFor(problem: PartProblem | null): string | null {
  if (problem === 'other-patient') return 'The hospital record sent entries of another patient; they were left out'
  return problem === 'unreadable' ? 'The hospital record sent entries that cannot be read; they were left out' : null
}
