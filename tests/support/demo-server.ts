import { openDatabase } from '#server/database/client'
import type { Database } from '#server/database/client'
import { demoPassPhrase } from '#server/database/seed/demo-users.mjs'
import { seedDepartment } from '#server/database/seed/seed-department'
import { createTestDatabase } from './database'
import type { TestDatabase } from './database'
import { startTestServer } from './server'
import type { TestServer } from './server'
import { createVisitor } from './visitor'
import type { Visitor } from './visitor'

/** The built server with the demonstration department behind it. */
export interface DemoServer {
  server: TestServer
  database: TestDatabase
  /** As the application works. */
  db: Database
  /** Somebody signed in with the shared pass phrase. */
  signedIn: (email: string) => Promise<Visitor>
  close: () => Promise<void>
}

export async function startDemoServer(more: Record<string, string> = {}): Promise<DemoServer> {
  const database = await createTestDatabase()
  const { db, pool } = openDatabase(database.appUrl, () => undefined)
  await seedDepartment(db)
  const server = await startTestServer(database, more)
  return {
    server,
    database,
    db,
    async signedIn(email) {
      const visitor = createVisitor(server.origin)
      const status = await visitor.signIn(email, demoPassPhrase)
      if (status !== 200) throw new Error(`${email} could not sign in: ${status}\n${server.output()}`)
      return visitor
    },
    async close() {
      await server.stop()
      await pool.end()
      await database.drop()
    },
  }
}
