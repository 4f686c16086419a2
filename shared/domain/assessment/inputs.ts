import type { RecordReading } from '../record/types'
import type { RequestForm } from '../request/form'
import type { GadoliniumExposure } from '../safety/types'
import type { AssessmentInputs } from './types'

/** What is known of a request, on either side: the form as saved, the record as last read, doses given here before. */
export interface KnownOfRequest {
  form: RequestForm
  record: RecordReading | null
  ledger: readonly GadoliniumExposure[]
  patient: { birthDate: string, sex: AssessmentInputs['patient']['sex'] }
  /** Exam start, ISO instant; null while no slot is set. */
  plannedAt: string | null
  /** ISO instant. */
  now: string
}

/**
 * Gathers the engine's inputs. What the clinician typed leads over what the record says for weight and height; readings are
 * put side by side, for the engine to judge.
 */
export function inputsFrom({ form, record, ledger, patient, plannedAt, now }: KnownOfRequest): AssessmentInputs {
  return {
    now,
    plannedAt,
    questionId: form.questionId,
    answers: form.answers,
    priority: form.priority,
    setting: form.setting,
    patient: {
      birthDate: record?.patient?.birthDate ?? patient.birthDate,
      sex: record?.patient?.sex ?? patient.sex,
      weightKg: form.weightKg ?? record?.weight?.kg ?? null,
      weightAt: form.weightKg === null ? (record?.weight?.at ?? null) : null,
      heightCm: form.heightCm ?? record?.height?.cm ?? null,
      heightAt: form.heightCm === null ? (record?.height?.at ?? null) : null,
    },
    readings: [...(record?.readings ?? []), ...form.typedReadings],
    record: record ? { state: record.state, readAt: record.readAt } : { state: 'not-read', readAt: null },
    screening: form.screening,
    exposures: [...(record?.exposures ?? []), ...ledger],
  }
}
