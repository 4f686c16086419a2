import pg from 'pg'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { createTestDatabase } from '../../support/database'
import type { TestDatabase } from '../../support/database'

let database: TestDatabase
let client: pg.Client

beforeAll(async () => {
  database = await createTestDatabase()
  client = new pg.Client({ connectionString: database.appUrl })
  await client.connect()
  // Empty tables are read whole, whatever their indexes; this asks which index would serve.
  await client.query('set enable_seqscan = off; set enable_bitmapscan = off')
})
afterAll(async () => {
  await client.end()
  await database.drop()
})

async function planOf(query: string): Promise<string> {
  const { rows } = await client.query<{ 'QUERY PLAN': string }>(`explain ${query}`)
  return rows.map(row => row['QUERY PLAN']).join('\n')
}

const one = '\'00000000-0000-4000-8000-000000000001\''

/** A list that grows without end must come out of its index in order: sorting would touch every row of it for each page. */
describe('a page of a growing list', () => {
  it.each([
    ['a practice\'s requests', `select id from requests where state <> 'discarded' and practice_id = ${one} order by updated_at desc, id desc limit 51`, 'requests_practice_idx'],
    ['the department\'s requests', 'select id from requests where state <> \'discarded\' and state <> \'draft\' order by updated_at desc, id desc limit 51', 'requests_changed_idx'],
    ['what one person did', `select id from audit_events where actor_id = ${one} order by id desc limit 51`, 'audit_events'],
    ['what happened to one request', 'select id from audit_events where reference = \'WF-26-000001\' order by id desc limit 51', 'audit_events'],
    ['letters that failed', 'select id from letters where state = \'failed\' order by queued_at desc, id desc limit 200', 'letters_failed_idx'],
  ])('comes in order from an index: %s', async (_list, query, index) => {
    const plan = await planOf(query)
    expect(plan).toContain(index)
    expect(plan).not.toContain('Sort')
  })
})
