import type { Age, AgeRange } from './age'
import { bedsideSchwartz, ckdEpi2021Creatinine, ckdEpi2021CreatinineCystatinC, ckidU25Creatinine, oldestPlausibleAge } from './egfr'
import { displayGfr, gfrStage } from './stage'
import type { Comparator, EquationId, GfrEstimate, Sex } from './types'

/** Names shown beside a number, with the year of the equation. */
export const equationLabels = {
  'ckd-epi-2021-cr': 'CKD-EPI 2021',
  'ckd-epi-2021-cr-cys': 'CKD-EPI 2021 with cystatin C',
  'ckd-epi-2012-cys': 'CKD-EPI 2012, cystatin C',
  'ckid-u25-cr': 'CKiD U25 (2021)',
  'schwartz-2009': 'Bedside Schwartz (2009)',
} as const satisfies Record<EquationId, string>

/** Between these creatinine eGFRs a cystatin C leads: close to the decision at 30 it is the better estimate (NIDDK). */
const cystatinLeads = { low: 20, high: 45 } as const

export interface EstimateInput {
  creatinine: { mgPerDl: number, comparator: Comparator | null }
  /** Drawn within seven days of the creatinine, else null. */
  cystatinC: { mgPerL: number, comparator: Comparator | null } | null
  /** At the sample; null where the birth date cannot be read. */
  ages: AgeRange | null
  sex: Sex
  /** Null where unknown or too old for a growing child. */
  heightCm: number | null
  /** Thresholds that the display must not contradict, besides the KDIGO edges. */
  gates: readonly number[]
}

export type EstimateOutcome =
  | { status: 'estimated', egfr: GfrEstimate, beside: GfrEstimate | null, gateEgfr: number }
  | { status: 'needs-sex', range: { low: GfrEstimate, high: GfrEstimate }, beside: GfrEstimate | null, gateEgfr: number }
  | { status: 'needs-height' }
  | { status: 'no-equation', why: 'infant' | 'birth-date' }

interface Candidate { status: 'ok', main: GfrEstimate, beside: GfrEstimate | null, gateEgfr: number }
type Refused = { status: 'needs-height' } | { status: 'no-equation', why: 'infant' | 'birth-date' }

/** A creatinine below a limit means an eGFR of at least the computed one. */
function boundOf(comparator: Comparator | null): GfrEstimate['bound'] {
  if (comparator === null) return 'exact'
  return comparator === '<' || comparator === '<=' ? 'at-least' : 'at-most'
}

/** The bound of a number made of two; null where they point to opposite sides and nothing is known. */
function joinBounds(a: GfrEstimate['bound'], b: GfrEstimate['bound']): GfrEstimate['bound'] | null {
  if (a === b || b === 'exact') return a
  return a === 'exact' ? b : null
}

/** The lowest value that may be true: an upper bound leaves everything below it open. */
function lowest(estimate: GfrEstimate): number {
  return estimate.bound === 'at-most' ? 0 : estimate.value
}

function estimate(
  value: number, equation: EquationId, ageYears: number, bound: GfrEstimate['bound'], gates: readonly number[],
): GfrEstimate {
  return {
    value, display: displayGfr(value, bound, gates), bound, equation, equationLabel: equationLabels[equation], ageYears,
    stage: gfrStage(value),
  }
}

function adult(input: EstimateInput, { completedYears: ageYears }: Age, sex: 'female' | 'male'): Candidate | Refused {
  const { creatinine, cystatinC, gates } = input
  const result = ckdEpi2021Creatinine({ ageYears, sex, creatinine: { value: creatinine.mgPerDl, unit: 'mg/dL' } })
  if (result.status !== 'ok') return { status: 'no-equation', why: 'birth-date' }
  const bound = boundOf(creatinine.comparator)
  const alone = estimate(result.egfr, 'ckd-epi-2021-cr', ageYears, bound, gates)
  const joined = cystatinC === null ? null : joinBounds(bound, boundOf(cystatinC.comparator))
  const both = ckdEpi2021CreatinineCystatinC({
    ageYears, sex, creatinineMgPerDl: creatinine.mgPerDl, cystatinCMgPerL: cystatinC?.mgPerL ?? null,
  })
  if (joined === null || both.status !== 'ok') return { status: 'ok', main: alone, beside: null, gateEgfr: lowest(alone) }
  const combined = estimate(both.egfr, 'ckd-epi-2021-cr-cys', ageYears, joined, gates)
  return alone.value >= cystatinLeads.low && alone.value <= cystatinLeads.high
    ? { status: 'ok', main: combined, beside: alone, gateEgfr: lowest(combined) }
    : { status: 'ok', main: alone, beside: combined, gateEgfr: Math.min(lowest(alone), lowest(combined)) }
}

function child(input: EstimateInput, { decimalYears: ageYears }: Age, sex: 'female' | 'male'): Candidate | Refused {
  const { heightCm, gates } = input
  const creatinine = { value: input.creatinine.mgPerDl, unit: 'mg/dL' }
  const u25 = ckidU25Creatinine({ ageYears, sex, heightCm, creatinine })
  if (u25.status !== 'ok') return { status: 'needs-height' }
  const bound = boundOf(input.creatinine.comparator)
  const main = estimate(u25.egfr, 'ckid-u25-cr', ageYears, bound, gates)
  const schwartz = bedsideSchwartz({ ageYears, heightCm, creatinine })
  const beside = schwartz.status === 'ok' ? estimate(schwartz.egfr, 'schwartz-2009', ageYears, bound, gates) : null
  return { status: 'ok', main, beside, gateEgfr: lowest(main) }
}

function candidate(input: EstimateInput, age: Age, sex: 'female' | 'male'): Candidate | Refused {
  if (age.completedYears < 1) return { status: 'no-equation', why: 'infant' }
  return age.completedYears >= 18 ? adult(input, age, sex) : child(input, age, sex)
}

/**
 * Estimates GFR with the equation that age and data allow.
 * Under 1 year none; 1 to 17 CKiD U25 with bedside Schwartz beside it, only with a height; from 18 CKD-EPI 2021, with
 * cystatin C beside it or, between 20 and 45, leading. Where the sex or the birth date leaves several values open, the
 * lowest is the one to reckon with (each equation moves one way with age within a span, so the ends of the span suffice).
 */
export function estimateGfr(input: EstimateInput): EstimateOutcome {
  const { ages, sex } = input
  if (ages === null || ages.oldest.completedYears > oldestPlausibleAge) return { status: 'no-equation', why: 'birth-date' }
  const sexes = sex === 'female' || sex === 'male' ? [sex] : (['female', 'male'] as const)
  const spans = ages.exact ? [ages.youngest] : [ages.youngest, ages.oldest]
  const candidates: Candidate[] = []
  for (const age of spans) {
    for (const oneSex of sexes) {
      const result = candidate(input, age, oneSex)
      if (result.status !== 'ok') return result
      candidates.push(result)
    }
  }
  candidates.sort((a, b) => a.main.value - b.main.value)
  const low = candidates[0]
  const high = candidates.at(-1)
  if (low === undefined || high === undefined) return { status: 'no-equation', why: 'birth-date' }
  const gateEgfr = Math.min(...candidates.map(one => one.gateEgfr))
  return sexes.length === 1
    ? { status: 'estimated', egfr: low.main, beside: low.beside, gateEgfr }
    : { status: 'needs-sex', range: { low: low.main, high: high.main }, beside: low.beside, gateEgfr }
}
