import { computed } from 'vue'
import type { AssessmentRules } from '#shared/domain/assessment/types'
import { starterAgents } from '#shared/domain/contrast/agents'
import type { GuidanceView, PolicyView } from '#shared/types/views'
import { useApi } from '~/composables/use-api'

/** Guidance and policy in force, read once in the browser; null until they are there. */
export function useRulesInForce() {
  const api = useApi()
  const { data, status, refresh } = useAsyncData('rules-in-force', async () => {
    const [guidance, policy] = await Promise.all([api.get<GuidanceView>('/api/guidance'), api.get<PolicyView>('/api/policy')])
    return guidance.ok && policy.ok ? { guidance: guidance.data, policy: policy.data } : null
  }, { server: false, lazy: true, dedupe: 'defer' })

  const rules = computed<AssessmentRules | null>(() => data.value
    ? { guidance: data.value.guidance.guidance, policy: data.value.policy.policy, agents: starterAgents }
    : null)

  const pending = computed(() => status.value === 'idle' || status.value === 'pending')
  const failed = computed(() => !pending.value && data.value === null)
  return { rules, view: data, pending, failed, refresh }
}
