import { computed, onBeforeUnmount, onMounted, ref, watch } from 'vue'
import type { Ref } from 'vue'
import type { RequestRow, ReviewView } from '#shared/types/views'
import type { ApiProblem, ApiResult } from '~/composables/use-api'
import { useApi } from '~/composables/use-api'

export const reviewFilters = [
  { id: 'all', label: 'Most urgent first' },
  { id: 'reply', label: 'Reply waiting' },
  { id: 'reopened', label: 'Reopened' },
  { id: 'contrast', label: 'With contrast' },
  { id: 'low-kidney', label: 'eGFR below 45' },
] as const
export type ReviewFilter = (typeof reviewFilters)[number]['id']

export function isReviewFilter(value: unknown): value is ReviewFilter {
  return reviewFilters.some(filter => filter.id === value)
}

/** How often to look whether more has come in, milliseconds. New rows wait for a press: the list never jumps. */
const lookEvery = 45_000

/** The radiologists' queue, page by page, with word of what came in since. */
export function useReviewQueue(filter: Ref<ReviewFilter>) {
  const api = useApi()
  const rows = ref<RequestRow[]>([])
  const next = ref<string | null>(null)
  const total = ref(0)
  const waitingTotal = ref<number | null>(null)
  const problem = ref<ApiProblem | null>(null)
  const loadingMore = ref(false)

  async function load() {
    // As many rows as were open before, so that the list keeps its place.
    const limit = Math.min(100, Math.max(50, rows.value.length))
    const result = await api.get<ReviewView>('/api/review', { filter: filter.value, limit })
    take(result)
    return result
  }

  /** Takes a page that was read elsewhere, for instance while the page was built on the server. */
  function take(result: ApiResult<ReviewView>) {
    problem.value = result.ok ? null : result.problem
    if (!result.ok) return
    const view = result.data
    rows.value = view.rows
    next.value = view.next
    total.value = view.total
    waitingTotal.value = null
  }

  async function more() {
    if (next.value === null || loadingMore.value) return
    loadingMore.value = true
    const result = await api.get<ReviewView>('/api/review', { filter: filter.value, after: next.value })
    loadingMore.value = false
    problem.value = result.ok ? null : result.problem
    if (!result.ok) return
    const known = new Set(rows.value.map(row => row.id))
    rows.value = [...rows.value, ...result.data.rows.filter(row => !known.has(row.id))]
    next.value = result.data.next
  }

  async function look() {
    if (document.visibilityState !== 'visible') return
    // A look by itself must not keep an unattended session alive.
    const result = await api.get<ReviewView>('/api/review', { filter: filter.value, limit: 1 }, { background: true })
    if (result.ok) waitingTotal.value = result.data.total
  }

  let timer: ReturnType<typeof setInterval> | undefined
  onMounted(() => { timer = setInterval(look, lookEvery) })
  onBeforeUnmount(() => clearInterval(timer))
  watch(filter, () => {
    rows.value = []
    void load()
  })

  /** Requests that came in since the list was read. */
  const arrived = computed(() => Math.max(0, (waitingTotal.value ?? total.value) - total.value))

  return { rows, next, total, arrived, problem, loadingMore, load, take, more }
}
