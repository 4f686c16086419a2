import { createServer } from 'node:net'
import type { Socket } from 'node:net'

/** How a mail server answers one step: the reply line, or silence for ever. */
export type Reply = string | 'silence'

export interface Script {
  greeting?: Reply
  /** To `RCPT TO`; the address is as the client gave it. */
  recipient?: (address: string) => Reply
  /** After the message itself, before it counts as taken. */
  message?: Reply
}

export interface ScriptedSmtp {
  port: number
  /** Addresses whose message was taken, in order, with the message as sent. */
  taken: { to: string, source: string }[]
  connections: () => number
  follow: (script: Script) => void
  close: () => Promise<void>
}

/** A mail server on loopback that behaves as badly as it is told; without a script it takes everything. */
export async function startScriptedSmtp(): Promise<ScriptedSmtp> {
  const taken: ScriptedSmtp['taken'] = []
  const sockets = new Set<Socket>()
  let script: Script = {}
  let connections = 0

  const server = createServer((socket) => {
    connections += 1
    sockets.add(socket)
    socket.on('close', () => sockets.delete(socket))
    socket.on('error', () => undefined)
    const reply = (line: Reply) => line !== 'silence' && socket.writable && socket.write(`${line}\r\n`)
    let [to, source, reading, buffer] = ['', '', false, '']

    function step(line: string): void {
      if (reading) {
        if (line !== '.') return void (source += `${line}\n`)
        reading = false
        const answer = script.message ?? '250 2.0.0 taken'
        if (answer.startsWith('250')) taken.push({ to, source })
        return void reply(answer)
      }
      const command = line.slice(0, 4).toUpperCase()
      if (command === 'RCPT') {
        to = /<([^>]*)>/.exec(line)?.[1] ?? ''
        reply(script.recipient?.(to) ?? '250 2.1.5 ok')
      }
      else if (command === 'DATA') {
        source = ''
        reading = true
        reply('354 go on')
      }
      else if (command === 'QUIT') {
        socket.end('221 2.0.0 bye\r\n')
      }
      else {
        reply('250 ok')
      }
    }

    socket.on('data', (data) => {
      buffer += data.toString()
      for (let end = buffer.indexOf('\r\n'); end !== -1; end = buffer.indexOf('\r\n')) {
        const line = buffer.slice(0, end)
        buffer = buffer.slice(end + 2)
        step(line)
      }
    })
    reply(script.greeting ?? '220 scripted.example ESMTP')
  })
  await new Promise<void>(resolve => server.listen(0, '127.0.0.1', resolve))
  const address = server.address()
  if (typeof address !== 'object' || !address) throw new Error('no port')
  return {
    port: address.port,
    taken,
    connections: () => connections,
    follow: (next) => {
      script = next
    },
    close: async () => {
      for (const socket of sockets) socket.destroy()
      await new Promise(resolve => server.close(resolve))
    },
  }
}
