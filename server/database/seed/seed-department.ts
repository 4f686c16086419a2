import { hash } from '@node-rs/argon2'
import { eq, sql } from 'drizzle-orm'
import { starterQuestions } from '../../../shared/domain/guidance/questions'
import { starterPolicy } from '../../../shared/domain/policy/defaults'
import { policySchema } from '../../../shared/schemas/policy'
import type { Database } from '../client'
import { memberships, practices, users } from '../schema/people'
import { guidanceVersions, policyVersions, scanners } from '../schema/rules'
import { installation } from '../schema/trail'
import { demoPassPhrase, demoPractices, demoUsers } from './demo-users.mjs'

/** Any fixed number: two seeds started at once take turns. */
const seedLock = 7_305_310
const mark = 'demo-department'

const demoScanners = [
  { name: 'MR 1', place: 'Harbor Road, ground floor', fieldStrengthTesla: '3', ivHours: 'Every day, 7:00 to 20:00' },
  { name: 'MR 2', place: 'Harbor Road, ground floor', fieldStrengthTesla: '1.5', ivHours: 'Monday to Friday, 8:00 to 17:00' },
  { name: 'MR 3', place: 'Lakeside annex', fieldStrengthTesla: '1.5', ivHours: 'Monday to Thursday, 9:00 to 15:00' },
]

/** In force well before any demonstration request. */
const inForceSinceDays = 400

/**
 * Makes the invented department Northshore Imaging: practices, people, scanners, starter guidance and policy. Once only: the
 * table `installation` remembers it.
 *
 * @returns whether it was made now
 */
export async function seedDepartment(db: Database): Promise<boolean> {
  // One hash for all: they share one pass phrase, which is printed anyway.
  const passwordHash = await hash(demoPassPhrase, { memoryCost: 19_456, timeCost: 2, parallelism: 1 })
  return await db.transaction(async (tx) => {
    await tx.execute(sql`select pg_advisory_xact_lock(${seedLock})`)
    const [made] = await tx.select({ key: installation.key }).from(installation).where(eq(installation.key, mark))
    if (made) return false

    const rows = await tx.insert(practices).values([...demoPractices]).returning({ id: practices.id, name: practices.name })
    const practiceIds = new Map(rows.map(row => [row.name, row.id]))
    for (const { practices: belongsTo, does: _does, ...person } of demoUsers) {
      const [user] = await tx.insert(users).values({ ...person, passwordHash, demo: true }).returning({ id: users.id })
      const own = belongsTo.map(name => practiceIds.get(name)).filter(id => id !== undefined)
      if (user && own.length > 0) await tx.insert(memberships).values(own.map(practiceId => ({ userId: user.id, practiceId })))
    }
    await tx.insert(scanners).values(demoScanners.map((scanner, index) => ({ ...scanner, position: index + 1 })))

    const signedBy = demoUsers.find(person => person.guidanceLead)?.name ?? 'Northshore Imaging'
    const effectiveFrom = sql`now() - make_interval(days => ${inForceSinceDays})`
    await tx.insert(guidanceVersions).values({
      label: starterPolicy.version, content: { version: starterPolicy.version, questions: starterQuestions }, signedBy, effectiveFrom,
    })
    await tx.insert(policyVersions).values({ label: starterPolicy.version, content: policySchema.parse(starterPolicy), signedBy, effectiveFrom })
    await tx.insert(installation).values({ key: mark, value: { users: demoUsers.length, practices: demoPractices.length } })
    return true
  })
}
