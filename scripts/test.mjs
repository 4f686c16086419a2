/**
 * `npm test`: everything that must hold, from a fresh clone, beside a running department or without one: lint, types, unit,
 * integration and end-to-end tests, on a database, ports and a build folder of its own below `.data/test/`.
 *
 *   npm test -- --only unit,e2e           some parts
 *   npm test -- --only e2e review         some parts, some files
 */
import { existsSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { playwrightCounts, sum, verdict, verdictCounts, vitestCounts } from './lib/counts.mjs'
import * as department from './lib/department.mjs'
import { Failure } from './lib/failure.mjs'
import { ensureDir, root, testDir } from './lib/paths.mjs'
import { pickPort } from './lib/ports.mjs'
import * as preparation from './lib/preparation.mjs'
import { createProcesses } from './lib/processes.mjs'
import { createProgress } from './lib/progress.mjs'
import { untilSignal } from './lib/shutdown.mjs'
import { claim } from './lib/single.mjs'
import { parseTestArguments } from './lib/test-arguments.mjs'
import { removeCluster, startCluster, superuser } from './postgres.mjs'

/** Migrated once; every integration test file and the end-to-end department are copies of it. */
const template = 'wherefore_template'
const endToEnd = 'wherefore_e2e'

const buildRoot = join(testDir, 'build')
const types = join(buildRoot, 'nuxt')
const output = join(buildRoot, 'output')
const clusterDir = join(testDir, 'postgres')

/** Far from those of `npm start`, so that both run side by side; taken ones are passed over. */
const firstPorts = { web: 4900, smtp: 4925, mail: 4980, fhir: 4940 }
const firstDatabasePort = 54491

const { node, tool } = preparation
const progress = createProgress()
let record = null
const processes = createProcesses({ cwd: root, logs: ensureDir(join(testDir, 'logs')), onChange: (programs) => record?.note({ programs }) })
const run = { progress, processes }
let clusterMade = false

/** Test programs compute in UTC wherever they run, and see no setting of a real server. */
const testEnv = (more = {}) => ({ ...department.neutralEnv(), TZ: 'UTC', NUXT_TELEMETRY_DISABLED: '1', NO_UPDATE_NOTIFIER: '1', WHEREFORE_BUILD_DIR: buildRoot, ...more })

function reportAt(name) {
  const file = join(testDir, `${name}.json`)
  rmSync(file, { force: true })
  return { file, read: () => (existsSync(file) ? JSON.parse(readFileSync(file, 'utf8')) : null) }
}

async function lint() {
  const result = await processes.run('lint', node, [tool('eslint/bin/eslint.js'), '.', '--max-warnings', '0'], { env: testEnv(), show: true })
  return verdictCounts(result)
}

/**
 * The project's references, but to the types in our own build folder: those of a running development server stay untouched. Nuxt
 * leaves everything below `.data` out of the types, and so its own that it wrote there: those are listed one by one.
 */
function writeTypeProject() {
  const references = ['app', 'server', 'shared', 'node'].map((part) => {
    const generated = join(types, `tsconfig.${part}.json`)
    const own = JSON.parse(readFileSync(generated, 'utf8')).include.filter((path) => /^\.\/[^*]*\.d\.ts$/.test(path))
    const path = join(testDir, `tsconfig.${part}.json`)
    writeFileSync(path, JSON.stringify({ extends: generated, files: own.map((file) => join(types, file)) }))
    return { path }
  })
  const project = join(testDir, 'tsconfig.json')
  writeFileSync(project, JSON.stringify({ files: [], references }))
  return project
}

async function typecheck() {
  const args = [tool('vue-tsc/bin/vue-tsc.js'), '-b', '--noEmit', writeTypeProject()]
  return verdictCounts(await processes.run('typecheck', node, args, { env: testEnv(), show: true }))
}

async function vitest(name, projects, filters, env) {
  const report = reportAt(name)
  const args = [tool('vitest/vitest.mjs'), 'run', ...projects.flatMap((project) => ['--project', project])]
  args.push('--reporter=default', '--reporter=json', `--outputFile.json=${report.file}`, ...filters)
  const result = await processes.run(`${name} tests`, node, args, { env: testEnv(env), show: true })
  return vitestCounts(report.read(), result)
}

async function choosePorts() {
  const taken = new Set()
  const ports = {}
  for (const [name, preferred] of Object.entries(firstPorts)) ports[name] = (await pickPort({ name, preferred, taken })).port
  return ports
}

let cluster = null
async function useCluster() {
  if (cluster) return cluster
  await progress.step('Database', async (say) => {
    clusterMade = true
    cluster = await startCluster({ dir: clusterDir, port: firstDatabasePort, say })
    await cluster.ensureDatabase(template)
    await department.migrateDatabase(department.databaseUrls(cluster, template))
    return `throwaway, migrated, on 127.0.0.1:${cluster.port}`
  })
  return cluster
}

/** Runs `work` beside a mail catcher and a fake record of its own, so that no stage sees another's. */
async function withFakes(work) {
  const ports = await choosePorts()
  const started = []
  const serving = { processes, ports, onCrash: (message) => progress.line(message) }
  try {
    await progress.step('Fakes', async () => {
      started.push(await department.serveMail(serving), await department.serveRecord(serving))
      return `mail 127.0.0.1:${ports.mail}, record 127.0.0.1:${ports.fhir}`
    })
    return await work({ ports, serving })
  } finally {
    for (const program of started) await processes.stop(program)
  }
}

const fakesEnv = (ports) => ({
  WHEREFORE_TEST_SMTP_PORT: String(ports.smtp),
  WHEREFORE_TEST_MAIL_URL: `http://127.0.0.1:${ports.mail}`,
  WHEREFORE_TEST_FHIR_URL: `http://127.0.0.1:${ports.fhir}`,
})

const build = () =>
  progress.step('Build', async (say) =>
    (await preparation.build({ processes, output, say, env: { WHEREFORE_BUILD_DIR: buildRoot } })) ? 'built' : 'sources unchanged',
  )

async function integration(filters) {
  await build()
  const { url } = await useCluster()
  return withFakes(({ ports }) =>
    vitest('integration', ['integration'], filters, {
      WHEREFORE_TEST_SUPERUSER_URL: url(superuser, 'postgres'),
      WHEREFORE_TEST_TEMPLATE: template,
      WHEREFORE_TEST_SERVER_DIR: output,
      ...fakesEnv(ports),
    }),
  )
}

async function e2e(filters) {
  const chromium = await preparation.prepareChromium(run)
  await build()
  const made = await useCluster()
  return withFakes(async ({ ports, serving }) => {
    const urls = department.databaseUrls(made, endToEnd)
    await progress.step('Department', async () => {
      await made.sql('postgres', `drop database if exists ${endToEnd} with (force)`)
      await made.ensureDatabase(endToEnd)
      await department.migrateDatabase(urls)
      await department.seed({ processes, urls })
      return 'seeded'
    })
    const env = { ...department.serverEnv({ ports, urls, secret: department.authSecret(testDir) }), TZ: 'UTC' }
    let server = null
    await progress.step('Server', async () => {
      server = await department.serveBuilt({ ...serving, output, env })
      return env.NUXT_ORIGIN
    })
    try {
      const report = reportAt('e2e')
      const args = [tool('@playwright/test/cli.js'), 'test', ...filters]
      const result = await processes.run('end-to-end tests', node, args, {
        show: true,
        env: testEnv({
          WHEREFORE_TEST_BASE_URL: env.NUXT_ORIGIN,
          WHEREFORE_TEST_OWNER_URL: urls.ownerUrl,
          WHEREFORE_TEST_CHROMIUM: chromium,
          WHEREFORE_TEST_OUTPUT: join(testDir, 'playwright'),
          PLAYWRIGHT_JSON_OUTPUT_NAME: report.file,
          ...fakesEnv(ports),
        }),
      })
      return playwrightCounts(report.read(), result)
    } finally {
      await processes.stop(server)
    }
  })
}

const work = {
  lint,
  typecheck,
  unit: (filters) => vitest('unit', ['unit', 'checks'], filters),
  integration,
  e2e,
}

async function prepare(only) {
  preparation.checkNode()
  record = await claim({ file: join(testDir, 'running.json'), what: 'npm test', say: (text) => progress.line(`  ${text}`) })
  await preparation.preparePackages(run)
  await removeCluster({ dir: clusterDir })
  if (only.includes('integration') || only.includes('e2e')) await preparation.preparePostgres(run)
  await progress.step('Types', async () => {
    // vitest reads the tsconfig files of the checkout; lint and the type check read ours, made anew for today's sources.
    await preparation.prepareTypes({ processes, buildDir: join(root, '.nuxt') })
    rmSync(types, { recursive: true, force: true })
    await preparation.prepareTypes({ processes, buildDir: types, env: { WHEREFORE_BUILD_DIR: buildRoot } })
    return 'written'
  })
}

async function testAll() {
  const { only, filters } = parseTestArguments(process.argv.slice(2))
  await prepare(only)
  const results = []
  for (const stage of only) {
    progress.line(`\n── ${stage} ${'─'.repeat(Math.max(0, 60 - stage.length))}`)
    let counts = { passed: 0, failed: 1, skipped: 0 }
    try {
      counts = await work[stage](filters)
    } catch (error) {
      if (!(error instanceof Failure)) throw error
      progress.line(`\n${error.message}`)
    }
    results.push({ stage, counts })
  }
  progress.line('')
  for (const { stage, counts } of results) {
    progress.line(`${stage.padEnd(12)} ${verdict(counts)}${counts.skipped > 0 ? `, ${counts.skipped} skipped` : ''}`)
  }
  return sum(results.map(({ counts }) => counts))
}

let total = { passed: 0, failed: 1, skipped: 0 }
const code = await untilSignal({
  async work() {
    total = await testAll()
    return total.failed === 0 ? 0 : 1
  },
  async close({ hurry, settled }) {
    hurry.addEventListener('abort', () => void processes.stopAll({ grace: 0 }))
    await processes.stopAll({ grace: 10_000 })
    await settled
    if (clusterMade) await removeCluster({ dir: clusterDir })
    record?.release()
  },
  say: progress.line,
  report: (error) => progress.line(`\n${error instanceof Failure ? error.message : error.stack}`),
})
progress.line(verdict(total))
// An interrupted run counts what it could not finish as failed.
process.exit(total.failed > 0 ? 1 : code)
