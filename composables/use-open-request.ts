import type { Ref } from 'vue'
import { ref } from 'vue'
import type { RequestView, WriteResult } from '#shared/types/views'
import type { ApiProblem, ApiResult } from '~/composables/use-api'
import { newWriteKey, useApi } from '~/composables/use-api'

export interface OpenRequest {
  view: Ref<RequestView | null>
  problem: Ref<ApiProblem | null>
  /** Which write is under way, by its route's last part; null while none is. */
  busy: Ref<string | null>
  read: (background?: boolean) => Promise<void>
  /** One intent keeps one key, so that pressing again after a lost answer does not do it twice. */
  write: (name: string, body: object, versioned?: boolean) => Promise<ApiResult<WriteResult> | null>
  /** Begins a new draft from this request, for the same patient. */
  copy: () => Promise<ApiResult<WriteResult> | null>
}

/** One request as somebody of the ordering side works with it. */
export function useOpenRequest(key: string): OpenRequest {
  const api = useApi()
  const view = useState<RequestView | null>(`request-${key}`, () => null)
  const problem = ref<ApiProblem | null>(null)
  const busy = ref<string | null>(null)
  let intent = ''
  let intentKey = newWriteKey()

  async function read(background = false): Promise<void> {
    const result = await api.get<RequestView>(`/api/requests/${encodeURIComponent(key)}`, undefined, { background })
    if (result.ok) {
      view.value = result.data
      problem.value = null
    }
    else if (!background) {
      problem.value = result.problem
    }
  }

  function keyFor(name: string, body: object): string {
    const next = `${name} ${view.value?.version ?? 0} ${JSON.stringify(body)}`
    if (next !== intent) {
      intent = next
      intentKey = newWriteKey()
    }
    return intentKey
  }

  async function run(name: string, call: () => Promise<ApiResult<WriteResult>>): Promise<ApiResult<WriteResult> | null> {
    if (busy.value !== null) return null
    busy.value = name
    const result = await call()
    busy.value = null
    if (result.ok) intent = ''
    return result
  }

  return {
    view,
    problem,
    busy,
    read,
    async write(name, body, versioned = true) {
      const current = view.value
      if (!current) return null
      const options = { key: keyFor(name, body), ...(versioned ? { version: current.version } : {}) }
      const result = await run(name, () => api.post<WriteResult>(`/api/requests/${current.id}/${name}`, body, options))
      // Read again after a refusal too: somebody else may have been quicker.
      if (result) await read(true)
      return result
    },
    async copy() {
      const current = view.value
      const ehrPatientId = current?.record?.ehrPatientId
      if (!current || !ehrPatientId) return null
      const body = { ehrPatientId, practiceId: current.practice.id, confirmed: true, copyOf: current.id }
      return await run('copy', () => api.post<WriteResult>('/api/requests', body, { key: keyFor('copy', body) }))
    },
  }
}
