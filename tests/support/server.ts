import { spawn } from 'node:child_process'
import type { ChildProcess } from 'node:child_process'
import { randomBytes } from 'node:crypto'
import { createServer } from 'node:net'
import { join } from 'node:path'
import { fileURLToPath } from 'node:url'
import type { TestDatabase } from './database'
import { testSetting } from './database'

export interface TestServer {
  origin: string
  /** What it wrote so far: its log lines. */
  output: () => string
  /** The exit code once it ended, null while it runs. */
  exitCode: () => number | null
  /** Asks it to end and waits. @returns the exit code */
  stop: (signal?: 'SIGTERM' | 'SIGKILL') => Promise<number | null>
}

const root = join(fileURLToPath(import.meta.url), '..', '..', '..')
const startWithinMs = 30_000

/** Starts the built server beside the tests, on a port of its own and on this database. @throws Error where it does not come up */
export async function startTestServer(database: TestDatabase, more: Record<string, string> = {}): Promise<TestServer> {
  const server = await spawnTestServer(database, more)
  const deadline = Date.now() + startWithinMs
  while (Date.now() < deadline && server.exitCode() === null) {
    const answer = await fetch(`${server.origin}/readyz`).catch(() => null)
    if (answer?.ok) return server
    await new Promise(resolve => setTimeout(resolve, 100))
  }
  const said = server.output()
  await server.stop('SIGKILL')
  throw new Error(`The server did not come up:\n${said}`)
}

/** Starts it without waiting for it to be ready, for tests of the start itself. */
export async function spawnTestServer(database: TestDatabase, more: Record<string, string> = {}): Promise<TestServer> {
  const port = await freePort()
  const origin = `http://127.0.0.1:${port}`
  const child = spawn(process.execPath, [join(testSetting('WHEREFORE_TEST_SERVER_DIR'), 'server', 'index.mjs')], {
    cwd: root,
    stdio: ['ignore', 'pipe', 'pipe'],
    env: {
      PATH: process.env.PATH,
      TZ: 'UTC',
      NODE_ENV: 'production',
      HOST: '127.0.0.1',
      PORT: String(port),
      NUXT_ORIGIN: origin,
      NUXT_AUTH_SECRET: randomBytes(48).toString('base64url'),
      NUXT_DATABASE_URL: database.appUrl,
      NUXT_WORKER_DATABASE_URL: database.workerUrl,
      NUXT_DEMO: 'on',
      NUXT_EHR_BASE_URL: process.env.WHEREFORE_TEST_FHIR_URL ?? 'http://127.0.0.1:9/fhir',
      NUXT_SMTP_HOST: '127.0.0.1',
      NUXT_SMTP_PORT: process.env.WHEREFORE_TEST_SMTP_PORT ?? '9',
      NUXT_SMTP_TLS: 'off',
      NUXT_SMTP_FROM: 'Northshore Imaging <imaging@northshore.example>',
      ...more,
    },
  })
  return watch(child, more.NUXT_ORIGIN ?? origin)
}

function watch(child: ChildProcess, origin: string): TestServer {
  let said = ''
  child.stdout?.on('data', (data: Buffer) => (said += data.toString()))
  child.stderr?.on('data', (data: Buffer) => (said += data.toString()))
  const ended = new Promise<number | null>(resolve => child.once('exit', resolve))
  return {
    origin,
    output: () => said,
    exitCode: () => child.exitCode,
    stop: (signal = 'SIGTERM') => {
      if (child.exitCode === null) child.kill(signal)
      return ended
    },
  }
}

function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const probe = createServer()
    probe.once('error', reject)
    probe.listen(0, '127.0.0.1', () => {
      const address = probe.address()
      probe.close(() => typeof address === 'object' && address ? resolve(address.port) : reject(new Error('No free port.')))
    })
  })
}
