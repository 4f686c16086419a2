import type { AssessmentInputs, AssessmentRules } from '#shared/domain/assessment/types'
import { starterAgents } from '#shared/domain/contrast/agents'
import { starterQuestions } from '#shared/domain/guidance/questions/index'
import type { LabReading } from '#shared/domain/kidney/types'
import { starterPolicy } from '#shared/domain/policy/defaults'
import { quietScreening } from '../safety/situation'

export const rules: AssessmentRules = {
  guidance: { version: '2026.1', questions: starterQuestions }, policy: starterPolicy, agents: starterAgents,
}

/** A final serum creatinine in mg/dL. */
export function creatinine(value: number, collectedAt: string): LabReading {
  return {
    id: `creatinine-${collectedAt}`, analyte: 'creatinine', source: 'record', sourceLabel: 'Harbor Laboratory', value, comparator: null, unit: 'mg/dL',
    collectedAt, collectedText: collectedAt, precision: 'instant', issuedAt: collectedAt, status: 'final', refusal: null,
  }
}

/**
 * Marta Lindqvist of the example: 61 years, 74 kg, a first seizure with a cancer history, creatinine 0.94 mg/dL 19 days ago.
 * Her eGFR by CKD-EPI 2021 is 69.
 */
export const marta: AssessmentInputs = {
  now: '2026-12-01T20:32:00Z',
  plannedAt: null,
  questionId: 'first-seizure-adult',
  answers: { tumorInfection: 'yes' },
  priority: 'routine',
  setting: 'outpatient',
  patient: { birthDate: '1965-03-04', sex: 'female', weightKg: 74, weightAt: null, heightCm: null, heightAt: null },
  readings: [creatinine(0.94, '2026-11-12T14:00:00Z')],
  record: { state: 'complete', readAt: '2026-12-01T20:30:00Z' },
  screening: quietScreening,
  exposures: [],
}
