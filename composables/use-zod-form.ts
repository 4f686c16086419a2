import type { GenericObject, TypedSchema } from 'vee-validate'
import type { ComputedRef, Ref, WritableComputedRef } from 'vue'
import { useForm } from 'vee-validate'
import { computed, ref } from 'vue'
import type { z } from 'zod'
import type { ApiProblem } from '~/composables/use-api'
import type { FieldProblem } from '~/composables/use-form-errors'
import { pathText } from '~/composables/use-form-errors'

type ObjectSchema = z.ZodType<GenericObject, GenericObject>

/** Lets vee-validate 4 check with a zod 4 schema, so that a form and its route share one. */
export function typedSchema<S extends ObjectSchema>(schema: S): TypedSchema<z.input<S>, z.output<S>> {
  return {
    __type: 'VVTypedSchema',
    async parse(values) {
      const result = await schema.safeParseAsync(values)
      if (result.success) return { value: result.data, errors: [] }
      const messages = new Map<string, string[]>()
      for (const issue of result.error.issues) {
        const path = pathText(issue.path)
        messages.set(path, [...(messages.get(path) ?? []), issue.message])
      }
      return { errors: [...messages].map(([path, errors]) => ({ path, errors })) }
    },
    cast: values => values as z.input<S>,
  }
}

export interface ZodForm<S extends ObjectSchema> {
  /** A two-way value for one top-level field. */
  field: <Key extends keyof z.input<S> & string>(key: Key) => WritableComputedRef<z.input<S>[Key]>
  error: (path: string) => string | undefined
  problems: ComputedRef<FieldProblem[]>
  /** Grows with each refused try; the error summary then takes the focus. */
  attempt: Ref<number>
  pending: Ref<boolean>
  /** Checks everything, then hands over the parsed values. Nothing is checked while typing before the first try. */
  submit: (handle: (values: z.output<S>) => Promise<void> | void) => (event?: Event) => Promise<void>
  refuse: (problems: readonly FieldProblem[]) => void
  /** Shows the server's field errors; false where it named none. */
  fromServer: (problem: ApiProblem) => boolean
  reset: (values: z.input<S>) => void
}

/** A form on one zod schema: vee-validate holds values and errors. */
export function useZodForm<S extends ObjectSchema>(schema: S, initial: z.input<S>): ZodForm<S> {
  const form = useForm<GenericObject, z.output<S>>({ validationSchema: typedSchema(schema), initialValues: { ...initial } })
  const attempt = ref(0)

  function refuse(found: readonly FieldProblem[]): void {
    form.setErrors(Object.fromEntries(found.map(problem => [problem.path, problem.message])))
    attempt.value += 1
  }

  return {
    field: key => computed({
      get: () => form.values[key],
      set: value => form.setFieldValue(key, value, attempt.value > 0),
    }),
    error: path => (attempt.value > 0 ? form.errors.value[path] : undefined),
    problems: computed(() => (attempt.value > 0
      ? Object.entries(form.errors.value).flatMap(([path, message]) => (message ? [{ path, message }] : []))
      : [])),
    attempt,
    pending: form.isSubmitting,
    submit: (handle) => {
      const send = form.handleSubmit(values => handle(values), () => {
        attempt.value += 1
      })
      return async (event) => {
        event?.preventDefault()
        if (!form.isSubmitting.value) await send(event)
      }
    },
    refuse,
    fromServer(problem) {
      if (problem.errors.length === 0) return false
      refuse(problem.errors)
      return true
    },
    reset(next) {
      attempt.value = 0
      form.resetForm({ values: { ...next } }, { force: true })
    },
  }
}
