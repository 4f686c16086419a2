import { randomBytes } from 'node:crypto'
import pg from 'pg'

export interface TestDatabase {
  /** As the server works: `wherefore_app`. */
  appUrl: string
  /** As the schema's owner: `wherefore_owner`. */
  ownerUrl: string
  /** As the job queue: `wherefore_worker`. */
  workerUrl: string
  /** Removes the database and cuts whatever is still connected to it. */
  drop: () => Promise<void>
}

/** A setting that `scripts/test.mjs` hands over. */
export function testSetting(name: string): string {
  const value = process.env[name]
  if (!value) throw new Error(`${name} is not set: run these tests with "npm run test:integration".`)
  return value
}

/**
 * Makes an empty, migrated database for one test file, as a copy of the template that `npm test` migrated once.
 *
 * @throws Error outside of `npm test`.
 */
export async function createTestDatabase(): Promise<TestDatabase> {
  const superuser = testSetting('WHEREFORE_TEST_SUPERUSER_URL')
  const template = testSetting('WHEREFORE_TEST_TEMPLATE')
  const name = `t_${randomBytes(8).toString('hex')}`
  await asSuperuser(superuser, [
    `create database ${name} template ${template} owner wherefore_owner`,
    // A copy carries tables and their grants, but not what the database itself grants.
    `revoke all on database ${name} from public`,
    `grant connect on database ${name} to wherefore_owner, wherefore_app, wherefore_worker`,
    `grant create on database ${name} to wherefore_worker`,
  ])
  const urlFor = (role: string): string => {
    const url = new URL(superuser)
    url.username = role
    url.pathname = `/${name}`
    return url.toString()
  }
  return {
    appUrl: urlFor('wherefore_app'),
    ownerUrl: urlFor('wherefore_owner'),
    workerUrl: urlFor('wherefore_worker'),
    drop: () => asSuperuser(superuser, [`drop database if exists ${name} with (force)`]),
  }
}

async function asSuperuser(url: string, statements: readonly string[]): Promise<void> {
  const client = new pg.Client({ connectionString: url })
  await client.connect()
  try {
    for (const statement of statements) await client.query(statement)
  }
  finally {
    await client.end()
  }
}
