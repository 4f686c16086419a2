import { createServer } from 'node:net'
import { Failure } from './failure.mjs'

/** Resolves to true when nothing listens on 127.0.0.1:`port`. */
export function isFree(port) {
  return new Promise((resolve) => {
    const probe = createServer()
    probe.once('error', () => resolve(false))
    probe.listen({ port, host: '127.0.0.1', exclusive: true }, () => probe.close(() => resolve(true)))
  })
}

/**
 * Chooses a loopback port. A port that was asked for (by an environment variable) must be free; the default one may move up to
 * the next free number. `taken` holds ports already promised to another part of the same run, and gains the chosen one.
 *
 * @param {{ name: string, preferred: number, asked?: string, variable?: string, taken?: Set<number>, free?: (port: number) => Promise<boolean> }} options
 * @returns {Promise<{ port: number, moved: boolean }>} `moved` when it is not the preferred one
 * @throws {Failure} the port asked for is no port number, or is busy
 */
export async function pickPort({ name, preferred, asked, variable, taken = new Set(), free = isFree }) {
  if (asked !== undefined && asked !== '') {
    const port = Number(asked)
    if (!Number.isInteger(port) || port < 1024 || port > 65535) {
      throw new Failure(`${variable}=${asked} is not a port between 1024 and 65535.`)
    }
    if (taken.has(port) || !(await free(port))) {
      throw new Failure(`Port ${port} (${variable}) for the ${name} is in use. Free it, or choose another with ${variable}.`)
    }
    taken.add(port)
    return { port, moved: false }
  }
  for (let port = preferred; port < preferred + 100 && port <= 65535; port += 1) {
    if (taken.has(port) || !(await free(port))) continue
    taken.add(port)
    return { port, moved: port !== preferred }
  }
  throw new Failure(`No free port for the ${name} between ${preferred} and ${preferred + 99}.`)
}
