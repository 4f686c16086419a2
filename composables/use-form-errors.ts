import type { ComputedRef, Ref } from 'vue'
import { computed, ref } from 'vue'
import type { z } from 'zod'
import type { ApiProblem } from '~/composables/use-api'

/** One thing wrong, at a path such as `screening.pregnancy` or `typedReadings[0].value`. */
export interface FieldProblem { path: string, message: string }

/** A path of keys as forms write it: numbers in brackets, names joined by dots. */
export function pathText(path: readonly PropertyKey[]): string {
  return path.reduce<string>((text, key) =>
    typeof key === 'number' ? `${text}[${key}]` : text === '' ? String(key) : `${text}.${String(key)}`, '')
}

/** zod's issues as field problems, the first one for each path. */
export function problemsOf(issues: readonly { path: readonly PropertyKey[], message: string }[]): FieldProblem[] {
  const first = new Map<string, FieldProblem>()
  for (const issue of issues) {
    const path = pathText(issue.path)
    if (!first.has(path)) first.set(path, { path, message: issue.message })
  }
  return [...first.values()]
}

export interface FormErrors {
  problems: Ref<FieldProblem[]>
  /** Grows with each refused try, which moves the focus to the summary. */
  attempt: Ref<number>
  hasErrors: ComputedRef<boolean>
  /** Words for one field, if something is wrong with it. */
  of: (path: string) => string | undefined
  /** Parses; on failure shows what is wrong and answers null. */
  check: <S extends z.ZodType>(schema: S, value: unknown) => z.output<S> | null
  refuse: (problems: FieldProblem[]) => void
  /** Shows what the server found wrong; false where it named no field. */
  fromServer: (problem: ApiProblem) => boolean
  /** Forgets what was said about a field once it changes. */
  clear: (path?: string) => void
}

/** Errors of a form whose values live elsewhere, such as the request draft. */
export function useFormErrors(): FormErrors {
  const problems = ref<FieldProblem[]>([])
  const attempt = ref(0)

  function refuse(found: FieldProblem[]): void {
    problems.value = found
    attempt.value += 1
  }

  return {
    problems,
    attempt,
    hasErrors: computed(() => problems.value.length > 0),
    of: path => problems.value.find(problem => problem.path === path)?.message,
    check(schema, value) {
      const result = schema.safeParse(value)
      if (result.success) {
        problems.value = []
        return result.data
      }
      refuse(problemsOf(result.error.issues))
      return null
    },
    refuse,
    fromServer(problem) {
      if (problem.errors.length === 0) return false
      refuse(problem.errors)
      return true
    },
    clear(path) {
      problems.value = path === undefined ? [] : problems.value.filter(problem => problem.path !== path)
    },
  }
}
