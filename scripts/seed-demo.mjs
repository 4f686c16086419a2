/**
 * Fills an empty, migrated database with the demonstration department; one that has it already is left alone. Runs from the
 * sources, without a build.
 *
 *   NUXT_DEMO=on NUXT_DATABASE_URL=postgres://… [NUXT_EHR_BASE_URL=http://…] node scripts/seed-demo.mjs
 *
 * With the address of the fake record its people also ask for, decide and book exams, through the product's own steps.
 *
 * Prints one line on what was done, then the demo sign-ins.
 */
import { join } from 'node:path'
import pg from 'pg'
import { describeSignIns, demoUsers } from '../server/database/seed/demo-users.mjs'
import { loadSources } from './lib/load-sources.mjs'
import { root } from './lib/paths.mjs'

const url = process.env.NUXT_DATABASE_URL
if (!url || process.env.NUXT_DEMO !== 'on') {
  console.error('NUXT_DATABASE_URL must name the database, and NUXT_DEMO must be "on": demo accounts share one published pass phrase.')
  process.exit(1)
}

if (await isSeeded(url)) {
  console.log(`there already\n${describeSignIns()}`)
  process.exit(0)
}

const sources = await loadSources()
let handle = null
try {
  const { openDatabase } = await sources.load(join(root, 'server', 'database', 'client.ts'))
  const { seedDepartment } = await sources.load(join(root, 'server', 'database', 'seed', 'seed-department.ts'))
  handle = openDatabase(url, (error) => console.error(error.message))
  const made = await seedDepartment(handle.db)
  const requests = process.env.NUXT_EHR_BASE_URL ? await seedExams(handle) : 0
  console.log([made ? `made: Northshore Imaging with ${demoUsers.length} people` : 'there already', requests > 0 ? `${requests} requests` : ''].filter(Boolean).join(', '))
  console.log(describeSignIns())
} finally {
  await handle?.pool.end()
  await sources.close()
}

/** Lets the demo people work: needs the fake record, since every request reads it. */
async function seedExams({ db, pool }) {
  const { registerPool } = await sources.load(join(root, 'server', 'services', 'transaction.ts'))
  const { createEhrClient } = await sources.load(join(root, 'server', 'ehr', 'client.ts'))
  const { parseEhrSettings } = await sources.load(join(root, 'server', 'ehr', 'settings.ts'))
  const { seedRequests } = await sources.load(join(root, 'server', 'database', 'seed', 'seed-requests.ts'))
  registerPool(db, pool)
  return await seedRequests(db, createEhrClient(parseEhrSettings({ baseUrl: process.env.NUXT_EHR_BASE_URL })))
}

/** Asked of the database directly, so that a later start need not load the product's sources. */
async function isSeeded(connectionString) {
  const client = new pg.Client({ connectionString })
  await client.connect()
  try {
    const wanted = process.env.NUXT_EHR_BASE_URL ? ['demo-department', 'demo-requests'] : ['demo-department']
    const { rows } = await client.query('select key from installation where key = any ($1)', [wanted])
    return rows.length === wanted.length
  } finally {
    await client.end()
  }
}
