import type { ComputedRef } from 'vue'
import { computed, onBeforeUnmount, onMounted, watch } from 'vue'
import { assess } from '#shared/domain/assessment/assess'
import { differenceBetween } from '#shared/domain/assessment/difference'
import { inputsFrom } from '#shared/domain/assessment/inputs'
import type { Assessment, AssessmentInputs } from '#shared/domain/assessment/types'
import type { ContrastOutcome } from '#shared/domain/contrast/outcome'
import type { ClinicalQuestion } from '#shared/domain/guidance/types'
import type { Sex } from '#shared/domain/kidney/types'
import type { MissingField } from '#shared/domain/request/complete'
import { missingForSending } from '#shared/domain/request/complete'
import type { FormStep } from '#shared/domain/request/form'
import { screeningWords } from '#shared/utils/screening-words'
import { useLiveAnnouncer } from '~/composables/use-live-announcer'
import { useRequestDraftStore } from '~/stores/request-draft'

/** An answer is worked out this long after the last key press, milliseconds. */
const thinkMs = 300

/** The step on which a form path is asked. */
export function stepOf(path: string): FormStep {
  if (/^(?:questionId|region|answers|history|priority|setting)/.test(path)) return 'question'
  if (path.startsWith('wish')) return 'contrast'
  if (/^(?:screening|weightKg|heightCm|typedReadings|patientEmail|detailsByEmail)/.test(path)) return 'safety'
  return 'check'
}

/** A sex as stored with the patient; anything else counts as not known. */
export function sexOf(text: string): Sex {
  return text === 'female' || text === 'male' || text === 'other' ? text : 'unknown'
}

/** Names the question in the words beside it, so that a list of what is missing can be read alone. */
export function namedField(field: MissingField, question: ClinicalQuestion | null): MissingField {
  const [group, id] = field.path.split('.')
  const ask = group === 'answers'
    ? question?.deciders.find(decider => decider.id === id)?.ask
    : group === 'screening' ? Object.entries(screeningWords).find(([name]) => name === id)?.[1].ask : undefined
  return ask ? { path: field.path, message: `Answer “${ask}”, or say that it is not known.` } : field
}

/**
 * What an answer changed, for the sheet, and one sentence to be spoken; null where the outcome and the radiologist's word stayed.
 * Another question is a new beginning: its sentence alone is spoken.
 */
export function spokenChange(before: Assessment, after: Assessment): { texts: string[], spoken: string } | null {
  if (before.exam?.questionId !== after.exam?.questionId) return { texts: [], spoken: `${after.sentence}.` }
  const weighty = differenceBetween(before, after).filter(change => change.kind === 'outcome' || change.kind === 'hold')
  const first = weighty[0]
  return first ? { texts: weighty.map(change => change.text), spoken: `Suggestion changed. ${first.text}.` } : null
}

export interface RequestFormHelp {
  question: ComputedRef<ClinicalQuestion | null>
  inputs: ComputedRef<AssessmentInputs | null>
  /** What the request asks for: the clinician's own wish, else the suggestion. */
  asked: ComputedRef<ContrastOutcome | null>
  missing: ComputedRef<MissingField[]>
  missingOn: (step: FormStep) => MissingField[]
  /** Works the sheet out now, without waiting for a pause in typing. */
  assessNow: () => void
}

/** Keeps the reasoning sheet in step with the form, in the browser, by the same engine as the server's. */
export function useRequestForm(): RequestFormHelp {
  const draft = useRequestDraftStore()
  const { announce } = useLiveAnnouncer()
  let timer: ReturnType<typeof setTimeout> | undefined

  const question = computed(() => draft.rules?.guidance.questions.find(candidate => candidate.id === draft.form?.questionId) ?? null)

  function gather(): AssessmentInputs | null {
    const { form, view, record, ledger } = draft
    if (!form || !view) return null
    return inputsFrom({
      form: { ...form, weightKg: finite(form.weightKg), heightCm: finite(form.heightCm) },
      record,
      ledger,
      patient: { birthDate: view.patient.birthDate, sex: sexOf(view.patient.sex) },
      plannedAt: null,
      now: new Date().toISOString(),
    })
  }

  const inputs = computed(gather)

  function assessNow(): void {
    clearTimeout(timer)
    const current = gather()
    if (!draft.rules || !current) return
    const before = draft.assessment
    const after = assess(current, draft.rules)
    draft.assessment = after
    const change = before ? spokenChange(before, after) : null
    if (change) {
      draft.changes = change.texts
      announce(change.spoken)
    }
  }

  watch(() => [draft.form, draft.record, draft.ledger, draft.rules], () => {
    clearTimeout(timer)
    timer = setTimeout(assessNow, thinkMs)
  }, { deep: true })
  onMounted(async () => {
    await draft.loadRules()
    assessNow()
  })
  onBeforeUnmount(() => clearTimeout(timer))

  const asked = computed(() => draft.form?.wish?.contrast ?? draft.assessment?.suggestion ?? null)
  const missing = computed(() => (draft.form && draft.assessment && draft.rules && inputs.value
    ? missingForSending(draft.form, { question: question.value, assessment: draft.assessment, inputs: inputs.value, policy: draft.rules.policy })
        .map(field => namedField(field, question.value))
    : []))

  return { question, inputs, asked, missing, missingOn: step => missing.value.filter(field => stepOf(field.path) === step), assessNow }
}

/** A number still being typed counts as none. */
function finite(value: number | null): number | null {
  return value === null || Number.isNaN(value) ? null : value
}
