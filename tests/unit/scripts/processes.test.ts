import { mkdtempSync, rmSync } from 'node:fs'
import { createServer } from 'node:http'
import type { AddressInfo } from 'node:net'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { beganAt } from '../../../scripts/lib/identity.mjs'
import { createProcesses } from '../../../scripts/lib/processes.mjs'

const node = process.execPath
let logs = ''
let processes: ReturnType<typeof createProcesses>

beforeEach(() => {
  logs = mkdtempSync(join(tmpdir(), 'processes-'))
  processes = createProcesses({ cwd: logs, logs })
})

afterEach(async () => {
  await processes.stopAll({ grace: 0 })
  rmSync(logs, { recursive: true })
})

/** A server on a port of the system's choosing would not tell us which; so a port is taken and given back first. */
async function freePort(): Promise<number> {
  const probe = createServer()
  await new Promise<void>(resolve => probe.listen(0, '127.0.0.1', resolve))
  const { port } = probe.address() as AddressInfo
  await new Promise(resolve => probe.close(resolve))
  return port
}

const serving = (port: number, more = ''): string[] => ['-e', `require('http').createServer((q, r) => r.end('ok')).listen(${port}, '127.0.0.1');${more}`]

describe('the programs of a run', () => {
  it('reports a failed program by name with the end of what it printed', async () => {
    await expect(processes.must('painter', node, ['-e', 'console.error("no more blue"); process.exit(3)'])).rejects.toThrow(/painter ended with code 3[\s\S]*no more blue/)
  })

  it('reports a program that cannot be found', async () => {
    await expect(processes.must('painter', '/nowhere/painter', [])).rejects.toThrow(/painter[\s\S]*ENOENT/)
  })

  it('waits until a server answers, and ends it on request', async () => {
    const port = await freePort()
    const program = await processes.serve('server', node, serving(port), { url: `http://127.0.0.1:${port}/` })
    expect(await processes.stop(program)).toBe(true)
    expect(beganAt(program.child.pid ?? 0)).toBeNull()
  })

  it('says which server died before it answered', async () => {
    await expect(processes.serve('mail catcher', node, ['-e', 'console.log("address in use"); process.exit(1)'], { url: 'http://127.0.0.1:9/' }))
      .rejects.toThrow(/mail catcher ended with code 1[\s\S]*address in use/)
  })

  it('tells of a server that dies later, but not of one that was asked to end', async () => {
    const crashes: string[] = []
    const onCrash = (message: string): void => void crashes.push(message)
    const [first, second] = [await freePort(), await freePort()]
    const asked = await processes.serve('server', node, serving(first), { url: `http://127.0.0.1:${first}/`, onCrash })
    await processes.stop(asked)
    const crashing = await processes.serve('record', node, serving(second), { url: `http://127.0.0.1:${second}/`, onCrash })
    process.kill(crashing.child.pid ?? 0, 'SIGKILL')
    await crashing.ended
    expect(crashes).toHaveLength(1)
    expect(crashes[0]).toContain('The record was ended by SIGKILL')
  })

  it('kills a server that does not end in time', async () => {
    const port = await freePort()
    const deaf = await processes.serve('server', node, serving(port, 'process.on("SIGTERM", () => {})'), { url: `http://127.0.0.1:${port}/` })
    expect(await processes.stop(deaf, { grace: 200 })).toBe(false)
    expect(beganAt(deaf.child.pid ?? 0)).toBeNull()
  })

  it('starts nothing more once it is stopping', async () => {
    await processes.stopAll()
    await expect(processes.run('late', node, ['-e', ''])).rejects.toThrow('Stopped')
  })
})
