/**
 * A PostgreSQL cluster of our own, from Debian's programs: made, started, looked at and stopped. It listens on loopback only,
 * without sockets, and trusts whoever connects: for demonstration and tests, never for a department's data.
 *
 *   node scripts/postgres.mjs start --dir .data/postgres [--port 54391]
 *   node scripts/postgres.mjs status --dir .data/postgres
 *   node scripts/postgres.mjs stop --dir .data/postgres
 */
import { spawn } from 'node:child_process'
import { randomBytes } from 'node:crypto'
import { chmodSync, chownSync, existsSync, mkdirSync, readFileSync, readdirSync, realpathSync, renameSync, rmSync, statSync, writeFileSync } from 'node:fs'
import { basename, join, resolve } from 'node:path'
import { setTimeout as sleep } from 'node:timers/promises'
import { pathToFileURL } from 'node:url'
import util from 'node:util'
import { findProgram, installLine, isRoot } from './lib/apt.mjs'
import { Failure } from './lib/failure.mjs'
import { beganAt } from './lib/identity.mjs'
import { pickPort } from './lib/ports.mjs'
import { tail } from './lib/processes.mjs'
import { databaseGrantsSql, plainName, roles, rolesSql, superuser } from './lib/roles.mjs'

export { roles, superuser }

/** An unusual number, so that it meets neither a PostgreSQL of the machine (5432) nor the tests' (picked free). */
export const defaultPort = 54391

/** Where clusters go whose folder the user postgres cannot reach. */
const fallbackRoot = '/var/lib/wherefore'

const debianRoot = '/usr/lib/postgresql'

/**
 * Finds PostgreSQL's server programs: Debian's newest version (they are not on PATH there), else those on PATH.
 *
 * @param {string} [version] the major version that an existing cluster needs
 * @returns {{ bin: string, version: string } | null}
 */
export function findPostgres(version) {
  const debian = existsSync(debianRoot) ? readdirSync(debianRoot) : []
  const versions = debian
    .filter((name) => /^\d+$/.test(name) && existsSync(join(debianRoot, name, 'bin', 'initdb')))
    .sort((a, b) => Number(b) - Number(a))
  const chosen = version === undefined ? versions[0] : versions.find((name) => name === version)
  if (chosen) return { bin: join(debianRoot, chosen, 'bin'), version: chosen }
  const initdb = findProgram('initdb')
  return initdb && version === undefined ? { bin: join(realpathSync(initdb), '..'), version: 'on PATH' } : null
}

/** Nothing from outside may steer psql or the server to another database. */
const cleanEnv = () => Object.fromEntries(Object.entries(process.env).filter(([name]) => !name.startsWith('PG')))

/** Runs a program to its end in a process group of its own (Ctrl-C must not reach PostgreSQL) and collects what it prints. */
function capture(command, args, { input } = {}) {
  return new Promise((done) => {
    const child = spawn(command, args, { cwd: '/', detached: true, env: cleanEnv(), stdio: [input === undefined ? 'ignore' : 'pipe', 'pipe', 'pipe'] })
    let output = ''
    let errors = ''
    child.stdout.on('data', (data) => (output += data))
    child.stderr.on('data', (data) => (errors += data))
    child.once('error', (error) => done({ code: 127, output, errors: error.message }))
    child.once('close', (code) => done({ code: code ?? 1, output: output.trim(), errors: errors.trim() }))
    child.stdin?.end(input)
  })
}

/** PostgreSQL's programs refuse to work as root; root hands them to the user postgres. */
const asServer = (command, args) => (isRoot() ? capture('runuser', ['-u', 'postgres', '--', command, ...args]) : capture(command, args))

async function postgresUser() {
  const [uid, gid] = await Promise.all([capture('id', ['-u', 'postgres']), capture('id', ['-g', 'postgres'])])
  if (uid.code !== 0) throw new Failure(`The user postgres is missing. Debian's package brings it:\n\n    ${installLine('postgresql')}\n`)
  return { uid: Number(uid.output), gid: Number(gid.output) }
}

