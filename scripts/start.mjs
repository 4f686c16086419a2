/**
 * `npm start`: a whole demonstration department on this machine, from a fresh clone. `npm run dev` (`--dev`): the same with hot
 * reload. Needs nothing but Node until `npm ci` has run. `--help` lists the settings.
 */
import { existsSync } from 'node:fs'
import { join } from 'node:path'
import util from 'node:util'
import * as department from './lib/department.mjs'
import { Failure } from './lib/failure.mjs'
import { dataDir, ensureDir, root } from './lib/paths.mjs'
import { pickPort } from './lib/ports.mjs'
import * as preparation from './lib/preparation.mjs'
import { createProcesses } from './lib/processes.mjs'
import { createProgress } from './lib/progress.mjs'
import { untilSignal } from './lib/shutdown.mjs'
import { claim } from './lib/single.mjs'
import { startCluster } from './postgres.mjs'

const database = 'wherefore'

/** Ports to try first, and the variable that demands another. */
const wantedPorts = {
  web: { name: 'server', preferred: 3900, variable: 'WHEREFORE_PORT' },
  smtp: { name: 'mail catcher (SMTP)', preferred: 3925, variable: 'WHEREFORE_SMTP_PORT' },
  mail: { name: 'mail catcher (page)', preferred: 3980, variable: 'WHEREFORE_MAIL_PORT' },
  fhir: { name: 'fake hospital record', preferred: 3940, variable: 'WHEREFORE_FHIR_PORT' },
}

const help = `npm start          a demonstration department with the production build
npm run dev        the same with hot reload

Ports may be set: ${Object.values(wantedPorts).map(({ variable, preferred }) => `${variable} (${preferred})`).join(', ')}, WHEREFORE_PG_PORT (54391).
Everything is kept in .data/; remove that folder to begin anew.`

const output = join(root, '.output')
let record = null
const progress = createProgress()
const processes = createProcesses({ cwd: root, logs: ensureDir(join(dataDir, 'logs')), onChange: (programs) => record?.note({ programs }) })

let cluster = null
let crashed = () => {}
const crash = new Promise((resolve) => (crashed = resolve))

async function choosePorts() {
  const taken = new Set()
  const ports = {}
  for (const [key, wanted] of Object.entries(wantedPorts)) {
    const { port, moved } = await pickPort({ ...wanted, asked: process.env[wanted.variable], taken })
    if (moved) progress.line(`  Port ${wanted.preferred} is in use: the ${wanted.name} takes ${port}.`)
    ports[key] = port
  }
  return { ports, taken }
}

async function start(development) {
  const run = { progress, processes }
  preparation.checkNode()
  record = await claim({ file: join(dataDir, 'running.json'), what: 'Wherefore', say: (text) => progress.line(`  ${text}`) })
  progress.line(`Wherefore: starting in ${root}`)

  await preparation.preparePackages(run)
  await preparation.preparePostgres(run)
  const { ports, taken } = await choosePorts()
  await progress.step('Database', async (say) => {
    cluster = await startCluster({ dir: join(dataDir, 'postgres'), asked: process.env.WHEREFORE_PG_PORT, taken, say })
    const made = await cluster.ensureDatabase(database)
    await department.migrateDatabase(department.databaseUrls(cluster, database))
    return `${made ? 'made' : 'as it was left'}, migrated, on 127.0.0.1:${cluster.port}`
  })
  const urls = department.databaseUrls(cluster, database)
  const env = department.serverEnv({ ports, urls, secret: department.authSecret(dataDir) })

  if (development) {
    if (!existsSync(join(root, '.nuxt', 'tsconfig.app.json'))) await preparation.prepareTypes({ processes, buildDir: join(root, '.nuxt') })
  } else {
    await progress.step('Build', async (say) => ((await preparation.build({ processes, output, say })) ? 'built' : 'sources unchanged'))
  }

  const serving = { processes, ports, onCrash: crashed }
  await progress.step('Mail catcher', async () => {
    await department.serveMail(serving)
    return `127.0.0.1:${ports.mail}`
  })
  await progress.step('Fake record', async () => {
    await department.serveRecord(serving)
    return `127.0.0.1:${ports.fhir}`
  })
  const seeded = await progress.step('Demo data', async () => {
    const { output: said } = await department.seed({ processes, urls, ports })
    return { note: said.trim().split('\n')[0] ?? '', said }
  })
  await progress.step('Server', async () => {
    await (development ? department.serveDevelopment({ ...serving, env }) : department.serveBuilt({ ...serving, output, env }))
    record.note({ address: env.NUXT_ORIGIN })
    return `127.0.0.1:${ports.web}`
  })
  announce({ env, ports, said: seeded.said, development })
}

function announce({ env, ports, said, development }) {
  progress.line(`
Wherefore is ready:    ${env.NUXT_ORIGIN}
  E-mail it sends      http://127.0.0.1:${ports.mail}
  Fake hospital record ${env.NUXT_EHR_BASE_URL}
  Database             ${env.NUXT_DATABASE_URL}
  Logs                 ${join(dataDir, 'logs')}${development ? ' (the server\'s appears here)' : ''}

${said.trim().split('\n').slice(1).join('\n')}

Ctrl-C stops everything.`)
}

async function close({ hurry, settled }) {
  hurry.addEventListener('abort', () => void processes.stopAll({ grace: 0 }))
  const clean = await processes.stopAll({ grace: 10_000 })
  if (!clean) progress.line('  Some program did not end within 10 s and was killed.')
  await settled
  await cluster?.stop()
  record?.release()
  if (record) progress.line('Stopped.')
}

const { values } = util.parseArgs({ options: { dev: { type: 'boolean', default: false }, help: { type: 'boolean', default: false } } })
if (values.help) {
  console.log(help)
} else {
  const code = await untilSignal({
    async work(stopped) {
      await start(values.dev)
      const message = await Promise.race([crash, stopped.then(() => null)])
      if (message === null) return 0
      progress.line(`\n${message}`)
      return 1
    },
    close,
    say: progress.line,
    report: (error) => progress.line(`\n${error instanceof Failure ? error.message : error.stack}`),
  })
  process.exit(code)
}
