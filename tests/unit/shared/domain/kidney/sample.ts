import { starterPolicy } from '#shared/domain/policy/defaults'
import type { KidneyInput } from '#shared/domain/kidney/evaluate'
import type { LabReading } from '#shared/domain/kidney/types'
import type { KidneyScreening } from '#shared/domain/kidney/validity'

/** The present in these tests: a Tuesday morning in Chicago. */
export const now = '2026-12-01T15:00:00Z'

/** An instant some days, and hours, before the present. */
export function daysAgo(days: number, hours = 0): string {
  return new Date(Date.parse(now) - (days * 24 + hours) * 3_600_000).toISOString()
}

let count = 0

/** A final laboratory creatinine of 1.0 mg/dL, ten days old; changed as told. */
export function reading(changes: Partial<LabReading> = {}): LabReading {
  count += 1
  const collectedAt = changes.collectedAt === undefined ? daysAgo(10) : changes.collectedAt
  return {
    id: `reading-${count}`, analyte: 'creatinine', source: 'record', sourceLabel: 'Harbor Laboratory', value: 1, comparator: null, unit: 'mg/dL',
    collectedText: collectedAt, precision: 'instant', issuedAt: null, status: 'final', refusal: null, ...changes, collectedAt,
  }
}

/** Every kidney question answered without a risk. */
export const quiet: KidneyScreening = {
  kidneyDisease: 'no', kidneyRiskFactor: 'no', dialysis: 'none', acuteIllness: 'no', liverDisease: 'no', pregnancy: 'not-applicable',
}

export interface KidneyChanges extends Partial<Omit<KidneyInput, 'patient' | 'screening'>> {
  patient?: Partial<KidneyInput['patient']>
  screening?: Partial<KidneyScreening>
}

/** A woman of 50, outpatient, nothing to report, record fully read, one creatinine; changed as told. */
export function kidneyInput({ patient, screening, ...rest }: KidneyChanges = {}): KidneyInput {
  return {
    now, plannedAt: null, readings: [reading()], record: { state: 'complete' }, setting: 'outpatient', policy: starterPolicy,
    patient: { birthDate: '1976-05-04', sex: 'female', heightCm: null, heightAt: null, ...patient },
    screening: { ...quiet, ...screening },
    ...rest,
  }
}
