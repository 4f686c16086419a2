import { desc, eq, lte } from 'drizzle-orm'
import type { z } from 'zod'
import type { AssessmentRules } from '#shared/domain/assessment/types'
import { starterAgents } from '#shared/domain/contrast/agents'
import { firstPolicyProblem, policySchema, policyShape } from '#shared/schemas/policy'
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
/** Ids of policies that may be in force: of the right shape, and nothing in them that no department can mean. */
const sensible = new Set<string>()

/**
 * Guidance and policy in force at a moment.
 *
 * @throws Unavailable while none is stored, or where the policy in force is not one that a department can mean
 */
export async function rulesInForce(db: Database, now: Date): Promise<RulesInForce> {
  const [[guidance], [policy]] = await Promise.all([
    db.select({ id: guidanceVersions.id }).from(guidanceVersions).where(lte(guidanceVersions.effectiveFrom, now))
      .orderBy(desc(guidanceVersions.effectiveFrom), desc(guidanceVersions.createdAt)).limit(1),
    db.select({ id: policyVersions.id }).from(policyVersions).where(lte(policyVersions.effectiveFrom, now))
      .orderBy(desc(policyVersions.effectiveFrom), desc(policyVersions.createdAt)).limit(1),
  ])
  if (!guidance || !policy) throw new Unavailable('No guidance or policy is in force yet; an administrator must load them.', 60)
  const inForce = await rulesById(db, guidance.id, policy.id)
  if (!sensible.has(policy.id)) {
    const read = policySchema.safeParse(inForce.rules.policy)
    if (!read.success) throw unusable(inForce.rules.policy.version, read.error)
    sensible.add(policy.id)
  }
  return inForce
}

function unusable(label: string, error: z.ZodError): Unavailable {
  return new Unavailable(`The department policy ${label} cannot be used: ${firstPolicyProblem(error)}. An administrator must load a corrected version.`, 60)
}

/** The rules a stored assessment was made under. @throws Unavailable where a version is missing or its policy cannot be read. */
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
  const read = policyShape.safeParse(row.content)
  if (!read.success) throw unusable(row.label, read.error)
  const kept = { ...row, content: read.data }
  policyById.set(id, kept)
  return kept
}
