import type { Ref } from 'vue'
import { onBeforeUnmount, onMounted, ref } from 'vue'
import { useApi } from '~/composables/use-api'
import { useSignOut } from '~/composables/use-sign-out'
import { useSessionStore } from '~/stores/session'

/** The warning stands this long before the end, seconds (WCAG 2.2.1 asks for 20 at least). */
export const warningSeconds = 120
/** While somebody works, the server hears of it at most this often. */
const pingSeconds = 60
const storageKey = 'wherefore.activity'

/** What to do at a moment, from when somebody was last active. */
export function idleStep(lastActive: number, now: number, idleMinutes: number): { step: 'work' | 'warn' | 'end', secondsLeft: number } {
  const secondsLeft = Math.ceil((lastActive + idleMinutes * 60_000 - now) / 1000)
  return { step: secondsLeft <= 0 ? 'end' : secondsLeft <= warningSeconds ? 'warn' : 'work', secondsLeft: Math.max(0, secondsLeft) }
}

export interface Idle {
  warning: Ref<boolean>
  secondsLeft: Ref<number>
  stay: () => Promise<void>
  leave: () => Promise<void>
}

/** Watches for idleness in all tabs, warns before the session ends, and ends it. */
export function useIdle(): Idle {
  const session = useSessionStore()
  const api = useApi()
  const signOut = useSignOut()
  const route = useRoute()
  const warning = ref(false)
  const secondsLeft = ref(0)
  let lastActive = 0
  let lastPing = 0
  let ending = false
  let timer: ReturnType<typeof setInterval> | undefined

  function otherTabs(): number {
    return Number(localStorage.getItem(storageKey) ?? 0)
  }

  function noteActivity(): void {
    // Once warned, only an answer to the warning counts: a bumped mouse is no decision.
    if (warning.value || ending) return
    const now = Date.now()
    lastActive = now
    if (now - lastPing < pingSeconds * 1000) return
    lastPing = now
    localStorage.setItem(storageKey, String(now))
    void api.get('/api/me')
  }

  function look(): void {
    if (!session.me || ending) return
    lastActive = Math.max(lastActive, otherTabs())
    const { step, secondsLeft: left } = idleStep(lastActive, Date.now(), session.me.idleMinutes)
    secondsLeft.value = left
    warning.value = step === 'warn'
    if (step === 'end') void end()
  }

  async function end(): Promise<void> {
    ending = true
    await signOut('idle', route.fullPath)
  }

  const events = ['pointerdown', 'keydown', 'wheel', 'touchstart'] as const
  onMounted(() => {
    lastActive = Date.now()
    lastPing = lastActive
    localStorage.setItem(storageKey, String(lastActive))
    for (const event of events) window.addEventListener(event, noteActivity, { passive: true, capture: true })
    timer = setInterval(look, 1000)
  })
  onBeforeUnmount(() => {
    for (const event of events) window.removeEventListener(event, noteActivity, { capture: true })
    clearInterval(timer)
  })

  return {
    warning,
    secondsLeft,
    async stay() {
      warning.value = false
      lastPing = 0
      noteActivity()
    },
    async leave() {
      ending = true
      await signOut()
    },
  }
}
