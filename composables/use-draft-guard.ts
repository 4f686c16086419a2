import { onBeforeUnmount, onMounted, ref, watch } from 'vue'
import type { RouteLocationNormalized } from 'vue-router'
import { onBeforeRouteLeave, onBeforeRouteUpdate } from 'vue-router'
import { useRequestDraftStore } from '~/stores/request-draft'

/** Saves while somebody types and holds them back from leaving with something unsaved. */
export function useDraftGuard() {
  const draft = useRequestDraftStore()
  /** Where to go once the person says that unsaved input may be lost. */
  const leavingTo = ref<string | null>(null)
  let mayLeave = false

  watch(() => draft.form, (now, before) => {
    // Another object means another draft was opened; the same one was typed into.
    if (now && now === before) draft.touch()
  }, { deep: true })

  async function guard(to: RouteLocationNormalized): Promise<boolean> {
    if (mayLeave || !draft.view) return true
    // From step to step the draft stays open.
    if (to.path.startsWith('/requests/new') && to.query.draft === draft.view.id) return true
    if (await draft.flush()) return true
    leavingTo.value = to.fullPath
    return false
  }
  onBeforeRouteLeave(guard)
  onBeforeRouteUpdate(guard)

  function beforeUnload(event: BeforeUnloadEvent): void {
    if (!draft.dirty) return
    void draft.flush()
    event.preventDefault()
  }
  function whenHidden(): void {
    if (document.visibilityState === 'hidden') void draft.flush()
  }

  onMounted(() => {
    window.addEventListener('beforeunload', beforeUnload)
    document.addEventListener('visibilitychange', whenHidden)
  })
  onBeforeUnmount(() => {
    window.removeEventListener('beforeunload', beforeUnload)
    document.removeEventListener('visibilitychange', whenHidden)
  })

  async function leaveAnyway(): Promise<void> {
    const target = leavingTo.value
    mayLeave = true
    leavingTo.value = null
    draft.clear()
    if (target) await navigateTo(target)
  }

  /** For leaving on purpose: after sending or discarding. */
  function allowLeaving(): void {
    mayLeave = true
  }

  return { leavingTo, leaveAnyway, allowLeaving }
}
