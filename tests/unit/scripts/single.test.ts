import { spawn } from 'node:child_process'
import { existsSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { beganAt, stillRuns } from '../../../scripts/lib/identity.mjs'
import { claim } from '../../../scripts/lib/single.mjs'

let dir = ''
let file = ''

beforeEach(() => {
  dir = mkdtempSync(join(tmpdir(), 'single-'))
  file = join(dir, 'running.json')
})

afterEach(() => rmSync(dir, { recursive: true }))

describe('one run in a folder at a time', () => {
  it('refuses a second run and names the address of the first', async () => {
    const first = await claim({ file, what: 'Wherefore' })
    first.note({ address: 'http://127.0.0.1:3900' })
    await expect(claim({ file, what: 'Wherefore' })).rejects.toThrow(/already runs in this folder at http:\/\/127\.0\.0\.1:3900/)
    first.release()
    expect(existsSync(file)).toBe(false)
    await claim({ file, what: 'Wherefore' })
  })

  it('takes over from a run that is gone, also when its process number is used again', async () => {
    writeFileSync(file, JSON.stringify({ pid: process.pid, began: 'long ago', address: null, programs: [] }))
    await expect(claim({ file, what: 'Wherefore' })).resolves.toBeDefined()
  })

  it('takes over from a record that nobody finished writing', async () => {
    writeFileSync(file, '{"pid":')
    await expect(claim({ file, what: 'Wherefore' })).resolves.toBeDefined()
  })

  it('ends what a killed run left behind, and only that', async () => {
    const sleeper = (): ReturnType<typeof spawn> => spawn(process.execPath, ['-e', 'setInterval(() => {}, 1000)'], { detached: true, stdio: 'ignore' })
    const [left, stranger] = [sleeper(), sleeper()]
    const gone = new Promise(resolve => left.once('exit', resolve))
    const leftBehind = { name: 'server', pid: left.pid ?? 0, began: beganAt(left.pid ?? 0) }
    const reused = { name: 'mail catcher', pid: stranger.pid ?? 0, began: 'before the restart' }
    writeFileSync(file, JSON.stringify({ pid: 1, began: 'long ago', address: null, programs: [leftBehind, reused] }))
    const said: string[] = []
    await claim({ file, what: 'Wherefore', say: text => said.push(text) })
    await gone
    expect(said).toEqual(['ending what an interrupted run left behind: server'])
    expect(stillRuns({ pid: stranger.pid ?? 0, began: beganAt(stranger.pid ?? 0) })).toBe(true)
    stranger.kill('SIGKILL')
  })
})
