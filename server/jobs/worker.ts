import { Logger, run } from 'graphile-worker'
import type { Runner, RunnerOptions, TaskList } from 'graphile-worker'
import { log } from '#server/utils/log'
import deliverInvitation from './deliver-invitation'
import deliverLetter from './deliver-letter'
import eraseExpired from './erase-expired'
import type { JobTools } from './job'
import notifyClinician from './notify-clinician'
import type { JobName } from './queue'
import sealAudit from './seal-audit'
import tendQueue from './tend-queue'

/** Few at once: the mail server sets the pace, and people at their screens come first. */
const concurrency = 4

/** Once per cluster, however many servers run; times in UTC. */
const crontab = `
* * * * * tend-queue
*/15 * * * * erase-expired
10 1 * * * seal-audit
`

function taskList(tools: JobTools): TaskList {
  const queued = {
    'deliver-letter': deliverLetter(tools),
    'deliver-invitation': deliverInvitation(tools),
    'notify-clinician': notifyClinician(tools),
  } satisfies Record<JobName, TaskList[string]>
  return { ...queued, 'seal-audit': sealAudit(tools), 'erase-expired': eraseExpired(tools), 'tend-queue': tendQueue(tools) }
}

/** The queue's own lines, from warnings on, but those on a job: each job writes its own, without a stack. */
const logger = new Logger(() => (level, message, meta) => {
  if (meta && 'job' in meta) return
  if (level === 'error') log.error({ queue: message }, 'job queue')
  else if (level === 'warning') log.warn({ queue: message }, 'job queue')
})

/**
 * Runs the queue's jobs in this process until stopped. On stopping, running jobs get five seconds, are then told to end, and are
 * taken up again elsewhere.
 *
 * @param pool connects as the role that owns the queue.
 */
export async function startWorker({ pool, tools }: { pool: NonNullable<RunnerOptions['pgPool']>, tools: JobTools }): Promise<Runner> {
  return await run({
    pgPool: pool,
    taskList: taskList(tools),
    crontab,
    concurrency,
    logger,
    noHandleSignals: true,
    gracefulShutdownAbortTimeout: 5_000,
    // Batched even if by one: only so does stopping wait for the last results to be written, and a lost database end the worker
    // instead of the process.
    preset: { worker: { completeJobBatchDelay: 0, failJobBatchDelay: 0 } },
  })
}
