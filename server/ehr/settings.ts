import { z } from 'zod'
import { EhrSettingsInvalid } from './errors'

/** A coding as `system|code`. */
export interface CodeRef { system: string, code: string }

/** Time in milliseconds, size in bytes. */
export interface EhrLimits {
  /** One HTTP request, from connecting to the last byte. */
  requestMs: number
  /** One call with its retries, not counting waits the server asked for. */
  callMs: number
  /** One whole reading or search with all its pages. */
  readingMs: number
  /** Tries per call, the first included. */
  tries: number
  maxPages: number
  maxBytes: number
  /** Rows asked for per page; a server may send fewer. */
  pageSize: number
  breakerFailures: number
  breakerWindowMs: number
  breakerPauseMs: number
}

export const defaultLimits: EhrLimits = {
  requestMs: 5_000,
  callMs: 8_000,
  readingMs: 20_000,
  tries: 3,
  maxPages: 40,
  maxBytes: 5 * 1024 * 1024,
  pageSize: 50,
  breakerFailures: 5,
  breakerWindowMs: 60_000,
  breakerPauseMs: 30_000,
}

export type SigningAlgorithm = 'RS384' | 'ES384'

export interface BackendServicesSettings {
  kind: 'backend-services'
  clientId: string
  privateJwk: Record<string, unknown>
  keyId: string
  algorithm: SigningAlgorithm
  /** Null: asked of the server's SMART configuration. */
  tokenUrl: string | null
  scope: string
}

export interface EhrSettings {
  /** Without a trailing slash. */
  baseUrl: string
  auth: { kind: 'none' } | BackendServicesSettings
  /** Identifier system of the record number; null: the value alone is asked for. */
  recordNumberSystem: string | null
  /** The site's own codes for serum or plasma creatinine, beside the LOINC ones. */
  creatinineCodes: CodeRef[]
  /** Origins other than the base URL's own that page links may name, for instance behind a proxy. */
  pageOrigins: string[]
  limits: EhrLimits
}

/** Reads enough for everything the reading looks at. */
export const defaultScope = [
  'system/Patient.rs', 'system/Observation.rs', 'system/Condition.rs', 'system/AllergyIntolerance.rs',
  'system/Procedure.rs', 'system/MedicationAdministration.rs', 'system/Medication.rs', 'system/Specimen.rs',
].join(' ')

const text = z.union([z.string(), z.number().transform(String)]).default('').transform(value => value.trim())

const rawSettings = z.object({
  baseUrl: text,
  auth: text,
  clientId: text,
  // Runtime configuration turns JSON text from the environment into an object by itself.
  privateJwk: z.union([z.string(), z.record(z.string(), z.unknown())]).default(''),
  tokenUrl: text,
  scope: text,
  recordNumberSystem: text,
  creatinineCodes: text,
  pageOrigins: text,
})

const jwkSchema = z.looseObject({ kty: z.enum(['RSA', 'EC']), kid: z.string().min(1), d: z.string().min(1), crv: z.string().optional() })

/**
 * Reads the `ehr` part of the runtime configuration.
 *
 * @returns null where no base URL is set: no hospital record is connected.
 * @throws EhrSettingsInvalid naming the setting that cannot work.
 */
export function parseEhrSettings(raw: unknown, limits: Partial<EhrLimits> = {}): EhrSettings | null {
  const parsed = rawSettings.safeParse(raw ?? {})
  if (!parsed.success) throw new EhrSettingsInvalid(`Setting ${parsed.error.issues[0]?.path.join('.') ?? 'ehr'} has the wrong form`)
  const settings = parsed.data
  if (settings.baseUrl === '') return null
  return {
    baseUrl: httpUrl('baseUrl', settings.baseUrl).replace(/\/+$/, ''),
    auth: authOf(settings),
    recordNumberSystem: settings.recordNumberSystem || null,
    creatinineCodes: list(settings.creatinineCodes).map(codeRef),
    pageOrigins: list(settings.pageOrigins).map(origin => new URL(httpUrl('pageOrigins', origin)).origin),
    limits: { ...defaultLimits, ...limits },
  }
}

function authOf(settings: z.output<typeof rawSettings>): EhrSettings['auth'] {
  if (settings.auth === '' || settings.auth === 'none') return { kind: 'none' }
  if (settings.auth !== 'backend-services') throw new EhrSettingsInvalid('Setting auth must be "none" or "backend-services"')
  if (settings.clientId === '') throw new EhrSettingsInvalid('Setting clientId is needed for backend-services')
  const jwk = jwkSchema.safeParse(typeof settings.privateJwk === 'string' ? jsonOf(settings.privateJwk) : settings.privateJwk)
  if (!jwk.success) throw new EhrSettingsInvalid('Setting privateJwk must be a private JWK (RSA, or EC on P-384) with a kid')
  if (jwk.data.kty === 'EC' && jwk.data.crv !== 'P-384') throw new EhrSettingsInvalid('Setting privateJwk: an EC key must be on P-384')
  return {
    kind: 'backend-services',
    clientId: settings.clientId,
    privateJwk: jwk.data,
    keyId: jwk.data.kid,
    algorithm: jwk.data.kty === 'EC' ? 'ES384' : 'RS384',
    tokenUrl: settings.tokenUrl === '' ? null : httpUrl('tokenUrl', settings.tokenUrl),
    scope: settings.scope || defaultScope,
  }
}

function httpUrl(name: string, value: string): string {
  const url = URL.canParse(value) ? new URL(value) : null
  if (!url || !['http:', 'https:'].includes(url.protocol) || url.username || url.password) {
    throw new EhrSettingsInvalid(`Setting ${name} must be an http or https address without a name or password`)
  }
  return value
}

function codeRef(entry: string): CodeRef {
  const bar = entry.lastIndexOf('|')
  if (bar < 1 || bar === entry.length - 1) throw new EhrSettingsInvalid('Setting creatinineCodes must list "system|code", separated by commas')
  return { system: entry.slice(0, bar), code: entry.slice(bar + 1) }
}

const list = (value: string): string[] => value.split(',').map(entry => entry.trim()).filter(entry => entry !== '')

function jsonOf(value: string): unknown {
  try {
    return JSON.parse(value)
  }
  catch {
    return null
  }
}
