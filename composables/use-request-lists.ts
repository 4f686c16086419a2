import type { Ref } from 'vue'
import { ref } from 'vue'
import type { Page, RequestRow } from '#shared/types/views'
import type { ApiProblem } from '~/composables/use-api'
import { useApi } from '~/composables/use-api'

export const requestGroups = ['waiting', 'progress', 'drafts', 'past'] as const
export type RequestGroup = (typeof requestGroups)[number]

export interface RequestList { rows: RequestRow[], next: string | null, problem: ApiProblem | null, loading: boolean }

export interface RequestLists {
  lists: Ref<Record<RequestGroup, RequestList>>
  /** Reads the first page of every group given. */
  read: (groups: readonly RequestGroup[], search: string) => Promise<void>
  more: (group: RequestGroup) => Promise<void>
}

const pageSize = 20

function emptyList(): RequestList {
  return { rows: [], next: null, problem: null, loading: false }
}

/** The groups of the list of requests, each with its own pages. */
export function useRequestLists(): RequestLists {
  const api = useApi()
  const lists = useState<Record<RequestGroup, RequestList>>('request-lists', () => ({ waiting: emptyList(), progress: emptyList(), drafts: emptyList(), past: emptyList() }))
  const searched = ref('')

  function query(group: RequestGroup, after?: string) {
    return api.get<Page<RequestRow>>('/api/requests', { group, limit: pageSize, after, search: searched.value || undefined })
  }

  async function read(groups: readonly RequestGroup[], search: string): Promise<void> {
    searched.value = search
    await Promise.all(groups.map(async (group) => {
      lists.value[group].loading = true
      const result = await query(group)
      // A slower answer to an older search must not replace a newer one.
      if (searched.value !== search) return
      lists.value[group] = result.ok
        ? { rows: result.data.rows, next: result.data.next, problem: null, loading: false }
        : { ...lists.value[group], problem: result.problem, loading: false }
    }))
  }

  async function more(group: RequestGroup): Promise<void> {
    const list = lists.value[group]
    if (!list.next || list.loading) return
    list.loading = true
    const result = await query(group, list.next)
    list.loading = false
    if (!result.ok) {
      list.problem = result.problem
      return
    }
    const known = new Set(list.rows.map(row => row.id))
    list.rows = [...list.rows, ...result.data.rows.filter(row => !known.has(row.id))]
    list.next = result.data.next
    list.problem = null
  }

  return { lists, read, more }
}
