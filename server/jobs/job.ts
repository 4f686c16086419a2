import type { Job as QueuedJob, JobHelpers, Task, WithPgClient } from 'graphile-worker'
import type { z } from 'zod'
import type { ServiceContext } from '#server/services/context'
import type { MailOut } from '#server/services/letter/deliver-letter'
import { MailFailure } from '#server/mail/transport'
import { log } from '#server/utils/log'

/** What a worker holds for its jobs. */
export interface JobTools extends Pick<ServiceContext, 'db' | 'ehr'> { mail: MailOut }

/** What one run of a job is told. */
export interface JobRun<Payload> {
  payload: Payload
  ctx: ServiceContext
  mail: MailOut
  /** Counts from 1. */
  attempt: number
  lastTry: boolean
  /** Aborts when the server stops and does not wait any longer. */
  signal: AbortSignal
  jobId: string
  /** The queue's own tables, as the role that owns them. */
  withQueue: WithPgClient
}

/** Says what became of it, in a word for the log. */
export type JobWork<Payload> = (run: JobRun<Payload>) => Promise<string>

/**
 * Makes a task of the queue. What it throws is kept in the queue's table and printed, so a cause that may hold anything (a
 * statement with its values, a mail server's answer) is put into neutral words first.
 */
export function defineJob<Schema extends z.ZodType>(name: string, schema: Schema, work: JobWork<z.output<Schema>>): (tools: JobTools) => Task {
  return tools => async (rawPayload, helpers) => {
    const { job } = helpers
    const facts = { job: name, jobId: String(job.id), attempt: job.attempts }
    try {
      const outcome = await work({
        payload: schema.parse(rawPayload),
        ctx: systemContext(tools, name, job),
        mail: tools.mail,
        attempt: job.attempts,
        lastTry: job.attempts >= job.max_attempts,
        signal: signalOf(helpers),
        jobId: String(job.id),
        withQueue: helpers.withPgClient,
      })
      log.info({ ...facts, outcome }, 'job done')
    }
    catch (error) {
      const reason = neutralReason(error)
      log.warn({ ...facts, reason }, 'job will be tried again')
      throw new Error(reason)
    }
  }
}

function signalOf(helpers: JobHelpers): AbortSignal {
  return helpers.abortSignal ?? new AbortController().signal
}

/** A job acts for nobody but the department itself. */
function systemContext({ db, ehr }: JobTools, name: string, job: QueuedJob): ServiceContext {
  return { db, ehr, actor: { kind: 'system', name: 'Wherefore' }, requestId: `${name}-${job.id}`, now: new Date(), idempotency: null, permitted: new Set() }
}

function neutralReason(error: unknown): string {
  if (error instanceof MailFailure) return error.message
  for (let current = error; current instanceof Error; current = current.cause) {
    if ('code' in current && typeof current.code === 'string' && /^[0-9A-Z_]{3,40}$/.test(current.code)) return `failed with ${current.code}`
  }
  return `failed with ${error instanceof Error ? error.name : 'an unknown error'}`
}
