import type { Ref } from 'vue'
import { onBeforeUnmount, onMounted } from 'vue'

/** The present as an ISO instant: the server's while the page is built, then moving on in the browser every 20 seconds. */
export function useNow(): Ref<string> {
  const now = useState('now', () => new Date().toISOString())
  let timer: ReturnType<typeof setInterval> | undefined
  const tick = () => {
    now.value = new Date().toISOString()
  }
  onMounted(() => {
    tick()
    timer = setInterval(tick, 20_000)
  })
  onBeforeUnmount(() => clearInterval(timer))
  return now
}