/**
 * Where the cluster of `dir` lies: `dir/cluster`, or, when this is root and the user postgres cannot reach that, a folder below
 * /var/lib/wherefore whose name `dir/place.json` keeps. A copied checkout does not share its original's data: the file says for
 * which folder it was written.
 *
 * @returns {Promise<{ place: string, fallback: boolean }>}
 */
async function placeOf(dir, { make }) {
  const own = join(dir, 'cluster')
  if (!isRoot()) {
    if (make) mkdirSync(own, { recursive: true, mode: 0o700 })
    if (existsSync(own) && statSync(own).uid !== process.getuid?.()) {
      throw new Failure(`${own} belongs to another user: it was made as root. Start as root again, or remove it to begin anew.`)
    }
    return { place: own, fallback: false }
  }
  const pointer = join(dir, 'place.json')
  if (existsSync(pointer)) {
    const { forDir, place } = JSON.parse(readFileSync(pointer, 'utf8'))
    if (forDir === realpathSync(dir)) return { place, fallback: true }
  }
  if (!make) return { place: own, fallback: false }
  const user = await postgresUser()
  if (existsSync(join(own, 'data')) && statSync(join(own, 'data')).uid !== user.uid) {
    throw new Failure(`${own} belongs to another user: it was not made as root. Start as that user again, or remove it to begin anew.`)
  }
  const takeOver = (folder) => {
    mkdirSync(folder, { recursive: true })
    chmodSync(folder, 0o700)
    chownSync(folder, user.uid, user.gid)
  }
  takeOver(own)
  if ((await asServer('test', ['-x', own])).code === 0) return { place: own, fallback: false }
  rmSync(own, { recursive: true })
  const place = join(fallbackRoot, `${basename(resolve(dir, '..', '..'))}-${randomBytes(4).toString('hex')}`)
  mkdirSync(fallbackRoot, { recursive: true, mode: 0o755 })
  takeOver(place)
  writeFileSync(pointer, JSON.stringify({ forDir: realpathSync(dir), place }))
  return { place, fallback: true }
}

async function psql({ bin, port, database, sql }) {
  const args = ['-X', '-q', '-t', '-A', '-v', 'ON_ERROR_STOP=1', '-h', '127.0.0.1', '-p', String(port), '-U', superuser, '-d', database, '-f', '-']
  return capture(join(bin, 'psql'), args, { input: sql })
}

/**
 * The port on which this very cluster answers, or null. `pg_ctl status` is not asked: it goes by the process number alone and
 * says "running" for a server that was killed.
 */
async function portOf({ bin, data }) {
  const lock = readLock(data)
  if (!lock) return null
  const shown = await psql({ bin, port: lock.port, database: 'postgres', sql: 'show data_directory' })
  return shown.code === 0 && shown.output === realpathSync(data) ? lock.port : null
}

function readLock(data) {
  try {
    const lines = readFileSync(join(data, 'postmaster.pid'), 'utf8').split('\n')
    return { pid: Number(lines[0]), port: Number(lines[3]) }
  } catch {
    return null
  }
}

/**
 * Removes a lock file whose process number now belongs to some other program, as after a restart of the machine. While the number
 * belongs to nobody or to a PostgreSQL, the file stays: PostgreSQL itself judges those.
 */
function dropForeignLock(data) {
  const lock = readLock(data)
  if (!lock || beganAt(lock.pid) === null) return
  try {
    const program = readFileSync(`/proc/${lock.pid}/cmdline`, 'utf8')
    if (!program.includes('postgres')) rmSync(join(data, 'postmaster.pid'))
  } catch {
    // Not Linux, or gone meanwhile: leave it to PostgreSQL.
  }
}

async function initialize({ bin, place, data }) {
  // Made beside and then renamed: an interrupted initdb leaves no half cluster that looks whole.
  const fresh = join(place, 'data.new')
  rmSync(fresh, { recursive: true, force: true })
  const made = await asServer(join(bin, 'initdb'), [
    '-D', fresh, '-U', superuser, '-A', 'trust', '-E', 'UTF8', '--locale=C.UTF-8', '--no-instructions',
  ])
  if (made.code !== 0) throw new Failure(`initdb failed in ${place}.\n${tail(`${made.output}\n${made.errors}`)}`)
  renameSync(fresh, data)
}

