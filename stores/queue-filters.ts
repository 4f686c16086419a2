import { defineStore } from 'pinia'
import { ref } from 'vue'

/** Where somebody was in each long list, so that coming back finds it as it was left. Holds no patient data. */
export const useQueueFilters = defineStore('queue-filters', () => {
  /** Last address query of a list, by its path. */
  const queries = ref<Record<string, Record<string, string>>>({})
  /** Last scroll position of a list in pixels, by its path. */
  const places = ref<Record<string, number>>({})

  function keepQuery(path: string, query: Record<string, string>) {
    queries.value[path] = query
  }

  function keepPlace(path: string, pixels: number) {
    places.value[path] = pixels
  }

  return { queries, places, keepQuery, keepPlace }
})
