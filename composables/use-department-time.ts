import type { ComputedRef, Ref } from 'vue'
import { computed } from 'vue'
import { ageWords } from '#shared/domain/record/age-words'
import {
  birthDateWords, clockWords, dateWords, dayWords, dueWords, exactWords, momentWords, relativeWords,
} from '#shared/utils/time-words'
import { useNow } from '~/composables/use-now'
import { useSessionStore } from '~/stores/session'

export interface DepartmentTime {
  timeZone: ComputedRef<string>
  /** ISO instant, moving on by itself. */
  now: Ref<string>
  /** "14:32" */
  clock: (iso: string) => string
  /** "12 Nov" */
  date: (iso: string) => string
  /** "14:32" today, else "12 Nov, 14:32" */
  moment: (iso: string) => string
  /** "Wednesday 2 December" */
  day: (iso: string) => string
  /** For a title on hover. */
  exact: (iso: string) => string
  /** "2 minutes ago" */
  relative: (iso: string) => string
  /** "due today 17:00" */
  due: (iso: string) => string
  /** "4 Mar 1965" */
  birthDate: (birthDate: string | null) => string
  /** "61 years" */
  age: (birthDate: string) => string
}

/** Every time on a screen, in the department's zone. */
export function useDepartmentTime(): DepartmentTime {
  const session = useSessionStore()
  const now = useNow()
  const timeZone = computed(() => session.me?.department.timeZone ?? 'UTC')
  return {
    timeZone,
    now,
    clock: iso => clockWords(iso, timeZone.value),
    date: iso => dateWords(iso, timeZone.value, now.value),
    moment: iso => momentWords(iso, timeZone.value, now.value),
    day: iso => dayWords(iso, timeZone.value),
    exact: iso => exactWords(iso, timeZone.value),
    relative: iso => relativeWords(iso, now.value),
    due: iso => dueWords(iso, timeZone.value, now.value),
    birthDate: birthDateWords,
    age: birthDate => ageWords(birthDate, now.value, timeZone.value),
  }
}