/**
 * Makes the cluster of `dir` when it is missing, starts it when it does not run, and makes the three roles.
 *
 * @param {{ dir: string, port?: number, asked?: string, variable?: string, taken?: Set<number>, say?: (text: string) => void }} options
 *   `asked` is a port that somebody demanded through the environment variable `variable`; `port` is the one to try first.
 * @returns {Promise<Cluster>}
 * @throws {Failure} PostgreSQL is missing, or did not start; the message holds the end of its log
 */
export async function startCluster({ dir, port = defaultPort, asked, variable = 'WHEREFORE_PG_PORT', taken, say = () => {} }) {
  mkdirSync(dir, { recursive: true })
  const { place, fallback } = await placeOf(dir, { make: true })
  if (fallback) say(`the user postgres cannot reach ${dir}: data in ${place}`)
  const data = join(place, 'data')
  const log = join(place, 'server.log')
  const existing = existsSync(join(data, 'PG_VERSION')) ? readFileSync(join(data, 'PG_VERSION'), 'utf8').trim() : undefined
  const found = findPostgres(existing)
  if (!found) {
    throw new Failure(
      existing
        ? `The data in ${data} belongs to PostgreSQL ${existing}, which is not installed. Install postgresql-${existing}, or remove ${dir} to begin anew.`
        : `PostgreSQL is missing. Install Debian's package:\n\n    ${installLine('postgresql')}\n`,
    )
  }
  const { bin } = found
  if (!existing) await initialize({ bin, place, data })

  let running = await portOf({ bin, data })
  const adopted = running !== null
  if (running === null) {
    dropForeignLock(data)
    running = await launch({ bin, data, log, port, asked, variable, taken, say })
  }
  const cluster = clusterAt({ bin, data, log, port: running, version: found.version, adopted })
  await cluster.sql('postgres', rolesSql)
  return cluster
}

async function launch({ bin, data, log, port, asked, variable, taken, say }) {
  const until = performance.now() + 30_000
  for (let first = port; ;) {
    const chosen = await pickPort({ name: 'database', preferred: first, asked, variable, taken })
    if (chosen.moved) say(`port ${port} is in use: the database takes ${chosen.port}`)
    const options = `-p ${chosen.port} -c listen_addresses=127.0.0.1 -c unix_socket_directories=''`
    const began = existsSync(log) ? statSync(log).size : 0
    const started = await asServer(join(bin, 'pg_ctl'), ['-D', data, '-l', log, '-w', '-t', '60', '-o', options, 'start'])
    if (started.code === 0) return chosen.port
    const words = existsSync(log) ? readFileSync(log).subarray(began).toString('utf8') : ''
    if (performance.now() > until) throw new Failure(`PostgreSQL did not start.\n${tail(words || started.errors)}\n  Whole log: ${log}`)
    if (/could not bind/.test(words) && !asked) {
      first = chosen.port + 1 // Somebody took the port between the look and the start.
    } else if (/postmaster\.pid|shared memory block/.test(`${words}${started.errors}`)) {
      taken?.delete(chosen.port)
      await sleep(500) // A server that was killed takes a moment to let go of its files.
    } else {
      throw new Failure(`PostgreSQL did not start.\n${tail(words || started.errors)}\n  Whole log: ${log}`)
    }
  }
}

/**
 * @typedef {object} Cluster
 * @property {number} port
 * @property {string} data its data folder
 * @property {string} version PostgreSQL's major version
 * @property {boolean} adopted it ran already
 * @property {(role: string, database: string) => string} url address for a role and a database
 * @property {(database: string, sql: string) => Promise<string>} sql runs statements as superuser
 * @property {(name: string) => Promise<boolean>} ensureDatabase makes a database owned by the owner role; false when it exists
 * @property {() => Promise<void>} stop
 */

