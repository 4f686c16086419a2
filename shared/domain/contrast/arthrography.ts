import type { Agent } from './types'

/** Injected volumes by joint, mL (common practice; the shoulder's is seen in published technique pages). */
export const jointVolumesMl = {
  shoulder: { low: 12, high: 15 },
  hip: { low: 10, high: 15 },
  knee: { low: 30, high: 40 },
  elbow: { low: 6, high: 10 },
  wrist: { low: 3, high: 4 },
  ankle: { low: 6, high: 10 },
} as const
export type Joint = keyof typeof jointVolumesMl

/** Usual target in the joint, mmol/L. Source: AJR 2005;184:1754 (2 to 2.5; measured optimum 1.25 to 2 at 1.5 T). */
export const jointTargetMmolPerL = { low: 2, high: 2.5 } as const

/** Start imaging within this time, before the fluid is absorbed. */
export const jointImagingWithinMinutes = 30

/**
 * Volume of undiluted agent for a mixture.
 *
 * @param input target in mmol/L, final volume in mL, strength of the agent in mmol/mL (equal to mol/L)
 * @returns mL
 */
export function dilutionStockMl(input: { targetMmolPerL: number, finalVolumeMl: number, stockMmolPerMl: number }): number {
  return input.targetMmolPerL * input.finalVolumeMl / (1000 * input.stockMmolPerMl)
}

/** How many times the agent is diluted to reach a target: 200 means 1 in 200. */
export function dilutionFold(input: { targetMmolPerL: number, stockMmolPerMl: number }): number {
  return 1000 * input.stockMmolPerMl / input.targetMmolPerL
}

/** Concentration of a mixture in mmol/L from the agent's share by volume in percent. */
export function concentrationFromPercent(input: { stockMmolPerMl: number, percentByVolume: number }): number {
  return input.stockMmolPerMl * 1000 * input.percentByVolume / 100
}

export interface JointMixture {
  concentrationMmolPerL: number
  /** mL of the agent that would meet the target in the same final volume. */
  neededStockMl: number
  verdict: 'as-intended' | 'too-strong' | 'too-weak' | 'strength-mistaken'
  text: string
}

/** A mixture within a quarter of its target is taken as intended: 0.1 mL cannot be drawn up more exactly. */
const acceptedDeviation = 0.25

/**
 * Checks a mixture that somebody intends to draw up. Catches the classic error: a recipe for a 0.5 mol/L agent used with
 * one of 1 mol/L (gadobutrol) gives twice the concentration, and the joint goes dark; the reverse gives half.
 *
 * @param input agent, mL of it, final volume in mL, target in mmol/L
 */
export function checkJointMixture(
  input: { agent: Pick<Agent, 'name' | 'concentrationMmolPerMl'>, stockMl: number, finalVolumeMl: number, targetMmolPerL: number },
): JointMixture {
  const { agent, stockMl, finalVolumeMl, targetMmolPerL } = input
  const stockMmolPerMl = agent.concentrationMmolPerMl
  const concentrationMmolPerL = 1000 * stockMmolPerMl * stockMl / finalVolumeMl
  const neededStockMl = dilutionStockMl({ targetMmolPerL, finalVolumeMl, stockMmolPerMl })
  const near = (one: number, other: number) => Math.abs(one - other) <= acceptedDeviation * other
  const mixture = { concentrationMmolPerL, neededStockMl }
  const needs = `${neededStockMl.toFixed(3)} mL of ${agent.name} (${stockMmolPerMl} mol/L) in ${finalVolumeMl} mL gives ${targetMmolPerL} mmol/L`
  if (near(concentrationMmolPerL, targetMmolPerL)) return { ...mixture, verdict: 'as-intended', text: needs }
  const usualStock = 0.5
  const meantForUsual = stockMmolPerMl !== usualStock && near(1000 * usualStock * stockMl / finalVolumeMl, targetMmolPerL)
  if (meantForUsual) {
    return {
      ...mixture, verdict: 'strength-mistaken',
      text: `This is the volume for an agent of ${usualStock} mol/L; ${agent.name} has ${stockMmolPerMl} mol/L and would give ${concentrationMmolPerL.toFixed(2)} mmol/L. ${needs}`,
    }
  }
  const meantForStrong = stockMmolPerMl === usualStock && near(1000 * stockMl / finalVolumeMl, targetMmolPerL)
  if (meantForStrong) {
    return {
      ...mixture, verdict: 'strength-mistaken',
      text: `This is the volume for an agent of 1 mol/L; ${agent.name} has ${stockMmolPerMl} mol/L and would give ${concentrationMmolPerL.toFixed(2)} mmol/L. ${needs}`,
    }
  }
  const verdict = concentrationMmolPerL > targetMmolPerL ? 'too-strong' : 'too-weak'
  return { ...mixture, verdict, text: `The mixture would have ${concentrationMmolPerL.toFixed(2)} mmol/L. ${needs}` }
}
