import { defineStore } from 'pinia'
import { computed, ref, shallowRef, toRaw } from 'vue'
import type { Assessment, AssessmentRules } from '#shared/domain/assessment/types'
import type { RequestForm } from '#shared/domain/request/form'
import type { GadoliniumExposure } from '#shared/domain/safety/types'
import type { RecordReading } from '#shared/domain/record/types'
import type { AssessmentView, GuidanceView, PolicyView, RequestView, WriteResult } from '#shared/types/views'
import { starterAgents } from '#shared/domain/contrast/agents'
import { savableForm } from '#shared/utils/savable-form'
import type { ApiProblem, ApiResult } from '~/composables/use-api'
import { useApi } from '~/composables/use-api'
import { createAutosave } from '~/composables/use-autosave'

/** The draft being written: it outlives the step it is on, and is saved while somebody types. */
export const useRequestDraftStore = defineStore('request-draft', () => {
  const api = useApi()
  const view = ref<RequestView | null>(null)
  const form = ref<RequestForm | null>(null)
  const record = ref<RecordReading | null>(null)
  const recordReadAt = ref<string | null>(null)
  const ledger = ref<GadoliniumExposure[]>([])
  const version = ref(0)
  const loadProblem = ref<ApiProblem | null>(null)
  /** What the server holds after somebody else changed the draft. */
  const theirs = ref<RequestView | null>(null)
  const rereading = ref(false)
  const rules = shallowRef<AssessmentRules | null>(null)
  const rulesProblem = ref<ApiProblem | null>(null)
  const assessment = shallowRef<Assessment | null>(null)
  /** What the last answer changed, in words. */
  const changes = ref<string[]>([])

  const heldBack = computed(() => (form.value ? savableForm(form.value).heldBack : []))
  const autosave = createAutosave(write)

  async function write(): Promise<ApiResult<unknown>> {
    const current = view.value
    if (!current || !form.value) return { ok: true, data: null, version: null }
    const result = await api.put<WriteResult>(`/api/requests/${current.id}/form`, { form: savableForm(form.value).form }, { version: version.value })
    if (result.ok) version.value = result.data.version
    else if (result.problem.status === 412 || result.problem.status === 409) await readTheirs(current.id)
    return result
  }

  async function readTheirs(id: string): Promise<void> {
    const result = await api.get<RequestView>(`/api/requests/${id}`)
    if (result.ok) theirs.value = result.data
  }

  function take(next: RequestView): void {
    view.value = next
    form.value = structuredClone(toRaw(next.form))
    record.value = next.record
    recordReadAt.value = next.recordReadAt
    ledger.value = next.ledger
    version.value = next.version
    theirs.value = null
    loadProblem.value = null
    autosave.reset()
  }

  async function load(id: string): Promise<void> {
    if (view.value?.id === id) return
    clear()
    const result = await api.get<RequestView>(`/api/requests/${id}`)
    if (result.ok) take(result.data)
    else loadProblem.value = result.problem
  }

  /** Guidance and policy in force, for the live sheet; fetched once and again when a newer version applies. */
  async function loadRules(): Promise<void> {
    if (rules.value) return
    const [guidance, policy] = await Promise.all([api.get<GuidanceView>('/api/guidance'), api.get<PolicyView>('/api/policy')])
    if (guidance.ok && policy.ok) {
      rules.value = { guidance: guidance.data.guidance, policy: policy.data.policy, agents: starterAgents }
      rulesProblem.value = null
    }
    else {
      rulesProblem.value = !guidance.ok ? guidance.problem : policy.ok ? null : policy.problem
    }
  }

  /** Asks the server to read the hospital record anew. */
  async function readRecordAgain(): Promise<ApiProblem | null> {
    if (!view.value || rereading.value) return null
    rereading.value = true
    const result = await api.post<AssessmentView>(`/api/requests/${view.value.id}/assessment`, {})
    rereading.value = false
    if (!result.ok) return result.problem
    record.value = result.data.record
    recordReadAt.value = result.data.recordReadAt
    ledger.value = result.data.ledger
    return null
  }

  /** Settles a conflict: `mine` writes what is on the screen over the other version, `theirs` takes that one. */
  async function settle(choice: 'mine' | 'theirs'): Promise<void> {
    const other = theirs.value
    if (!other) return
    if (choice === 'theirs') {
      take(other)
      return
    }
    version.value = other.version
    theirs.value = null
    autosave.reset()
    autosave.touch()
    await autosave.flush()
  }

  function clear(): void {
    view.value = null
    form.value = null
    record.value = null
    recordReadAt.value = null
    ledger.value = []
    theirs.value = null
    loadProblem.value = null
    assessment.value = null
    changes.value = []
    autosave.reset()
  }

  return {
    view, form, record, recordReadAt, ledger, version, loadProblem, theirs, rereading, rules, rulesProblem, assessment, changes, heldBack,
    saveState: autosave.state, savedAt: autosave.savedAt, saveProblem: autosave.problem, dirty: autosave.dirty,
    touch: autosave.touch, flush: autosave.flush,
    load, loadRules, readRecordAgain, settle, take, clear,
  }
})
