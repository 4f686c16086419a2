import type { ComputedRef, Ref } from 'vue'
import { computed, ref } from 'vue'
import type { AuditView, Page } from '#shared/types/views'
import type { ApiProblem, ApiResult } from '~/composables/use-api'
import { useApi } from '~/composables/use-api'

export interface AuditFilter { actor: string, action: string, reference: string, from: string, to: string }

export const noAuditFilter: AuditFilter = { actor: '', action: '', reference: '', from: '', to: '' }

export interface AuditTrail {
  filter: Ref<AuditFilter>
  rows: ComputedRef<AuditView[]>
  more: ComputedRef<boolean>
  busy: Ref<boolean>
  problem: ComputedRef<ApiProblem | null>
  look: (filter: AuditFilter) => Promise<void>
  readOn: () => Promise<void>
}

/** What was done besides, in words: states, roles, fields; an empty text where the sentence says it all. */
export function detailWords(detail: AuditView['detail']): string {
  return Object.entries(detail)
    .filter(([, value]) => value !== null && value !== '' && value !== false && !(Array.isArray(value) && value.length === 0))
    .map(([name, value]) => `${name.replace(/([A-Z])/g, ' $1').toLowerCase()}: ${value === true ? 'yes' : Array.isArray(value) ? value.join(', ') : String(value)}`)
    .join('; ')
}

/** The trail, page after page, newest first. */
export async function useAuditTrail(): Promise<AuditTrail> {
  const api = useApi()
  const filter = ref({ ...noAuditFilter })
  const later = ref<AuditView[]>([])
  const busy = ref(false)
  const failed = ref<ApiProblem | null>(null)

  const read = (after?: string): Promise<ApiResult<Page<AuditView>>> => {
    const asked = Object.fromEntries(Object.entries(filter.value).filter(([, value]) => value !== ''))
    return api.get<Page<AuditView>>('/api/audit', { ...asked, ...(after === undefined ? {} : { after }) })
  }
  const { data, refresh } = await useAsyncData('audit-trail', () => read())
  const next = ref(data.value?.ok ? data.value.data.next : null)

  return {
    filter,
    rows: computed(() => [...(data.value?.ok ? data.value.data.rows : []), ...later.value]),
    more: computed(() => next.value !== null),
    busy,
    problem: computed(() => failed.value ?? (data.value?.ok === false ? data.value.problem : null)),
    async look(wanted) {
      busy.value = true
      failed.value = null
      filter.value = wanted
      later.value = []
      await refresh()
      next.value = data.value?.ok ? data.value.data.next : null
      busy.value = false
    },
    async readOn() {
      if (next.value === null || busy.value) return
      busy.value = true
      const result = await read(next.value)
      busy.value = false
      failed.value = result.ok ? null : result.problem
      if (!result.ok) return
      later.value = [...later.value, ...result.data.rows]
      next.value = result.data.next
    },
  }
}
