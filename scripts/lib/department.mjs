import { randomBytes } from 'node:crypto'
import { existsSync, readFileSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { roles } from './roles.mjs'
import { root } from './paths.mjs'
import { node, tool } from './preparation.mjs'

/** What a department consists of beside its database: the server, a mail catcher and a fake hospital record. */

const loopback = (port) => `http://127.0.0.1:${port}`

/** The generated migrations, as the server and the scripts read them. */
export const migrationsDir = join(root, 'server', 'database', 'migrations')

/** The three database addresses of one database. */
export const databaseUrls = (cluster, database) => ({
  appUrl: cluster.url(roles.app, database),
  ownerUrl: cluster.url(roles.owner, database),
  workerUrl: cluster.url(roles.worker, database),
})

/**
 * Brings a database up to date with the product's own migrations. Loaded late: its packages exist only after `npm ci`.
 *
 * @param {{ ownerUrl: string, workerUrl: string }} urls
 */
export async function migrateDatabase({ ownerUrl, workerUrl }) {
  const { migrate } = await import('../../server/database/migrate.mjs')
  await migrate({ ownerUrl, workerUrl, dir: migrationsDir })
}

/** Settings of a product server would leak from the shell into the demonstration, and could point it at a real record. */
const foreign = /^(NUXT_|NITRO_|AUTH_|NEXTAUTH_|MAILDEV_|HOST$|PORT$)/

/** This process's environment without any setting of a server. */
export const neutralEnv = (env = process.env) => Object.fromEntries(Object.entries(env).filter(([name]) => !foreign.test(name)))

/**
 * The whole configuration of a demonstration server.
 *
 * @param {{ ports: { web: number, smtp: number, fhir: number }, urls: { appUrl: string, ownerUrl: string, workerUrl: string }, secret: string }} options
 */
export function serverEnv({ ports, urls, secret }) {
  const origin = loopback(ports.web)
  return {
    ...neutralEnv(),
    HOST: '127.0.0.1',
    PORT: String(ports.web),
    NUXT_ORIGIN: origin,
    AUTH_ORIGIN: `${origin}/api/auth`,
    NEXTAUTH_URL: `${origin}/api/auth`,
    NUXT_AUTH_SECRET: secret,
    NUXT_DATABASE_URL: urls.appUrl,
    NUXT_OWNER_DATABASE_URL: urls.ownerUrl,
    NUXT_WORKER_DATABASE_URL: urls.workerUrl,
    NUXT_MIGRATIONS_DIR: migrationsDir,
    NUXT_DEMO: 'on',
    NUXT_EHR_BASE_URL: loopback(ports.fhir),
    NUXT_EHR_AUTH: 'none',
    NUXT_EHR_RECORD_NUMBER_SYSTEM: 'https://northshore.example/fhir/record-number',
    NUXT_SMTP_HOST: '127.0.0.1',
    NUXT_SMTP_PORT: String(ports.smtp),
    NUXT_SMTP_TLS: 'off',
    NUXT_SMTP_FROM: 'Wherefore demonstration <imaging@wherefore.example>',
  }
}

/** The folder's own signing secret: made once, readable by its owner alone. */
export function authSecret(dir) {
  const file = join(dir, 'auth-secret')
  if (!existsSync(file)) writeFileSync(file, randomBytes(48).toString('base64url'), { mode: 0o600 })
  return readFileSync(file, 'utf8')
}

/**
 * Fills the demonstration department once; a database that has it already says so and is left alone. Where the fake record is
 * up (`ports`), its people also ask for exams, so that no list is empty.
 */
export const seed = ({ processes, urls, ports = null }) =>
  processes.must('demo department', node, [join(root, 'scripts', 'seed-demo.mjs')], {
    env: { ...neutralEnv(), NUXT_DATABASE_URL: urls.appUrl, NUXT_OWNER_DATABASE_URL: urls.ownerUrl, NUXT_WORKER_DATABASE_URL: urls.workerUrl, NUXT_DEMO: 'on', ...(ports ? { NUXT_EHR_BASE_URL: loopback(ports.fhir) } : {}) },
  })

/** Catches all mail and shows it on a page; nothing leaves the machine. */
export const serveMail = ({ processes, ports, onCrash }) =>
  processes.serve(
    'mail catcher',
    node,
    [tool('maildev/dist/bin/maildev.js'), '--smtp', ports.smtp, '--web', ports.mail, '--ip', '127.0.0.1', '--web-ip', '127.0.0.1'].map(String),
    { url: `${loopback(ports.mail)}/api/email`, env: neutralEnv(), onCrash },
  )

/** The fake hospital record with the demonstration's patients. */
export const serveRecord = ({ processes, ports, onCrash }) =>
  processes.serve('fake hospital record', node, [join(root, 'fhir-fixtures', 'server.mjs'), '--port', String(ports.fhir)], {
    url: `${loopback(ports.fhir)}/metadata`,
    env: neutralEnv(),
    onCrash,
  })

/** The built server. */
export const serveBuilt = ({ processes, output, env, onCrash }) =>
  processes.serve('server', node, [join(output, 'server', 'index.mjs')], { url: `${env.NUXT_ORIGIN}/readyz`, env: { ...env, NODE_ENV: 'production' }, onCrash })

/** The development server, with hot reload; what it says goes to the terminal. */
export const serveDevelopment = ({ processes, env, onCrash }) =>
  processes.serve('development server', node, [tool('nuxt/bin/nuxt.mjs'), 'dev', '--host', '127.0.0.1', '--port', env.PORT], {
    url: `${env.NUXT_ORIGIN}/`,
    timeout: 180_000,
    env: { ...env, NUXT_TELEMETRY_DISABLED: '1' },
    show: true,
    onCrash,
  })
