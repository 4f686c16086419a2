import { z } from 'zod'
import { giveUpLetter } from '#server/services/letter/deliver-letter'
import { defineJob } from './job'
import type { JobRun } from './job'

/** No job runs longer: a send ends after one minute. Whoever holds one beyond this is gone. */
const lostAfterMinutes = 3

const deadLetters = z.array(z.object({ id: z.string(), letterId: z.uuid() }))

/**
 * Puts right what a server that was cut off leaves behind: gives the jobs it held to others, and lets no letter whose tries are
 * used up stay "queued" for ever.
 */
export default defineJob('tend-queue', z.unknown(), async (run) => {
  const freed = await freeLostJobs(run)
  const ended = await endDeadLetters(run)
  return `${freed} freed, ${ended} given up`
})

/** One by one: the queue's own function would take every job from a server of which only one was lost. */
async function freeLostJobs({ withQueue }: JobRun<unknown>): Promise<number> {
  const { rowCount } = await withQueue(client => client.query(
    'update graphile_worker._private_jobs set locked_at = null, locked_by = null where locked_at < now() - make_interval(mins => $1)', [lostAfterMinutes]))
  return rowCount ?? 0
}

async function endDeadLetters({ withQueue, ctx }: JobRun<unknown>): Promise<number> {
  const dead = await withQueue(async (client) => {
    const { rows } = await client.query(`
      select j.id::text as id, p.payload ->> 'letterId' as "letterId"
      from graphile_worker.jobs j join graphile_worker._private_jobs p on p.id = j.id
      where j.task_identifier = 'deliver-letter' and j.attempts >= j.max_attempts and j.locked_at is null
      limit 100`)
    return deadLetters.parse(rows)
  })
  for (const { id, letterId } of dead) {
    await giveUpLetter({ ctx, input: { letterId } })
    await withQueue(client => client.query('select graphile_worker.complete_jobs($1::bigint[])', [[id]]))
  }
  return dead.length
}
