import { openWorkerPool } from '#server/database/worker-pool'
import { startWorker } from '#server/jobs/worker'
import { createMailer } from '#server/mail/transport'
import { useApp } from '#server/utils/app'
import { log } from '#server/utils/log'
import { whenReady } from '#server/utils/readiness'

/** How long to wait before a worker that ended, for instance because the database went away, is started again. */
const restartAfterMs = 5_000

/**
 * Runs the job queue beside the web server, from the moment the database is ready until the process ends. A queue that stops by
 * itself is started again; decisions are never held up by it.
 */
export default defineNitroPlugin((nitroApp) => {
  const closing = new AbortController()
  // Later plugins say what starting means; only then can it be waited for.
  const ended = new Promise<void>((resolve) => {
    setImmediate(() => {
      whenReady().then(() => keepRunning(closing.signal)).catch((error: unknown) => {
        if (!closing.signal.aborted) log.error({ err: error instanceof Error ? error.message : 'unknown' }, 'job queue did not start')
      }).finally(resolve)
    })
  })
  nitroApp.hooks.hook('close', async () => {
    closing.abort()
    await ended
  })
})

async function keepRunning(signal: AbortSignal): Promise<void> {
  const { config, db, ehr } = useApp()
  const mailer = createMailer({ ...config.smtp })
  try {
    while (!signal.aborted) {
      await runOnce(config.workerDatabaseUrl, { db, ehr, mail: { mailer, origin: config.origin } }, signal)
      if (!signal.aborted) await wait(restartAfterMs, signal)
    }
  }
  finally {
    mailer.close()
  }
}

async function runOnce(url: string, tools: Parameters<typeof startWorker>[0]['tools'], signal: AbortSignal): Promise<void> {
  const pool = openWorkerPool(url, error => log.error({ err: error.message }, 'job queue connection lost'))
  try {
    const runner = await startWorker({ pool, tools })
    const stop = () => void runner.stop().catch((error: unknown) => log.warn({ err: error instanceof Error ? error.message : 'unknown' }, 'job queue did not stop cleanly'))
    if (signal.aborted) stop()
    else signal.addEventListener('abort', stop, { once: true })
    log.info({}, 'job queue runs')
    try {
      await runner.promise
    }
    finally {
      signal.removeEventListener('abort', stop)
    }
  }
  catch (error) {
    if (!signal.aborted) log.error({ err: error instanceof Error ? error.message : 'unknown' }, 'job queue stopped')
  }
  finally {
    await pool.end()
  }
}

function wait(ms: number, signal: AbortSignal): Promise<void> {
  return new Promise((resolve) => {
    const timer = setTimeout(resolve, ms)
    signal.addEventListener('abort', () => {
      clearTimeout(timer)
      resolve()
    }, { once: true })
  })
}
