import { and, eq, isNull, lte, or, sql } from 'drizzle-orm'
import type { RecordReading } from '#shared/domain/record/types'
import { missingForSending } from '#shared/domain/request/complete'
import { priorityRank } from '#shared/domain/request/priority'
import { decisionDueAt } from '#shared/domain/request/promise'
import type { WriteResult } from '#shared/types/views'
import type { Database } from '#server/database/client'
import { patients } from '#server/database/schema/requests'
import { permitRequest, userOf } from '../context'
import type { ServiceContext } from '../context'
import { recordAudit } from '../audit/record'
import { Invalid } from '../errors'
import { freshRecord } from '../record/fresh-record'
import { rulesInForce } from '../rules/in-force'
import { earlierAnswer } from '../transaction'
import { gatherInputs, runAssessment, storeAssessment } from './assess-request'
import { changeRequest } from './change'
import { loadRequest, scopeOf } from './load'
import type { RequestRecord } from './load'

/**
 * Signs and sends a draft: the server assesses the saved answers against the freshest record it could read, freezes the result
 * and numbers the request. A record that cannot be reached never stands in the way.
 *
 * @throws Invalid with a path for everything still missing.
 */
export async function sendRequest({ ctx, input }: { ctx: ServiceContext, input: { id: string, version: number } }): Promise<WriteResult> {
  const actor = userOf(ctx)
  const before = await loadRequest(ctx.db, input.id)
  // Asked before the hospital record is, and again below on the row as it then stands.
  permitRequest(ctx, 'request.send', scopeOf(before.request))
  const earlier = await earlierAnswer<WriteResult>(ctx)
  if (earlier) return earlier.response
  const record = await freshRecord(ctx, before)
  const inForce = await rulesInForce(ctx.db, ctx.now)
  return await changeRequest(ctx, {
    id: input.id,
    version: input.version,
    action: 'request.send',
    step: 'send',
    apply: async (tx, { request, patient }) => {
      const { form } = request
      const inputs = await gatherInputs(tx, ctx.now, { form, record, patient, plannedAt: null })
      const assessed = runAssessment(inputs, inForce)
      const question = inForce.rules.guidance.questions.find(candidate => candidate.id === form.questionId) ?? null
      const missing = missingForSending(form, { question, assessment: assessed.result, inputs, policy: inForce.rules.policy })
      if (missing.length > 0 || !question) throw new Invalid(missing, 'Some answers are still missing.')
      if (form.detailsByEmail !== null || form.patientEmail) await keepConsent(tx, ctx, request)
      const stored = await storeAssessment(tx, ctx, { ...assessed, requestId: request.id, cause: 'send', inForce })
      return {
        set: {
          ...stored,
          ...recordColumns(record, request.recordReadAt),
          reference: await nextReference(tx, ctx.now, inForce.rules.policy.department.timeZone),
          signedById: actor.userId,
          sentAt: ctx.now,
          dueAt: new Date(decisionDueAt(ctx.now.toISOString(), form.priority, inForce.rules.policy)),
          questionId: question.id,
          region: question.region,
          examName: question.exam,
          priority: form.priority,
          priorityRank: priorityRank[form.priority],
        },
        audit: 'request.send',
        detail: { outcome: stored.outcome ?? null, priority: form.priority, record: record?.state ?? 'not-read', guidance: inForce.rules.guidance.version, policy: inForce.rules.policy.version },
      }
    },
  })
}

function recordColumns(record: RecordReading | null, readAt: Date | null) {
  return { record, recordReadAt: record && record.state !== 'unreachable' ? new Date(record.readAt) : readAt }
}

/** What the form says on e-mail becomes the patient's wish, unless somebody asked again after the form was last saved. */
async function keepConsent(tx: Database, ctx: ServiceContext, { form, patientId, practiceId, id, updatedAt }: RequestRecord): Promise<void> {
  const actor = userOf(ctx)
  const kept = await tx.update(patients).set({
    ...(form.patientEmail ? { email: form.patientEmail } : {}),
    ...consentColumns(form, actor.userId, ctx.now),
  }).where(and(eq(patients.id, patientId), or(isNull(patients.consentAskedAt), lte(patients.consentAskedAt, updatedAt)))).returning({ id: patients.id })
  if (kept.length === 0) return
  await recordAudit(tx, ctx, { action: 'patient.consent', objectType: 'request', objectId: id, patientId, practiceId, detail: { detailsByEmail: form.detailsByEmail, address: form.patientEmail !== null } })
}

/** Consent is to an address: another one without a fresh answer means nobody was asked. */
function consentColumns(form: RequestRecord['form'], askedById: string, now: Date) {
  if (form.detailsByEmail !== null) return { detailsByEmail: form.detailsByEmail, consentAskedById: askedById, consentAskedAt: now }
  return form.patientEmail ? { detailsByEmail: null, consentAskedById: null, consentAskedAt: null } : {}
}

/** WF-26-004318: the year in the department's zone, then a number never used twice. */
async function nextReference(tx: Database, now: Date, timeZone: string): Promise<string> {
  const { rows } = await tx.execute<{ n: string }>(sql`select nextval('request_number') as n`)
  const year = new Intl.DateTimeFormat('en', { timeZone, year: '2-digit' }).format(now)
  return `WF-${year}-${String(rows[0]?.n ?? '').padStart(6, '0')}`
}
