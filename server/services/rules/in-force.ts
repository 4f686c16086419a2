import { desc, eq, lte } from 'drizzle-orm'
import type { AssessmentRules } from '#shared/domain/assessment/types'
import { starterAgents } from '#shared/domain/contrast/agents'
import type { Database } from '#server/database/client'
import { guidanceVersions, policyVersions } from '#server/database/schema/rules'
import { Unavailable } from '../errors'

export interface RulesInForce {
  guidanceId: string
  policyId: string
  rules: AssessmentRules
  guidance: { signedBy: string, effectiveFrom: Date }
  policy: { signedBy: string, effectiveFrom: Date }
}

type GuidanceRow = typeof guidanceVersions.$inferSelect
type PolicyRow = typeof policyVersions.$inferSelect

// Versions are never updated, so their content may be kept by id.
const guidanceById = new Map<string, GuidanceRow>()
const policyById = new Map<string, PolicyRow>()

/** Guidance and policy in force at a moment. @throws Unavailable while none is stored. */
export async function rulesInForce(db: Database, now: Date): Promise<RulesInForce> {
  const [[guidance], [policy]] = await Promise.all([
    db.select({ id: guidanceVersions.id }).from(guidanceVersions).where(lte(guidanceVersions.effectiveFrom, now))
      .orderBy(desc(guidanceVersions.effectiveFrom), desc(guidanceVersions.createdAt)).limit(1),
    db.select({ id: policyVersions.id }).from(policyVersions).where(lte(policyVersions.effectiveFrom, now))
      .orderBy(desc(policyVersions.effectiveFrom), desc(policyVersions.createdAt)).limit(1),
  ])
  if (!guidance || !policy) throw new Unavailable('No guidance or policy is in force yet; an administrator must load them.', 60)
  return await rulesById(db, guidance.id, policy.id)
}

/** The rules a stored assessment was made under. */
export async function rulesById(db: Database, guidanceId: string, policyId: string): Promise<RulesInForce> {
  const [guidance, policy] = await Promise.all([guidanceVersion(db, guidanceId), policyVersion(db, policyId)])
  return {
    guidanceId,
    policyId,
    rules: { guidance: guidance.content, policy: policy.content, agents: starterAgents },
    guidance: { signedBy: guidance.signedBy, effectiveFrom: guidance.effectiveFrom },
    policy: { signedBy: policy.signedBy, effectiveFrom: policy.effectiveFrom },
  }
}

async function guidanceVersion(db: Database, id: string): Promise<GuidanceRow> {
  const known = guidanceById.get(id)
  if (known) return known
  const [row] = await db.select().from(guidanceVersions).where(eq(guidanceVersions.id, id))
  if (!row) throw new Unavailable('The guidance version is missing.')
  guidanceById.set(id, row)
  return row
}

async function policyVersion(db: Database, id: string): Promise<PolicyRow> {
  const known = policyById.get(id)
  if (known) return known
  const [row] = await db.select().from(policyVersions).where(eq(policyVersions.id, id))
  if (!row) throw new Unavailable('The policy version is missing.')
  policyById.set(id, row)
  return row
}
