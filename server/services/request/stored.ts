import { eq } from 'drizzle-orm'
import type { Database } from '#server/database/client'
import { assessments, decisions } from '#server/database/schema/requests'
import { rulesById } from '../rules/in-force'
import type { RulesInForce } from '../rules/in-force'
import type { RequestRecord } from './load'

export type AssessmentRecord = typeof assessments.$inferSelect
export type DecisionRecord = typeof decisions.$inferSelect

/** The request's current assessment with the rules it was made under; null on drafts. */
export async function currentAssessment(db: Database, request: RequestRecord): Promise<{ row: AssessmentRecord, inForce: RulesInForce } | null> {
  if (!request.currentAssessmentId) return null
  const [row] = await db.select().from(assessments).where(eq(assessments.id, request.currentAssessmentId))
  if (!row) return null
  return { row, inForce: await rulesById(db, row.guidanceVersionId, row.policyVersionId) }
}

export async function currentDecision(db: Database, request: RequestRecord): Promise<DecisionRecord | null> {
  if (!request.currentDecisionId) return null
  const [row] = await db.select().from(decisions).where(eq(decisions.id, request.currentDecisionId))
  return row ?? null
}
