import { starterAgents } from '#shared/domain/contrast/agents'
import type { KidneyFunction } from '#shared/domain/kidney/types'
import { starterPolicy } from '#shared/domain/policy/defaults'
import { ageBounds } from '#shared/domain/safety/age'
import type { SafetyContext } from '#shared/domain/safety/context'
import { emptyScreening } from '#shared/domain/safety/screening'
import type { ScreeningAnswers } from '#shared/domain/safety/types'

/** Every safety question answered without a risk. */
export const quietScreening: ScreeningAnswers = {
  ...emptyScreening,
  kidneyDisease: 'no', kidneyRiskFactor: 'no', dialysis: 'none', acuteIllness: 'no', liverDisease: 'no', earlierReaction: 'no',
  asthma: 'no', pregnancy: 'not-applicable', breastfeeding: 'not-applicable', nephrogenicSystemicFibrosis: 'no', implants: 'no',
}

/** Kidneys that raise no question: eGFR 95 from a creatinine of yesterday. */
export const quietKidney: KidneyFunction = {
  status: 'estimated', headline: 'eGFR 95', egfr: null, beside: null, range: null, gateEgfr: 95, creatinine: null, ageWords: '1 day old',
  currency: 'current', windowDays: 42, windowReason: 'A risk factor is stated', cautions: [], passedOver: [], series: [],
  injury: { status: 'none', stageCurrent: 0, stagePeak: 0, steady: true, rule: '', text: '' },
}

const now = '2026-12-01T15:00:00Z'

export interface Situation extends Partial<Omit<SafetyContext, 'screening' | 'kidney' | 'patient' | 'age'>> {
  screening?: Partial<ScreeningAnswers>
  kidney?: Partial<KidneyFunction>
  patient?: Partial<SafetyContext['patient']>
}

/** A man of 46, 80 kg, outpatient, contrast by vein wanted, nothing found; changed as told. */
export function situation({ screening, kidney, patient, ...rest }: Situation = {}): SafetyContext {
  const person = { birthDate: '1980-03-02', sex: 'male' as const, weightKg: 80, weightAt: null, heightCm: null, heightAt: null, ...patient }
  const at = rest.at ?? now
  return {
    outcome: 'iv-with-and-without', now, at, planned: false, priority: 'routine', setting: 'outpatient',
    patient: person, age: ageBounds(person.birthDate, at, starterPolicy.department.timeZone),
    screening: { ...quietScreening, ...screening }, exposures: [], recordState: 'complete',
    kidney: { ...quietKidney, ...kidney }, policy: starterPolicy, agents: starterAgents,
    ...rest,
  }
}
