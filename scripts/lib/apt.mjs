import { accessSync, constants } from 'node:fs'
import { delimiter, join } from 'node:path'
import { Failure } from './failure.mjs'

/** True when this process may install Debian packages. */
export const isRoot = () => process.getuid?.() === 0

/** The full path of a program on PATH, or null. */
export function findProgram(name, path = process.env.PATH ?? '') {
  for (const folder of path.split(delimiter)) {
    if (folder === '') continue
    const file = join(folder, name)
    try {
      accessSync(file, constants.X_OK)
      return file
    } catch {
      // Not in this folder.
    }
  }
  return null
}

/** The one line that installs a Debian package, for somebody who is not root. */
export const installLine = (name) => `sudo apt-get update && sudo apt-get install -y --no-install-recommends ${name}`

/**
 * Installs one Debian package when this process may, else names the line to run.
 *
 * @param {string} name the package, for instance `postgresql`
 * @param {{ what: string, processes: { must: Function }, say: (text: string) => void }} options
 * @throws {Failure} not root, no apt, or apt failed
 */
export async function aptInstall(name, { what, processes, say }) {
  if (!isRoot() || !findProgram('apt-get')) {
    throw new Failure(`${what} is missing. Install Debian's package with this line, then start again:\n\n    ${installLine(name)}\n`)
  }
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' }
  say(`${what} is missing: installing Debian's package ${name}`)
  await processes.must(`apt-get update`, 'apt-get', ['update', '-q'], { env })
  await processes.must(`apt-get install ${name}`, 'apt-get', ['install', '-y', '-q', '--no-install-recommends', name], { env })
}
