import { defineStore } from 'pinia'
import { ref } from 'vue'

export interface Notice { id: number, kind: 'info' | 'caution' | 'stop' | 'clear', text: string }

/** What was just done or went wrong, said once on whichever page comes next; and the sentences for the live regions. */
export const useNoticesStore = defineStore('notices', () => {
  const notices = ref<Notice[]>([])
  /** Spoken politely. `serial` tells one sentence from the same one said again. */
  const polite = ref({ text: '', serial: 0 })
  const assertive = ref({ text: '', serial: 0 })
  let last = 0

  function show(kind: Notice['kind'], text: string): void {
    last += 1
    // More than three at once hide the page rather than inform.
    notices.value = [...notices.value.slice(-2), { id: last, kind, text }]
  }

  function dismiss(id: number): void {
    notices.value = notices.value.filter(notice => notice.id !== id)
  }

  function announce(text: string, urgency: 'polite' | 'assertive' = 'polite'): void {
    const region = urgency === 'polite' ? polite : assertive
    region.value = { text, serial: region.value.serial + 1 }
  }

  return { notices, polite, assertive, show, dismiss, announce }
})
