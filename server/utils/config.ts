import { z } from 'zod'

const configSchema = z.object({
  databaseUrl: z.string().min(1),
  ownerDatabaseUrl: z.string(),
  workerDatabaseUrl: z.string().min(1),
  migrationsDir: z.string(),
  authSecret: z.string().min(32, 'at least 32 random characters'),
  origin: z.url(),
  demo: z.union([z.literal('on'), z.literal(''), z.literal('off')]).transform(value => value === 'on'),
  trustedProxies: z.coerce.number().int().min(0).max(10),
  /** Read by `parseEhrSettings`, which knows its form. */
  ehr: z.unknown(),
  smtp: z.object({
    host: z.string().min(1),
    port: z.coerce.number().int().min(1).max(65_535),
    user: z.string(),
    password: z.string(),
    tls: z.enum(['required', 'off']),
    from: z.string().min(3),
  }),
  logLevel: z.enum(['trace', 'debug', 'info', 'warn', 'error', 'silent']),
})

type Environment = Readonly<Record<string, string | undefined>>

export type ServerConfig = z.output<typeof configSchema>

/**
 * Reads the runtime configuration once and names every setting that is missing or wrong; the values themselves, which may
 * be secrets, are never repeated.
 *
 * @throws Error with the list of settings.
 */
export function readConfig(raw: unknown, env: Environment = process.env): ServerConfig {
  const parsed = configSchema.safeParse(asWritten(raw, env))
  if (parsed.success) return parsed.data
  const names = parsed.error.issues.map(issue => `${settingName(issue.path)}: ${issue.code === 'custom' ? issue.message : issue.code.replaceAll('_', ' ')}`)
  throw new Error(`Wherefore cannot start. Settings to put right: ${names.join('; ')}`)
}

/** Settings that are text, whatever they look like. */
const texts = ['databaseUrl', 'ownerDatabaseUrl', 'workerDatabaseUrl', 'migrationsDir', 'authSecret']
const mailTexts = ['host', 'user', 'password', 'from']

/**
 * The framework reads the environment as JSON where it can: a password of digits would become a number, and `1e5` another password.
 * So texts are taken from the environment as they were written there.
 */
function asWritten(raw: unknown, env: Environment): unknown {
  if (!isRecord(raw)) return raw
  const smtp = isRecord(raw.smtp) ? { ...raw.smtp, ...written(mailTexts, ['smtp'], env) } : raw.smtp
  return { ...raw, ...written(texts, [], env), smtp }
}

/** Those of the named settings that the environment holds. */
function written(names: readonly string[], group: readonly string[], env: Environment): Record<string, string> {
  return Object.fromEntries(names.flatMap((name): [string, string][] => {
    const text = env[settingName([...group, name])]
    return text === undefined ? [] : [[name, text]]
  }))
}

function isRecord(value: unknown): value is Record<string, unknown> {
  return typeof value === 'object' && value !== null
}

/** `ehr.baseUrl` is set by `NUXT_EHR_BASE_URL`. */
function settingName(path: readonly PropertyKey[]): string {
  return ['NUXT', ...path.map(part => String(part).replace(/([A-Z])/g, '_$1').toUpperCase())].join('_')
}
