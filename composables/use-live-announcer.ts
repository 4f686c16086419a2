import { useNoticesStore } from '~/stores/notices'

export interface Announcer {
  /** Says a sentence when the reader pauses: outcomes, saves, counts. */
  announce: (text: string) => void
  /** Interrupts: safety only. */
  alert: (text: string) => void
}

/** Speaks through the live regions that stand in app.vue from the first render on. */
export function useLiveAnnouncer(): Announcer {
  const notices = useNoticesStore()
  return {
    announce: text => notices.announce(text),
    alert: text => notices.announce(text, 'assertive'),
  }
}
