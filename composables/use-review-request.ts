import { ref } from 'vue'
import type { RequestView, WriteResult } from '#shared/types/views'
import type { ApiProblem, ApiResult } from '~/composables/use-api'
import { newWriteKey, useApi } from '~/composables/use-api'

/** A write that another person's change overtook, or that the server refused. */
export interface RefusedWrite { problem: ApiProblem, overtaken: boolean }

/** One request read in full, with its writes. A stale write reads the request again and says who changed what. */
export function useReviewRequest() {
  const api = useApi()
  const request = ref<RequestView | null>(null)
  const problem = ref<ApiProblem | null>(null)
  const refused = ref<RefusedWrite | null>(null)
  const reading = ref(false)
  const busy = ref<string | null>(null)
  let wanted: string | null = null
  const keys = new Map<string, string>()

  async function open(key: string | null): Promise<ApiResult<RequestView> | null> {
    wanted = key
    refused.value = null
    if (key === null) {
      request.value = null
      problem.value = null
      return null
    }
    reading.value = true
    return await read(key)
  }

  async function read(key: string) {
    const result = await api.get<RequestView>(`/api/requests/${encodeURIComponent(key)}`)
    // Somebody may have moved on while this was on its way.
    if (wanted === key) take(key, result)
    return result
  }

  /** Takes a result that was read elsewhere, for instance while the page was built on the server. */
  function take(key: string | null, result: ApiResult<RequestView> | null) {
    wanted = key
    reading.value = false
    problem.value = result === null || result.ok ? null : result.problem
    if (result?.ok) request.value = result.data
    else if (result !== null && result.problem.status === 404) request.value = null
  }

  async function again() {
    if (wanted !== null) await read(wanted)
  }

  /** One intent, one key: pressing again after a lost answer does not sign twice. */
  async function write(name: string, body: object): Promise<ApiResult<WriteResult> | null> {
    const view = request.value
    if (view === null || busy.value !== null) return null
    const intent = `${name} ${view.id} ${view.version} ${JSON.stringify(body)}`
    const key = keys.get(intent) ?? newWriteKey()
    keys.set(intent, key)
    busy.value = name
    refused.value = null
    const result = await api.post<WriteResult>(`/api/requests/${view.id}/${name}`, body, { version: view.version, key })
    busy.value = null
    if (result.ok) {
      keys.clear()
      await again()
      return result
    }
    const overtaken = result.problem.status === 409 || result.problem.status === 412
    refused.value = { problem: result.problem, overtaken }
    if (overtaken) await again()
    return result
  }

  return { request, problem, refused, reading, busy, open, take, again, write }
}
