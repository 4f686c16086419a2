import { sql } from 'drizzle-orm'
import type { Database } from '#server/database/client'

/** Jobs and what each is told. Ids only: a job re-reads the rows, so that it never acts on old news. */
export interface JobPayloads {
  'deliver-letter': { letterId: string }
  'deliver-invitation': { invitationId: string }
  'notify-clinician': { requestId: string, event: 'query' | 'answer' | 'decision' | 'reopened' }
}
export type JobName = keyof JobPayloads

/** Adds a job in the caller's transaction: it exists only if the change does. `key` makes a repeat replace the earlier one. */
export async function enqueue<Name extends JobName>(
  tx: Database,
  name: Name,
  payload: JobPayloads[Name],
  options: { runAt?: Date, key?: string } = {},
): Promise<void> {
  await tx.execute(sql`select wherefore_queue.enqueue(
    ${name}, ${JSON.stringify(payload)}::json, ${(options.runAt ?? new Date(0)).toISOString()}::timestamptz, ${options.key ?? null})`)
}