/** @returns {Cluster} */
function clusterAt({ bin, data, log, port, version, adopted }) {
  const sql = async (database, text) => {
    const result = await psql({ bin, port, database, sql: text })
    if (result.code !== 0) throw new Failure(`The database refused:\n${tail(result.errors)}`)
    return result.output
  }
  return {
    port,
    data,
    version,
    adopted,
    url: (role, database) => `postgresql://${role}@127.0.0.1:${port}/${database}`,
    sql,
    async ensureDatabase(name) {
      const exists = await sql('postgres', `select 1 from pg_database where datname = '${plainName(name)}'`)
      if (exists === '1') return false
      await sql('postgres', `create database ${name} owner ${roles.owner}`)
      await sql('postgres', databaseGrantsSql(name))
      return true
    },
    stop: () => stopServer({ bin, data, log }),
  }
}

async function stopServer({ bin, data, log }) {
  if (!readLock(data)) return
  const stopped = await asServer(join(bin, 'pg_ctl'), ['-D', data, '-m', 'fast', '-w', '-t', '60', 'stop'])
  if (stopped.code !== 0 && readLock(data) && !/no server running|No such process/i.test(stopped.errors)) {
    throw new Failure(`PostgreSQL did not stop.\n${tail(stopped.errors)}\n  Whole log: ${log}`)
  }
}

/** The cluster of `dir` when it runs, else null. */
export async function runningCluster({ dir }) {
  const { place } = await placeOf(dir, { make: false })
  const data = join(place, 'data')
  if (!existsSync(join(data, 'PG_VERSION'))) return null
  const found = findPostgres(readFileSync(join(data, 'PG_VERSION'), 'utf8').trim())
  if (!found) return null
  const port = await portOf({ bin: found.bin, data })
  return port === null ? null : clusterAt({ ...found, data, log: join(place, 'server.log'), port, adopted: true })
}

/** Stops the cluster of `dir`, also one that no longer answers. False when none ran. */
export async function stopCluster({ dir }) {
  const { place } = await placeOf(dir, { make: false })
  const data = join(place, 'data')
  const lock = readLock(data)
  if (!lock) return false
  const found = findPostgres(readFileSync(join(data, 'PG_VERSION'), 'utf8').trim())
  if (found && beganAt(lock.pid) !== null) await stopServer({ bin: found.bin, data, log: join(place, 'server.log') })
  return true
}

/** Stops the cluster of `dir` and removes everything it kept, wherever it lies. */
export async function removeCluster({ dir }) {
  if (!existsSync(dir)) return
  await stopCluster({ dir })
  const { place, fallback } = await placeOf(dir, { make: false })
  if (fallback) rmSync(place, { recursive: true, force: true })
  rmSync(dir, { recursive: true, force: true })
}

async function main() {
  const { values, positionals } = util.parseArgs({
    allowPositionals: true,
    options: { dir: { type: 'string' }, port: { type: 'string' }, database: { type: 'string', default: 'wherefore' } },
  })
  const dir = values.dir === undefined ? undefined : resolve(values.dir)
  const usage = 'Usage: node scripts/postgres.mjs start|stop|status --dir FOLDER [--port PORT] [--database NAME]'
  if (dir === undefined || positionals.length !== 1) throw new Failure(usage)
  const print = (cluster) => {
    console.log(`running on 127.0.0.1:${cluster.port}, data in ${cluster.data}`)
    for (const role of [superuser, ...Object.values(roles)]) console.log(`  ${cluster.url(role, values.database)}`)
  }
  if (positionals[0] === 'start') {
    const cluster = await startCluster({ dir, asked: values.port, variable: '--port', say: (text) => console.log(text) })
    await cluster.ensureDatabase(values.database)
    print(cluster)
  } else if (positionals[0] === 'status') {
    const cluster = await runningCluster({ dir })
    if (cluster) print(cluster)
    else console.log('not running')
    process.exitCode = cluster ? 0 : 3
  } else if (positionals[0] === 'stop') {
    console.log((await stopCluster({ dir })) ? 'stopped' : 'not running')
  } else {
    throw new Failure(usage)
  }
}

if (process.argv[1] && import.meta.url === pathToFileURL(realpathSync(process.argv[1])).href) {
  main().catch((error) => {
    console.error(error instanceof Failure ? error.message : error)
    process.exitCode = 1
  })
}
