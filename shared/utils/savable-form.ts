import { requestFormSchema } from '../schemas/requests'
import type { RequestForm } from '../domain/request/form'

/** A form that the server will take, with the fields that were held back because what they hold is not finished. */
export interface SavableForm { form: RequestForm, heldBack: { path: string, message: string }[] }

/**
 * A half-typed weight or e-mail address must not stop the rest from being saved: such fields go out empty and are named.
 * What was typed stays in the form on the screen.
 */
export function savableForm(form: RequestForm): SavableForm {
  const first = requestFormSchema.safeParse(form)
  if (first.success) return { form: first.data, heldBack: [] }
  const heldBack = new Map<string, { path: string, message: string }>()
  const copy: RequestForm = { ...form }
  for (const issue of first.error.issues) {
    const field = issue.path[0]
    if (field === 'weightKg' || field === 'heightCm' || field === 'patientEmail') copy[field] = null
    else if (field === 'typedReadings') copy.typedReadings = []
    else continue
    if (!heldBack.has(field)) heldBack.set(field, { path: field, message: issue.message })
  }
  const second = requestFormSchema.safeParse(copy)
  return { form: second.success ? second.data : copy, heldBack: [...heldBack.values()] }
}
