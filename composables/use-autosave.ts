import type { Ref } from 'vue'
import { computed, ref } from 'vue'
import type { ApiProblem, ApiResult } from '~/composables/use-api'

/** `waiting`: typed, not yet on its way. `failed`: not saved, tried again by itself. `conflict`: changed elsewhere, a person decides. */
export type SaveState = 'idle' | 'waiting' | 'saving' | 'saved' | 'failed' | 'conflict'

/** What is typed is on its way within this time, milliseconds. */
export const saveDelayMs = 1_200
/** After a failure: each try waits longer, milliseconds. */
const retryMs = [4_000, 10_000, 30_000]

export interface Autosave {
  state: Ref<SaveState>
  savedAt: Ref<string | null>
  problem: Ref<ApiProblem | null>
  /** Whether something typed is not saved yet. */
  dirty: Ref<boolean>
  /** Something was typed. */
  touch: () => void
  /** Saves at once what waits; true when nothing is left unsaved. */
  flush: () => Promise<boolean>
  /** After a conflict was settled or another draft was opened. */
  reset: () => void
}

/**
 * Saves after a pause in typing, one write at a time: what is typed during a write goes out with the next. A failed write is
 * tried again; a write overtaken by somebody else's stops until a person decides.
 */
export function createAutosave(write: () => Promise<ApiResult<unknown>>): Autosave {
  const state = ref<SaveState>('idle')
  const savedAt = ref<string | null>(null)
  const problem = ref<ApiProblem | null>(null)
  const typed = ref(0)
  const saved = ref(0)
  const dirty = computed(() => typed.value > saved.value)
  let timer: ReturnType<typeof setTimeout> | undefined
  let running: Promise<void> | null = null
  let failures = 0
  let generation = 0

  function schedule(delay: number): void {
    clearTimeout(timer)
    timer = setTimeout(() => void run(), delay)
  }

  function touch(): void {
    typed.value += 1
    if (state.value === 'conflict') return
    if (state.value !== 'saving') state.value = 'waiting'
    if (!running) schedule(saveDelayMs)
  }

  function run(): Promise<void> {
    running ??= once().finally(() => {
      running = null
    })
    return running
  }

  async function once(): Promise<void> {
    clearTimeout(timer)
    const covers = typed.value
    const belongsTo = generation
    state.value = 'saving'
    const result = await write()
    if (belongsTo !== generation) return
    if (result.ok) {
      failures = 0
      problem.value = null
      saved.value = covers
      savedAt.value = new Date().toISOString()
      state.value = dirty.value ? 'waiting' : 'saved'
      if (dirty.value) schedule(saveDelayMs)
      return
    }
    problem.value = result.problem
    if (result.problem.status === 412 || result.problem.status === 409) {
      state.value = 'conflict'
      return
    }
    state.value = 'failed'
    schedule(retryMs[Math.min(failures, retryMs.length - 1)] ?? 30_000)
    failures += 1
  }

  return {
    state,
    savedAt,
    problem,
    dirty,
    touch,
    async flush() {
      if (running) await running
      if (dirty.value && state.value !== 'conflict') await run()
      return !dirty.value
    },
    reset() {
      generation += 1
      clearTimeout(timer)
      failures = 0
      saved.value = typed.value
      problem.value = null
      savedAt.value = null
      state.value = 'idle'
    },
  }
}
