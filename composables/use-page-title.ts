import type { MaybeRefOrGetter } from 'vue'
import { computed, toValue } from 'vue'

/** The page's title; begins with "Error:" while a refused form waits to be mended. */
export function usePageTitle(title: MaybeRefOrGetter<string>, hasErrors: MaybeRefOrGetter<boolean> = false): void {
  useHead({ title: computed(() => `${toValue(hasErrors) ? 'Error: ' : ''}${toValue(title)} · Wherefore`) })
}
