import pg from 'pg'

/**
 * Connections of the job queue, as the role that owns it: one to listen, the others for jobs. No limit on a statement's time, since
 * listening is one that never ends.
 */
export function openWorkerPool(url: string, onError: (error: Error) => void): pg.Pool {
  const pool = new pg.Pool({ connectionString: url, max: 6, connectionTimeoutMillis: 5_000, application_name: 'wherefore-queue' })
  // Without listeners a lost connection ends the process.
  pool.on('error', onError)
  pool.on('connect', client => client.on('error', onError))
  return pool
}
