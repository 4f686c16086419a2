import type { SafetyContext } from './context'
import type { SafetyFinding } from './types'
import { mayBeIntravenous } from './context'
import { finding } from './finding'

/** Doses by vein follow body weight: a missing one is needed, one outside the label's tables is confirmed by a person. */
export function findWeight(context: SafetyContext): SafetyFinding[] {
  if (!mayBeIntravenous(context)) return []
  const kg = context.patient.weightKg
  const { value: { low, high }, source } = context.policy.weightLimitsKg
  if (kg === null || !Number.isFinite(kg) || kg <= 0) {
    return [finding({
      id: 'weight-missing', topic: 'weight', severity: 'caution',
      text: 'No weight is known: no dose can be worked out.',
      plain: 'We need to know how much you weigh.',
      addsNeeds: ['weight'], source,
    })]
  }
  if (kg >= low && kg <= high) return []
  return [finding({
    id: kg < low ? 'weight-below-tables' : 'weight-above-tables', topic: 'weight', severity: 'caution',
    text: `${kg} kg is outside the label's dose tables (${low} to ${high} kg): a person confirms the weight and the radiologist sets the dose.`,
    plain: 'We check your weight again before we work out the amount of contrast.',
    addsNeeds: ['weight'], source,
  })]
}
