import { readFileSync, rmSync, statSync, writeFileSync } from 'node:fs'
import { setTimeout as sleep } from 'node:timers/promises'
import { Failure } from './failure.mjs'
import { beganAt, stillRuns } from './identity.mjs'
import { signalGroup } from './processes.mjs'

/**
 * Lets one run of a command work in a folder at a time, by a record of who runs and what it started. The record of a run that was
 * killed is recognized, and what that run left running is ended first.
 *
 * @param {{ file: string, what: string, say?: (text: string) => void }} options
 * @throws {Failure} another run is alive; names its address when it already serves one
 */
export async function claim({ file, what, say = () => {} }) {
  const own = { pid: process.pid, began: beganAt(process.pid), address: null, programs: [] }
  for (;;) {
    try {
      writeFileSync(file, JSON.stringify(own), { flag: 'wx', mode: 0o600 })
      break
    } catch (error) {
      if (error.code !== 'EEXIST') throw error
    }
    const other = await readRecord(file)
    if (other && stillRuns(other)) {
      const where = other.address ? ` at ${other.address}` : ''
      throw new Failure(`${what} already runs in this folder${where} (process ${other.pid}). Stop it with Ctrl-C in its terminal, or: kill ${other.pid}`)
    }
    await endLeftovers(other?.programs ?? [], say)
    rmSync(file, { force: true })
  }
  return {
    /** Adds what is known later to the record. */
    note(facts) {
      Object.assign(own, facts)
      writeFileSync(file, JSON.stringify(own), { mode: 0o600 })
    },
    release() {
      rmSync(file, { force: true })
    },
  }
}

/** Null for a record that nobody finished writing. */
async function readRecord(file) {
  for (let attempt = 0; attempt < 20; attempt += 1) {
    try {
      return JSON.parse(readFileSync(file, 'utf8'))
    } catch {
      await sleep(100) // Either just being written, or broken off; two seconds tell them apart.
    }
    try {
      statSync(file)
    } catch {
      return null
    }
  }
  return null
}

async function endLeftovers(programs, say) {
  const alive = programs.filter(stillRuns)
  if (alive.length === 0) return
  say(`ending what an interrupted run left behind: ${alive.map(({ name }) => name).join(', ')}`)
  for (const { pid } of alive) signalGroup(pid, 'SIGTERM')
  for (let waited = 0; waited < 10_000 && alive.some(stillRuns); waited += 100) await sleep(100)
  for (const { pid } of alive) signalGroup(pid, 'SIGKILL')
}
