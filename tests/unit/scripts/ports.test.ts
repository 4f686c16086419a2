import { createServer } from 'node:net'
import type { AddressInfo } from 'node:net'
import { describe, expect, it } from 'vitest'
import { isFree, pickPort } from '../../../scripts/lib/ports.mjs'

const only = (...free: number[]) => (port: number): Promise<boolean> => Promise.resolve(free.includes(port))

describe('choosing a port', () => {
  it('takes the preferred port when it is free', async () => {
    expect(await pickPort({ name: 'server', preferred: 3900, free: only(3900, 3901) })).toEqual({ port: 3900, moved: false })
  })

  it('passes over busy ports and says that it moved', async () => {
    expect(await pickPort({ name: 'server', preferred: 3900, free: only(3903) })).toEqual({ port: 3903, moved: true })
  })

  it('never gives one port to two parts of a run', async () => {
    const taken = new Set<number>()
    const first = await pickPort({ name: 'server', preferred: 3900, taken, free: only(3900, 3901) })
    const second = await pickPort({ name: 'mail catcher', preferred: 3900, taken, free: only(3900, 3901) })
    expect([first.port, second.port]).toEqual([3900, 3901])
  })

  it('names a busy port that was asked for instead of quietly taking another', async () => {
    await expect(pickPort({ name: 'server', preferred: 3900, asked: '4000', variable: 'WHEREFORE_PORT', free: only(3900) }))
      .rejects.toThrow('Port 4000 (WHEREFORE_PORT) for the server is in use')
  })

  it.each(['web', '80', '70000', '3900.5'])('refuses %s as a port', async (asked) => {
    await expect(pickPort({ name: 'server', preferred: 3900, asked, variable: 'WHEREFORE_PORT', free: only(3900) }))
      .rejects.toThrow(`WHEREFORE_PORT=${asked} is not a port`)
  })

  it('sees a listener of the machine', async () => {
    const listener = createServer()
    await new Promise<void>(resolve => listener.listen(0, '127.0.0.1', resolve))
    const { port } = listener.address() as AddressInfo
    expect(await isFree(port)).toBe(false)
    await new Promise(resolve => listener.close(resolve))
    expect(await isFree(port)).toBe(true)
  })
})
