import { randomUUID } from 'node:crypto'
import { starterQuestions } from '#shared/domain/guidance/questions'
import { starterPolicy } from '#shared/domain/policy/defaults'
import type { Actor, Role } from '#shared/domain/access/roles'
import type { RequestForm } from '#shared/domain/request/form'
import { emptyScreening } from '#shared/domain/safety/screening'
import { openDatabase } from '#server/database/client'
import type { Database } from '#server/database/client'
import { memberships, practices, users } from '#server/database/schema/people'
import { patients, requests } from '#server/database/schema/requests'
import { guidanceVersions, policyVersions, scanners } from '#server/database/schema/rules'
import type { EhrClient } from '#server/ehr/client'
import type { ServiceContext } from '#server/services/context'
import { registerPool } from '#server/services/transaction'
import { createTestDatabase } from './database'
import type { TestDatabase } from './database'

/** A department in a database of its own, with one person of each role, for tests of services. */
export interface TestDepartment {
  db: Database
  /** The addresses of its database, for those who connect by themselves. */
  database: TestDatabase
  ownPractice: string
  otherPractice: string
  people: Record<Role | 'colleague' | 'preparer' | 'stranger' | 'secondRadiologist', Actor>
  scanner: string
  /** A context for one call by one person; `now` is the clock unless given. */
  as: (actor: Actor, options?: { now?: Date, key?: string, ehr?: EhrClient | null }) => ServiceContext
  makePatient: (facts?: Partial<typeof patients.$inferInsert>) => Promise<string>
  makeDraft: (facts?: { patientId?: string, form?: Partial<RequestForm>, practiceId?: string, preparedBy?: Actor }) => Promise<string>
  close: () => Promise<void>
}

/** Every safety question answered with no. */
export const answeredScreening: RequestForm['screening'] = {
  ...emptyScreening,
  kidneyDisease: 'no', kidneyRiskFactor: 'no', dialysis: 'none', acuteIllness: 'no', liverDisease: 'no', earlierReaction: 'no', asthma: 'no',
  pregnancy: 'no', breastfeeding: 'no', nephrogenicSystemicFibrosis: 'no', implants: 'no',
}

/** A form ready to be sent: first seizure with a cancer history, which asks for contrast. */
export const readyForm: RequestForm = {
  region: 'brain',
  questionId: 'first-seizure-adult',
  answers: { tumorInfection: 'yes' },
  priority: 'urgent',
  setting: 'outpatient',
  history: 'Single generalized seizure, witnessed. Breast cancer treated in 2021.',
  wish: null,
  weightKg: 74,
  heightCm: 168,
  screening: answeredScreening,
  typedReadings: [],
  screeningConfirmed: true,
  contactNumber: '555 0199',
  detailsByEmail: null,
  patientEmail: null,
}

/** A creatinine typed in by the clinician, mg/dL, collected some days ago. */
export function typedCreatinine(value: number, daysAgo: number, now = new Date()): RequestForm['typedReadings'][number] {
  return {
    id: `typed-${randomUUID()}`, analyte: 'creatinine', source: 'typed', sourceLabel: 'Harbor Laboratory', value, comparator: null, unit: 'mg/dL',
    collectedAt: new Date(now.getTime() - daysAgo * 86_400_000).toISOString(), collectedText: null, precision: 'instant', issuedAt: null, status: 'final', refusal: null,
  }
}

export async function createTestDepartment(): Promise<TestDepartment> {
  const database = await createTestDatabase()
  const { db, pool } = openDatabase(database.appUrl, () => undefined)
  registerPool(db, pool)
  const long = new Date('2020-01-01T00:00:00Z')
  const [own, other] = await db.insert(practices).values([{ name: 'Own Practice' }, { name: 'Other Practice' }]).returning()
  const [scanner] = await db.insert(scanners).values({ name: 'Scanner 1', place: 'Level 1', fieldStrengthTesla: '1.5', ivHours: 'weekdays', position: 1 }).returning()
  await db.insert(guidanceVersions).values({ label: 'test', content: { version: 'test', questions: [...starterQuestions] }, signedBy: 'Test', effectiveFrom: long })
  await db.insert(policyVersions).values({ label: 'test', content: starterPolicy, signedBy: 'Test', effectiveFrom: long })
  if (!own || !other || !scanner) throw new Error('the test department was not made')

  const person = async (name: string, role: Role, maySign: boolean, practiceIds: string[] = []): Promise<Actor> => {
    const [user] = await db.insert(users).values({ name, email: `${randomUUID()}@example.org`, role, maySign }).returning()
    if (!user) throw new Error('the user was not made')
    for (const practiceId of practiceIds) await db.insert(memberships).values({ userId: user.id, practiceId })
    return { userId: user.id, name, role, maySign, guidanceLead: false, practiceIds }
  }
  const people = {
    orderer: await person('Dr Orderer', 'orderer', true, [own.id]),
    colleague: await person('Dr Colleague', 'orderer', true, [own.id]),
    preparer: await person('Pat Preparer', 'orderer', false, [own.id]),
    stranger: await person('Dr Stranger', 'orderer', true, [other.id]),
    radiologist: await person('Dr Radiologist', 'radiologist', true),
    secondRadiologist: await person('Dr Second', 'radiologist', true),
    scheduler: await person('Sam Scheduler', 'scheduler', false),
    administrator: await person('Alex Administrator', 'administrator', false),
  }

  const makePatient: TestDepartment['makePatient'] = async (facts = {}) => {
    const [row] = await db.insert(patients).values({
      ehrId: randomUUID(), recordNumber: '40-2217', familyName: 'Lindqvist', givenName: 'Marta', displayName: 'Marta Lindqvist', birthDate: '1965-03-14',
      sex: 'female', email: 'marta@example.org', phone: '555 0100', readAt: new Date(), ...facts,
    }).returning({ id: patients.id })
    if (!row) throw new Error('the patient was not made')
    return row.id
  }
  return {
    db,
    database,
    ownPractice: own.id,
    otherPractice: other.id,
    people,
    scanner: scanner.id,
    as: (actor, { now = new Date(), key, ehr = null } = {}) => ({
      db, ehr, actor: { kind: 'user', ...actor }, requestId: randomUUID(), now, permitted: new Set(),
      idempotency: key ? { userId: actor.userId, route: 'TEST', key, fingerprint: 'same' } : null,
    }),
    makePatient,
    makeDraft: async ({ patientId, form = {}, practiceId = own.id, preparedBy = people.orderer } = {}) => {
      const [row] = await db.insert(requests).values({
        practiceId, patientId: patientId ?? await makePatient(), preparedById: preparedBy.userId, form: { ...readyForm, ...form },
      }).returning({ id: requests.id })
      if (!row) throw new Error('the draft was not made')
      return row.id
    },
    close: async () => {
      await pool.end()
      await database.drop()
    },
  }
}
