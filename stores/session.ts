import { defineStore } from 'pinia'
import { ref } from 'vue'
import type { MeView } from '#shared/types/views'
import { useApi } from '~/composables/use-api'

/**
 * Who is signed in, with the badge counts. Comfort for the screens only: the server asks its own database on every call.
 */
export const useSessionStore = defineStore('session', () => {
  const me = ref<MeView | null>(null)
  /** Whether the server was asked at all; until then a missing `me` means nothing. */
  const asked = ref(false)
  const api = useApi()

  /** Asks again. `background` calls do not keep the session alive. @returns the status of the answer, 0 without a connection */
  async function refresh(options: { background?: boolean } = {}): Promise<number> {
    const result = await api.get<MeView>('/api/me', undefined, options)
    asked.value = true
    if (result.ok) {
      me.value = result.data
      return 200
    }
    // Without a connection we know nothing new; only a plain "no" signs out.
    if (result.problem.status === 401) me.value = null
    return result.problem.status
  }

  return { me, asked, refresh }
})
