import { and, asc, eq, sql } from 'drizzle-orm'
import { randomUUID } from 'node:crypto'
import type { Actor } from '../../../shared/domain/access/roles'
import type { RequestForm } from '../../../shared/domain/request/form'
import type { WriteResult } from '../../../shared/types/views'
import type { EhrClient } from '../../ehr/client'
import type { ServiceContext } from '../../services/context'
import { approveRequest } from '../../services/request/approve'
import { bookExam } from '../../services/request/book'
import { createDraft } from '../../services/request/create-draft'
import { declineRequest } from '../../services/request/decline'
import { markNeed } from '../../services/request/mark-need'
import { postMessage } from '../../services/request/post-message'
import { queryRequest } from '../../services/request/query'
import { saveForm } from '../../services/request/save-form'
import { sendRequest } from '../../services/request/send'
import { viewRequest } from '../../services/request/view'
import { searchForPatient } from '../../services/patient/search'
import type { Database } from '../client'
import { memberships, users } from '../schema/people'
import { requests } from '../schema/requests'
import { scanners } from '../schema/rules'
import { installation } from '../schema/trail'
import { demoRequests } from './demo-requests'
import type { DemoRequest } from './demo-requests'

const mark = 'demo-requests'

/**
 * Lets the invented people ask for, decide and book exams through the product's own verbs, reading the fake record. Nothing is
 * written past them, so that every demonstration request has its assessment, trail and letters like a real one.
 *
 * @returns how many were made now; 0 where they are there already.
 */
export async function seedRequests(db: Database, ehr: EhrClient): Promise<number> {
  const [made] = await db.select({ key: installation.key }).from(installation).where(eq(installation.key, mark))
  if (made) return 0
  const stage = await setStage(db, ehr)
  for (const demo of demoRequests) await play(stage, demo)
  await db.insert(installation).values({ key: mark, value: { requests: demoRequests.length } })
  return demoRequests.length
}

interface Stage {
  as: (name: string) => ServiceContext
  practiceOf: (name: string) => string
  scannerAt: (position: number) => string
}

async function setStage(db: Database, ehr: EhrClient): Promise<Stage> {
  const people = await db.select().from(users).where(eq(users.demo, true))
  const belongs = await db.select().from(memberships)
  const machines = await db.select({ id: scanners.id }).from(scanners).orderBy(asc(scanners.position))
  const actors = new Map(people.map((user): [string, Actor] => [user.name, {
    userId: user.id, name: user.name, role: user.role, maySign: user.maySign, guidanceLead: user.guidanceLead,
    practiceIds: belongs.filter(row => row.userId === user.id).map(row => row.practiceId),
  }]))
  const actorOf = (name: string): Actor => {
    const actor = actors.get(name)
    if (!actor) throw new Error(`no demo user is called ${name}`)
    return actor
  }
  return {
    as: name => ({ db, ehr, actor: { kind: 'user', ...actorOf(name) }, requestId: `seed-${randomUUID()}`, now: new Date(), idempotency: null, permitted: new Set() }),
    practiceOf: (name) => {
      const [first] = actorOf(name).practiceIds
      if (!first) throw new Error(`${name} belongs to no practice`)
      return first
    },
    scannerAt: (position) => {
      const machine = machines[position - 1]
      if (!machine) throw new Error(`there is no scanner ${position}`)
      return machine.id
    },
  }
}

async function play(stage: Stage, demo: DemoRequest): Promise<void> {
  const asker = stage.as(demo.by)
  const found = await searchForPatient({ ctx: asker, input: { recordNumber: demo.recordNumber } })
  const [patient] = found.patients
  if (!patient) throw new Error(`the fake record has nobody under ${demo.recordNumber}`)
  let request = await createDraft({ ctx: stage.as(demo.by), input: { ehrPatientId: patient.ehrId, practiceId: stage.practiceOf(demo.by), confirmed: true, copyOf: null } })
  const { form } = await viewRequest({ ctx: stage.as(demo.by), input: { id: request.id } })
  const filled: RequestForm = { ...form, ...demo.form, screening: { ...form.screening, ...demo.screening } }
  request = await saveForm({ ctx: stage.as(demo.by), input: { id: request.id, version: request.version, form: filled } })
  if (demo.until === 'draft') return
  request = await sendRequest({ ctx: stage.as(demo.by), input: { id: request.id, version: request.version } })
  await spreadSending(asker.db, request.id, demo.sentHoursAgo)
  if (demo.until === 'sent') return
  if (demo.until === 'queried' || demo.until === 'answered') {
    request = await queryRequest({ ctx: stage.as(demo.reader), input: { id: request.id, version: request.version, body: demo.query } })
    if (demo.until === 'answered') await postMessage({ ctx: stage.as(demo.by), input: { id: request.id, kind: 'answer', body: demo.answer, internal: false } })
    return
  }
  if (demo.until === 'declined') {
    await declineRequest({ ctx: stage.as(demo.reader), input: { id: request.id, version: request.version, reason: demo.reason, helpInstead: demo.helpInstead } })
    return
  }
  request = await decide(stage, demo, request)
  if (demo.until === 'approved') return
  request = await bookExam({
    ctx: stage.as(demo.booker),
    input: { id: request.id, version: request.version, scannerId: stage.scannerAt(demo.scanner), startsAt: slotAt(demo.inDays, demo.hourUtc), minutes: demo.minutes },
  })
  for (const done of demo.marked) await markNeed({ ctx: stage.as(demo.booker), input: { id: request.id, note: '', ...done } })
}

/** Signs what was suggested, with the best agent for the patient. */
async function decide(stage: Stage, demo: Extract<DemoRequest, { until: 'approved' | 'booked' }>, request: WriteResult): Promise<WriteResult> {
  const { assessment } = await viewRequest({ ctx: stage.as(demo.reader), input: { id: request.id } })
  const suggestion = assessment?.suggestion
  if (!suggestion || suggestion === 'discuss') throw new Error(`${demo.recordNumber} has no suggestion to follow`)
  return await approveRequest({
    ctx: stage.as(demo.reader),
    input: {
      id: request.id, version: request.version, contrast: suggestion, agent: assessment.agents?.best ?? null, doseMmolPerKg: null, weightKg: null,
      volumeMl: suggestion === 'intra-articular' ? 12 : null, note: demo.note ?? '', differsReason: demo.word ?? null, wordGiven: demo.word !== undefined, waivedNeeds: [],
    },
  })
}

/** Demonstration requests were not all sent this minute. */
async function spreadSending(db: Database, id: string, hoursAgo: number): Promise<void> {
  const back = sql`make_interval(mins => ${Math.round(hoursAgo * 60)})`
  await db.update(requests).set({ sentAt: sql`${requests.sentAt} - ${back}`, dueAt: sql`${requests.dueAt} - ${back}` }).where(and(eq(requests.id, id)))
}

function slotAt(inDays: number, hourUtc: number): string {
  const day = new Date(Date.now() + inDays * 86_400_000)
  day.setUTCHours(Math.floor(hourUtc), Math.round((hourUtc % 1) * 60), 0, 0)
  return day.toISOString()
}
