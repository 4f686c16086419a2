import { z } from 'zod'
import type { PartProblem } from '#shared/domain/record/types'
import { EhrUnavailable } from './errors'
import { bundle, operationOutcome, type Bundle, type FhirJson } from './resources'

/** Everything one search brought, over all pages. */
export interface SearchAnswer {
  /** Matches of the type asked for, each version once, in the order sent. */
  resources: FhirJson[]
  /** Rows sent along for context only. */
  included: FhirJson[]
  /** False where more may exist than was read. */
  complete: boolean
  problem: PartProblem | null
  words: string | null
  /** How many messages the server sent along with the rows. */
  messages: number
  /** Parameters the server says it used; null where it does not say. */
  asked: URLSearchParams | null
}

interface Pages {
  resourceType: string
  first: () => Promise<FhirJson>
  next: (url: string) => Promise<FhirJson> | undefined
  /** The link as an absolute address of ours; throws where it leads elsewhere. */
  address: (url: string) => string
  maxPages: number
}

/**
 * Follows `next` until there is none (R4 RESTful API, "Paging"): `total` may be an estimate, a page may be empty, a
 * link is opaque. A link seen before, a foreign link, too many pages or a failing page leave the answer incomplete.
 * A page that has expired starts the search again, once.
 *
 * @throws EhrUnavailable where not even the first page came.
 */
export async function readPages(pages: Pages): Promise<SearchAnswer> {
  const firstTry = await readFrom(pages)
  return firstTry === 'expired' ? await readFrom({ ...pages }, true) : firstTry
}

async function readFrom(pages: Pages): Promise<SearchAnswer | 'expired'>
async function readFrom(pages: Pages, last: true): Promise<SearchAnswer>
async function readFrom(pages: Pages, last = false): Promise<SearchAnswer | 'expired'> {
  let page = bundleOf(await pages.first())
  const collected = collector(pages.resourceType)
  collected.asked(selfOf(page))
  const seen = new Set<string>()
  for (let count = 1; ; count += 1) {
    collected.take(page)
    const url = page.link.find(({ relation }) => relation === 'next')?.url
    if (url === undefined) return collected.answer(null, null)
    if (count >= pages.maxPages) return collected.answer('cut-short', 'The hospital record has more pages than are read at once')
    try {
      const address = pages.address(url)
      if (seen.has(address)) return collected.answer('cut-short', 'The hospital record keeps sending the same page')
      seen.add(address)
      const following = await pages.next(url)
      if (!following) return collected.answer(null, null)
      page = bundleOf(following)
    }
    catch (error) {
      if (!(error instanceof EhrUnavailable)) throw error
      if (error.problem === 'not-found' && !last) return 'expired'
      return collected.answer(error.problem === 'not-found' ? 'cut-short' : error.problem, error.message)
    }
  }
}

function collector(resourceType: string) {
  const resources = new Map<string, FhirJson>()
  const included: FhirJson[] = []
  let asked: URLSearchParams | null = null
  let messages = 0
  let partial: string | null = null

  function takeRow(resource: FhirJson | undefined, mode: string | undefined) {
    if (!resource) {
      partial ??= 'The hospital record sent a row that cannot be read'
      return
    }
    if (resource.resourceType === 'OperationOutcome' || mode === 'outcome') {
      messages += 1
      if (saysIncomplete(resource)) partial ??= 'The hospital record says its own answer is not complete'
      return
    }
    if (mode === 'include' || resource.resourceType !== resourceType) included.push(resource)
    else keepNewest(resources, resource)
  }

  return {
    asked(self: URLSearchParams | null) { asked = self },
    take(page: Bundle) {
      for (const { resource, search } of page.entry ?? []) takeRow(resource, search?.mode)
    },
    answer(problem: PartProblem | null, words: string | null): SearchAnswer {
      const cut = problem ?? (partial === null ? null : 'cut-short')
      return { resources: [...resources.values()], included, complete: cut === null, problem: cut, words: words ?? partial, messages, asked }
    },
  }
}

/**
 * Rows added or changed between two pages are sent twice: an identical row counts once, and of two versions the newer.
 * Rows that share an id without a version to tell them apart are both kept.
 */
function keepNewest(rows: Map<string, FhirJson>, row: FhirJson) {
  const version = versionOf(row)
  const key = typeof row.id === 'string' && version !== null ? row.id : JSON.stringify(row)
  const held = rows.get(key)
  if (!held || (version ?? 0) >= (versionOf(held) ?? 0)) rows.set(key, row)
}

const versioned = z.looseObject({ meta: z.looseObject({ versionId: z.string().regex(/^\d{1,15}$/) }) })

function versionOf(row: FhirJson): number | null {
  const parsed = versioned.safeParse(row)
  return parsed.success ? Number(parsed.data.meta.versionId) : null
}

const incompleteCodes = new Set(['incomplete', 'throttled', 'timeout', 'too-costly', 'suppressed', 'exception', 'lock-error', 'transient'])

function saysIncomplete(resource: FhirJson): boolean {
  const parsed = operationOutcome.safeParse(resource)
  return !parsed.success || parsed.data.issue.some(({ severity, code }) =>
    severity === 'error' || severity === 'fatal' || (code !== undefined && incompleteCodes.has(code)))
}

function bundleOf(json: FhirJson): Bundle {
  const parsed = bundle.safeParse(json)
  if (!parsed.success) throw new EhrUnavailable('unreadable', 'The hospital record sent an answer that is not a search result')
  return parsed.data
}

function selfOf(page: Bundle): URLSearchParams | null {
  const url = page.link.find(({ relation }) => relation === 'self')?.url
  const query = url?.split('?')[1]
  return query === undefined ? null : new URLSearchParams(query)
}
