import type { Agent, Dose, DoseCheck } from './types'

/** Weights outside are confirmed by a person; the labels' tables run from 2.5 to 140 kg, without a cap. */
export const labelTableWeightsKg = { low: 2.5, high: 140 } as const

export interface DoseInput {
  agent: Pick<Agent, 'doseMmolPerKg' | 'concentrationMmolPerMl' | 'youngestLabelledAgeYears'>
  /** Actual body weight; null where unknown. */
  weightKg: number | null
  /** Null where unknown: then the labelled age is not checked. */
  ageYears: number | null
  /** Where another dose than the labelled adult one is meant, mmol/kg. */
  doseMmolPerKg?: number
  limitsKg?: { low: number, high: number }
}

/** A missing or impossible weight gives no dose at all, never a default weight. */
export type DoseResult = { status: 'ok', dose: Dose } | { status: 'bad-weight' }

/** 12.4 times 0.1 is a hair off 1.24 in floating point. */
const tolerance = 1e-9

/**
 * A volume or amount as shown: to 0.01 below 5, else to 0.1, rounded half up.
 *
 * @param value mL or mmol
 */
export function displayVolume(value: number): string {
  const decimals = value < 5 - tolerance ? 2 : 1
  const scale = 10 ** decimals
  return (Math.floor(value * scale + 0.5 + tolerance) / scale).toFixed(decimals)
}

/** Whether a patient is younger than an agent's label reaches; without labelled children that means under 18. */
export function isBelowLabel(agent: Pick<Agent, 'youngestLabelledAgeYears'>, ageYears: number | null): boolean {
  return ageYears !== null && ageYears < (agent.youngestLabelledAgeYears ?? 18)
}

/**
 * Amount and volume by weight, for checking only: a person prescribes. Unusual weights and ages below the label are
 * marked, not refused, since both are a radiologist's call.
 * Source: the agents' US labels, dosing tables.
 *
 * @returns mmol and mL, unrounded and for show, with the checks that a person must make; or `bad-weight`
 */
export function computeDose(input: DoseInput): DoseResult {
  const { agent, weightKg, ageYears, limitsKg = labelTableWeightsKg } = input
  if (weightKg === null || !Number.isFinite(weightKg) || weightKg <= 0) return { status: 'bad-weight' }
  const doseMmolPerKg = input.doseMmolPerKg ?? agent.doseMmolPerKg
  const amountMmol = weightKg * doseMmolPerKg
  const volumeMl = amountMmol / agent.concentrationMmolPerMl
  const checks: DoseCheck[] = []
  if (isBelowLabel(agent, ageYears)) checks.push('age-below-label')
  if (weightKg < limitsKg.low || weightKg > limitsKg.high) checks.push('check-weight')
  return {
    status: 'ok',
    dose: {
      doseMmolPerKg, weightKg, amountMmol, volumeMl, volumeDisplay: displayVolume(volumeMl), amountDisplay: displayVolume(amountMmol),
      checks: checks.length === 0 ? ['ok'] : checks,
    },
  }
}
