import { drizzle } from 'drizzle-orm/node-postgres'
import { migrate as applyMigrations } from 'drizzle-orm/node-postgres/migrator'
import { runMigrations } from 'graphile-worker'
import pg from 'pg'

/** Any fixed number: one migration at a time, however many servers start together. */
const migrationLock = 7_305_118

/**
 * Brings a database up to date: the tables as their owner, then the job queue as the worker that owns it. Safe to call from
 * several processes at once; a second caller waits and finds nothing to do.
 *
 * @param {{ ownerUrl: string, workerUrl: string, dir: string }} options
 *   `dir` is the folder of generated migrations.
 */
export async function migrate({ ownerUrl, workerUrl, dir }) {
  const client = new pg.Client({ connectionString: ownerUrl })
  await client.connect()
  try {
    await client.query('select pg_advisory_lock($1)', [migrationLock])
    await client.query('set lock_timeout = \'5s\'')
    await applyMigrations(drizzle(client), { migrationsFolder: dir })
    // Each server reads how far the database is, to say whether it is ready.
    await client.query('grant usage on schema drizzle to wherefore_app; grant select on drizzle.__drizzle_migrations to wherefore_app')
    await prepareQueue(workerUrl)
  }
  finally {
    await client.end()
  }
}

/** The app role may add jobs but not read or change them: it calls a function that runs as the queue's owner. */
async function prepareQueue(workerUrl) {
  await runMigrations({ connectionString: workerUrl })
  const client = new pg.Client({ connectionString: workerUrl })
  await client.connect()
  try {
    await client.query(`
      create schema if not exists wherefore_queue;
      create or replace function wherefore_queue.enqueue(task text, payload json, run_at timestamptz, job_key text)
      returns void language sql security definer set search_path = pg_catalog, graphile_worker as $$
        select graphile_worker.add_job(task, payload, run_at => run_at, job_key => job_key, max_attempts => 24)
      $$;
      create or replace function wherefore_queue.health()
      returns table (waiting bigint, failing bigint, dead bigint, oldest timestamptz)
      language sql stable security definer set search_path = pg_catalog, graphile_worker as $$
        select count(*) filter (where attempts = 0), count(*) filter (where attempts > 0 and attempts < max_attempts),
               count(*) filter (where attempts >= max_attempts), min(run_at) filter (where attempts < max_attempts)
        from graphile_worker.jobs
      $$;
      revoke all on schema wherefore_queue from public;
      revoke all on all functions in schema wherefore_queue from public;
      grant usage on schema wherefore_queue to wherefore_app;
      grant execute on all functions in schema wherefore_queue to wherefore_app;
    `)
  }
  finally {
    await client.end()
  }
}
