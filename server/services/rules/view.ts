import type { GuidanceView, PolicyView } from '#shared/types/views'
import type { ServiceContext } from '../context'
import { rulesInForce } from './in-force'

/** The guidance in force with its signature. */
export async function viewGuidance({ ctx }: { ctx: ServiceContext }): Promise<GuidanceView> {
  const { rules, guidance } = await rulesInForce(ctx.db, ctx.now)
  return { guidance: rules.guidance, version: rules.guidance.version, signedBy: guidance.signedBy, effectiveFrom: guidance.effectiveFrom.toISOString() }
}

/** The policy in force with its signature. */
export async function viewPolicy({ ctx }: { ctx: ServiceContext }): Promise<PolicyView> {
  const { rules, policy } = await rulesInForce(ctx.db, ctx.now)
  return { policy: rules.policy, signedBy: policy.signedBy, effectiveFrom: policy.effectiveFrom.toISOString() }
}
