import type { Ref } from 'vue'
import { computed, onBeforeUnmount, ref, watch } from 'vue'
import { preparationTabs } from '#shared/types/views'
import type { PreparationRow, PreparationTab, PreparationView } from '#shared/types/views'
import type { ApiProblem, ApiResult } from '~/composables/use-api'
import { useApi } from '~/composables/use-api'

export function isPreparationTab(value: unknown): value is PreparationTab {
  return preparationTabs.some(tab => tab === value)
}

/** Rows drawn at first and with each press for more; everything is there already, drawing is what takes time. */
const drawnAtOnce = 100

/** Approved exams with what each still needs, by tab. The search never stands in the address: it may be a name. */
export function usePreparationList(tab: Ref<PreparationTab>) {
  const api = useApi()
  const rows = ref<PreparationRow[]>([])
  const counts = ref<Record<PreparationTab, number> | null>(null)
  const problem = ref<ApiProblem | null>(null)
  const search = ref('')
  const loading = ref(false)
  const limit = ref(drawnAtOnce)
  let latest = 0

  async function load(): Promise<ApiResult<PreparationView>> {
    latest += 1
    const mine = latest
    loading.value = true
    const words = search.value.trim()
    const result = await api.get<PreparationView>('/api/preparation', { tab: tab.value, search: words.length >= 2 ? words : undefined })
    if (mine === latest) take(result)
    return result
  }

  /** Takes an answer that was read elsewhere, for instance while the page was built on the server. */
  function take(result: ApiResult<PreparationView>) {
    loading.value = false
    problem.value = result.ok ? null : result.problem
    if (!result.ok) return
    rows.value = result.data.rows
    counts.value = result.data.counts
  }

  let timer: ReturnType<typeof setTimeout> | undefined
  watch(search, () => {
    clearTimeout(timer)
    timer = setTimeout(load, 300)
  })
  onBeforeUnmount(() => clearTimeout(timer))
  watch(tab, () => {
    limit.value = drawnAtOnce
    void load()
  })

  const shown = computed(() => rows.value.slice(0, limit.value))
  const hidden = computed(() => Math.max(0, rows.value.length - limit.value))
  function more() {
    limit.value += drawnAtOnce
  }

  return { rows, shown, hidden, counts, problem, search, loading, load, take, more }
}
