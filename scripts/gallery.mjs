/**
 * `npm run gallery`: a picture of every screen in its usual, empty, error and long states, wide and on a phone, with the e-mails
 * and the patient's page, in `.data/gallery/index.html`.
 *
 *   npm run gallery                       prepares a department of its own, as `npm test` does, and removes it afterwards
 *   npm run gallery -- --only review      states whose name contains the word; may be given often
 *   npm run gallery -- --url http://127.0.0.1:3900 --mail http://127.0.0.1:3980 --fhir http://127.0.0.1:3940
 *                                         a running demonstration department; requests are added to it
 *
 * What is pictured stands in one list: scripts/gallery/states.mjs.
 */
import { rmSync } from 'node:fs'
import { join } from 'node:path'
import util from 'node:util'
import { createCamera } from './gallery/camera.mjs'
import { writeIndex } from './gallery/index-page.mjs'
import { states } from './gallery/states.mjs'
import { prepareCast } from './gallery/cast.mjs'
import * as department from './lib/department.mjs'
import { Failure } from './lib/failure.mjs'
import { loadSources } from './lib/load-sources.mjs'
import { dataDir, ensureDir, root, testDir } from './lib/paths.mjs'
import { pickPort } from './lib/ports.mjs'
import * as preparation from './lib/preparation.mjs'
import { createProcesses } from './lib/processes.mjs'
import { createProgress } from './lib/progress.mjs'
import { untilSignal } from './lib/shutdown.mjs'
import { claim } from './lib/single.mjs'
import { removeCluster, startCluster } from './postgres.mjs'

const out = join(dataDir, 'gallery')
const clusterDir = join(testDir, 'gallery-postgres')
const buildRoot = join(testDir, 'build')
const output = join(buildRoot, 'output')
const firstPorts = { web: 4700, smtp: 4725, mail: 4780, fhir: 4740 }

const { values } = util.parseArgs({
  options: { only: { type: 'string', multiple: true, default: [] }, url: { type: 'string' }, mail: { type: 'string' }, fhir: { type: 'string' } },
})
const progress = createProgress()
let record = null
let clusterMade = false
const processes = createProcesses({ cwd: root, logs: ensureDir(join(testDir, 'logs')), onChange: (programs) => record?.note({ programs }) })

/** A department of our own: built server, database, mail catcher and fake record. */
async function ownDepartment() {
  // The build folder is that of `npm test`: one of the two at a time.
  record = await claim({ file: join(testDir, 'running.json'), what: 'npm test or npm run gallery', say: (text) => progress.line(`  ${text}`) })
  await preparation.preparePostgres({ progress, processes })
  await removeCluster({ dir: clusterDir })
  await progress.step('Build', async (say) =>
    (await preparation.build({ processes, output, say, env: { WHEREFORE_BUILD_DIR: buildRoot } })) ? 'built' : 'sources unchanged',
  )
  const taken = new Set()
  const ports = {}
  for (const [name, preferred] of Object.entries(firstPorts)) ports[name] = (await pickPort({ name, preferred, taken })).port
  return await progress.step('Department', async (say) => {
    clusterMade = true
    const cluster = await startCluster({ dir: clusterDir, port: 54591, say })
    await cluster.ensureDatabase('wherefore_gallery')
    const urls = department.databaseUrls(cluster, 'wherefore_gallery')
    await department.migrateDatabase(urls)
    await department.seed({ processes, urls })
    const serving = { processes, ports, onCrash: (message) => progress.line(message) }
    await department.serveMail(serving)
    await department.serveRecord(serving)
    const env = { ...department.serverEnv({ ports, urls, secret: department.authSecret(testDir) }), TZ: 'UTC' }
    await department.serveBuilt({ ...serving, output, env })
    return { note: env.NUXT_ORIGIN, url: env.NUXT_ORIGIN, mail: `http://127.0.0.1:${ports.mail}`, fhir: env.NUXT_EHR_BASE_URL }
  })
}

function runningDepartment() {
  if (!values.mail || !values.fhir) throw new Failure('With --url, say where its e-mail and its record are: --mail and --fhir, as npm start prints them.')
  return { url: values.url, mail: values.mail, fhir: values.fhir }
}

async function picture() {
  const place = values.url ? runningDepartment() : await ownDepartment()
  const chromium = await preparation.prepareChromium({ progress, processes })
  const wanted = states.filter(({ name }) => values.only.length === 0 || values.only.some((word) => name.includes(word)))
  if (wanted.length === 0) throw new Failure(`No state is called like that. There are:\n${states.map(({ name }) => `  ${name}`).join('\n')}`)
  process.env.WHEREFORE_TEST_BASE_URL = place.url
  const sources = await loadSources()
  const camera = await createCamera({ chromium, place, out })
  const failed = []
  try {
    const { staff } = await sources.load(join(root, 'tests', 'support', 'e2e', 'staff.ts'))
    const cast = await progress.step('Requests in every state', () => prepareCast({ staff, place }))
    if (values.only.length === 0) rmSync(out, { recursive: true, force: true })
    ensureDir(out)
    for (const state of wanted) {
      try {
        await progress.step(state.name, () => camera.take(state, cast))
      } catch (error) {
        failed.push(state.name)
        progress.line(`  ${state.name}: ${error.message.split('\n')[0]}`)
      }
    }
  } finally {
    await camera.close()
    await sources.close()
  }
  progress.line(`\n${writeIndex({ out, states })}`)
  if (failed.length > 0) throw new Failure(`Not pictured: ${failed.join(', ')}`)
  return 0
}

const code = await untilSignal({
  work: picture,
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
process.exit(code)
