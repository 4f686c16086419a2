import { existsSync, readFileSync, rmSync } from 'node:fs'
import { join } from 'node:path'
import { findPostgres } from '../postgres.mjs'
import { aptInstall, findProgram } from './apt.mjs'
import { Failure } from './failure.mjs'
import { fingerprint, isBuilt, markBuilt } from './fingerprint.mjs'
import { satisfiesCaret } from './node-version.mjs'
import { markPackagesInstalled, packagesAreInstalled } from './packages.mjs'
import { root } from './paths.mjs'

/** What both commands do before their own work. `run` is `{ progress, processes }`. */

/** Node's program; `node` on PATH may be another one. */
export const node = process.execPath

/** The script of an installed package's command, run with this very Node. */
export const tool = (path) => join(root, 'node_modules', path)

/** A Nuxt call that asks nobody, counts nobody and colors nothing. */
export const quietEnv = (env = process.env) => ({ ...env, NUXT_TELEMETRY_DISABLED: '1', NO_COLOR: '1', FORCE_COLOR: '0', NO_UPDATE_NOTIFIER: '1' })

/** @throws {Failure} when this Node is not the one that package.json asks for */
export function checkNode() {
  const range = JSON.parse(readFileSync(join(root, 'package.json'), 'utf8')).engines.node
  if (!satisfiesCaret(process.version, range)) {
    throw new Failure(`Wherefore needs Node ${range.slice(1)} or a later ${range.slice(1).split('.')[0]}; this is ${process.version}.`)
  }
}

/** Runs `npm ci` unless `node_modules` is what the lock asks for. */
export function preparePackages({ progress, processes }) {
  return progress.step('Packages', async (say) => {
    if (packagesAreInstalled(root)) return 'as the lock says'
    say('npm ci: about a minute')
    const { output } = await processes.must('npm ci', 'npm', ['ci', '--no-audit', '--no-fund'], { env: quietEnv() })
    // Warnings about engines or peers are for eyes; that some distant package is deprecated is not.
    for (const line of output.split('\n')) if (/^npm warn (?!deprecated)/.test(line)) say(line)
    markPackagesInstalled(root)
    return 'installed'
  })
}

/** Finds PostgreSQL, or has Debian's package installed. */
export function preparePostgres({ progress, processes }) {
  return progress.step('PostgreSQL', async (say) => {
    if (!findPostgres()) {
      await aptInstall('postgresql', { what: 'PostgreSQL', processes, say })
      if (!findPostgres()) throw new Failure('PostgreSQL was installed, but its programs are not below /usr/lib/postgresql.')
    }
    return `version ${findPostgres().version}`
  })
}

/** Finds Debian's Chromium for the end-to-end tests, or has it installed. Returns its path. */
export async function prepareChromium({ progress, processes }) {
  let path = null
  await progress.step('Chromium', async (say) => {
    path = findProgram('chromium')
    if (!path) {
      await aptInstall('chromium', { what: 'Chromium', processes, say })
      path = findProgram('chromium')
    }
    if (!path) throw new Failure('Chromium was installed, but no program chromium is on PATH.')
    return path
  })
  return path
}

/** Has Nuxt write its types into `buildDir`'s folder when they are missing there; editors, lint and vitest read them. */
export async function prepareTypes({ processes, buildDir, env = {} }) {
  if (existsSync(join(buildDir, 'tsconfig.app.json')) && existsSync(join(buildDir, 'eslint.config.mjs'))) return
  await processes.must('nuxt prepare', node, [tool('nuxt/bin/nuxt.mjs'), 'prepare'], { env: quietEnv({ ...process.env, ...env }) })
}

/**
 * Builds the server into `output` unless it holds a build of these very sources.
 *
 * @returns {Promise<boolean>} whether it had to build
 */
export async function build({ processes, output, env = {}, say = () => {} }) {
  const print = fingerprint(root)
  if (isBuilt(output, print)) return false
  say('building: about a minute')
  rmSync(output, { recursive: true, force: true })
  await processes.must('nuxt build', node, [tool('nuxt/bin/nuxt.mjs'), 'build'], { env: quietEnv({ ...process.env, ...env, NODE_ENV: 'production' }) })
  markBuilt(output, print)
  return true
}
