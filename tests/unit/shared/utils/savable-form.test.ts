import { describe, expect, it } from 'vitest'
import type { RequestForm } from '#shared/domain/request/form'
import { emptyScreening } from '#shared/domain/safety/screening'
import { savableForm } from '#shared/utils/savable-form'

const form: RequestForm = {
  region: 'brain', questionId: null, answers: {}, priority: 'routine', setting: 'outpatient', history: 'First seizure.', wish: null,
  weightKg: null, heightCm: null, screening: emptyScreening, typedReadings: [], screeningConfirmed: false, contactNumber: '',
  detailsByEmail: null, patientEmail: null,
}

describe('a form on its way to the server', () => {
  it('goes out whole while every field is sound', () => {
    expect(savableForm({ ...form, weightKg: 74 })).toEqual({ form: { ...form, weightKg: 74 }, heldBack: [] })
  })

  it('saves the rest while an e-mail address is half typed, and names what was held back', () => {
    const { form: saved, heldBack } = savableForm({ ...form, patientEmail: 'marta@' })
    expect(saved).toEqual(form)
    expect(heldBack.map(field => field.path)).toEqual(['patientEmail'])
  })

  it('never sends a weight that is no number', () => {
    const { form: saved, heldBack } = savableForm({ ...form, weightKg: Number.NaN })
    expect(saved.weightKg).toBeNull()
    expect(saved.history).toBe('First seizure.')
    expect(heldBack).toHaveLength(1)
  })
})
