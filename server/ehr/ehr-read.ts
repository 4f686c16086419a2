import { parseArgs } from 'node:util'
import { DateTime, IANAZone } from 'luxon'
import { createEhrClient, type EhrClient } from './client'
import { EhrSettingsInvalid, EhrUnavailable } from './errors'
import { emptyReport, kidneyReport, type KidneyReport } from './kidney-report'
import { readRecord } from './read-record'
import { searchPatients } from './search-patients'
import { parseEhrSettings } from './settings'

export const usage = `Usage: npm run ehr:read -- <record number or Patient/id> [--since YYYY-MM-DD] [--zone Area/City]

Reads one patient from the hospital's FHIR server and prints what was found as JSON. To hand the JSON on to another program,
call it with "npm run --silent", which keeps npm's own lines away.
Settings come from the environment: NUXT_EHR_BASE_URL, NUXT_EHR_AUTH (none or backend-services), NUXT_EHR_CLIENT_ID,
NUXT_EHR_PRIVATE_JWK, NUXT_EHR_TOKEN_URL, NUXT_EHR_SCOPE, NUXT_EHR_RECORD_NUMBER_SYSTEM, NUXT_EHR_CREATININE_CODES,
NUXT_EHR_PAGE_ORIGINS.

Exit: 0 complete, 2 wrong call or settings, 3 no such patient or several, 4 incomplete or not reachable.`

/** 0 complete, 2 usage, 3 not found or ambiguous, 4 incomplete or unreachable. */
export type ExitCode = 0 | 2 | 3 | 4

export interface CommandResult {
  exitCode: ExitCode
  /** For standard output; null where there is nothing to report on. */
  report: KidneyReport | null
  /** For a person, on standard error. */
  words: string
}

interface Call { who: string, since: string | null, zone: string }

/** The command `ehr:read`: everything but printing. */
export async function ehrRead(argv: readonly string[], env: Readonly<Record<string, string | undefined>>, now: Date): Promise<CommandResult> {
  const call = callOf(argv, now)
  if (typeof call === 'string') return { exitCode: 2, report: null, words: `${call}\n\n${usage}` }
  try {
    const settings = parseEhrSettings(settingsOf(env))
    if (!settings) return { exitCode: 2, report: null, words: `NUXT_EHR_BASE_URL is not set.\n\n${usage}` }
    return await report(createEhrClient(settings), call, now.toISOString())
  }
  catch (error) {
    if (error instanceof EhrSettingsInvalid) return { exitCode: 2, report: null, words: `${error.message}.` }
    if (error instanceof EhrUnavailable) {
      return { exitCode: 4, report: emptyReport('unreachable', error.message, call, now.toISOString()), words: `${error.message}.` }
    }
    throw error
  }
}

async function report(client: EhrClient, call: Call, now: string): Promise<CommandResult> {
  const id = patientIdOf(call.who, client.settings.baseUrl)
  const found = id ?? await idByRecordNumber(client, call, now)
  if (typeof found !== 'string') return found
  const printed = kidneyReport(await readRecord(client, found, { since: call.since, zone: call.zone, now }), call)
  if (printed.answer === 'not-found') return { exitCode: 3, report: printed, words: 'The hospital record has no such patient.' }
  if (printed.complete) return { exitCode: 0, report: printed, words: printed.headline }
  const troubles = Object.entries(printed.parts ?? {}).filter(([, { complete, words }]) => !complete && words !== null).map(([part, { words }]) => `  ${part}: ${words}`)
  const lead = printed.answer === 'unreachable' ? 'The hospital record could not be read.' : 'The answer is not complete; what is printed is real but may not be all.'
  return { exitCode: 4, report: printed, words: [lead, ...troubles].join('\n') }
}

async function idByRecordNumber(client: EhrClient, call: Call, now: string): Promise<string | CommandResult> {
  const search = await searchPatients(client, { recordNumber: call.who })
  const [only] = search.patients
  if (search.outcome === 'one' && only && search.complete) return only.ehrId
  if (search.outcome === 'several') {
    const words = `${search.patients.length} patients carry this record number; choose one by Patient/id.`
    return { exitCode: 3, report: emptyReport('ambiguous', words, call, now, search.patients), words }
  }
  if (!search.complete) {
    const words = `The search for this record number did not come to its end: ${search.words ?? 'pages are missing'}.`
    return { exitCode: 4, report: emptyReport('incomplete', words, call, now, search.patients), words }
  }
  const words = 'The hospital record has no patient with this record number.'
  return { exitCode: 3, report: emptyReport('not-found', words, call, now), words }
}

function callOf(argv: readonly string[], now: Date): Call | string {
  let parsed
  try {
    parsed = parseArgs({ args: [...argv], allowPositionals: true, options: { since: { type: 'string' }, zone: { type: 'string' } } })
  }
  catch (error) {
    return error instanceof Error ? error.message : 'The call cannot be read'
  }
  const [who, ...more] = parsed.positionals
  const { since, zone = Intl.DateTimeFormat().resolvedOptions().timeZone } = parsed.values
  if (!who?.trim() || more.length > 0) return 'Name one patient: a record number or Patient/id.'
  if (!IANAZone.isValidZone(zone)) return '--zone must be an IANA zone, for instance America/Chicago.'
  if (since === undefined) return { who: who.trim(), since: null, zone }
  const day = /^\d{4}-\d{2}-\d{2}$/.test(since) ? DateTime.fromISO(since, { zone }) : null
  if (!day?.isValid) return '--since must be a date, YYYY-MM-DD.'
  if (day.toJSDate() > now) return '--since lies in the future.'
  return { who: who.trim(), since, zone }
}

/** `Patient/id`, alone or under the base URL; null: a record number. */
function patientIdOf(who: string, baseUrl: string): string | null {
  const relative = who.startsWith(`${baseUrl}/`) ? who.slice(baseUrl.length + 1) : who
  return /^Patient\/([A-Za-z0-9_.-]+)$/.exec(relative)?.[1] ?? null
}

/** The environment names that the server's runtime configuration reads. */
function settingsOf(env: Readonly<Record<string, string | undefined>>): Record<string, string | undefined> {
  return {
    baseUrl: env.NUXT_EHR_BASE_URL,
    auth: env.NUXT_EHR_AUTH,
    clientId: env.NUXT_EHR_CLIENT_ID,
    privateJwk: env.NUXT_EHR_PRIVATE_JWK,
    tokenUrl: env.NUXT_EHR_TOKEN_URL,
    scope: env.NUXT_EHR_SCOPE,
    recordNumberSystem: env.NUXT_EHR_RECORD_NUMBER_SYSTEM,
    creatinineCodes: env.NUXT_EHR_CREATININE_CODES,
    pageOrigins: env.NUXT_EHR_PAGE_ORIGINS,
  }
}
