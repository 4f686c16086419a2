import { bedsideSchwartz } from './egfr'
import { dayMs, hourMs } from './instant'
import type { Comparator, InjuryAssessment } from './types'

/** One point of a creatinine series. */
export interface InjuryPoint { atMs: number, umolPerL: number, comparator: Comparator | null }

export interface InjuryInput {
  /** In any order; repeats allowed. */
  series: readonly InjuryPoint[]
  /** Decimal years at the last sample, null where unknown. */
  ageYears: number | null
  heightCm: number | null
  /** `acute-rrt`: dialysis begun for the injury itself. */
  dialysis: 'none' | 'chronic' | 'acute-rrt'
}

type Stage = 0 | 1 | 2 | 3

/** KDIGO prints the step of 0.3 mg/dL as 26.5 µmol/L, and 4.0 mg/dL as 353.6 µmol/L. */
const stepUmolPerL = 26.5
const stage3UmolPerL = 353.6
/** 1.2 - 0.9 falls short of 0.3 in floating point. */
const tolerance = 1e-6

function reaches(value: number, limit: number): boolean {
  return value >= limit - tolerance
}

/** Oldest first, one point an instant, the higher one where two share it. */
function tidy(series: readonly InjuryPoint[]): InjuryPoint[] {
  const byInstant = new Map<number, InjuryPoint>()
  for (const point of series) {
    const held = byInstant.get(point.atMs)
    if (held === undefined || point.umolPerL > held.umolPerL) byInstant.set(point.atMs, point)
  }
  return [...byInstant.values()].sort((a, b) => a.atMs - b.atMs)
}

function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b)
  const middle = sorted.length / 2
  const upper = sorted[Math.floor(middle)] ?? 0
  return Number.isInteger(middle) ? ((sorted[middle - 1] ?? upper) + upper) / 2 : upper
}

function stageOfRatio(ratio: number): Stage {
  return reaches(ratio, 3) ? 3 : reaches(ratio, 2) ? 2 : 1
}

/** The routes to stage 3 besides the ratio; they count only once the definition is met. */
function stage3Routes(umolPerL: number, input: InjuryInput): string[] {
  const rules: string[] = []
  if (reaches(umolPerL, stage3UmolPerL)) rules.push('value>=4.0mg/dL with AKI met')
  if (input.ageYears !== null && input.ageYears < 18) {
    const child = bedsideSchwartz({ ageYears: input.ageYears, heightCm: input.heightCm, creatinine: { value: umolPerL, unit: 'umol/L' } })
    if (child.status === 'ok' && child.egfr < 35) rules.push('age<18 and eGFR<35')
  }
  return rules
}

/** The points of the seven days before one, so that a long record is not walked again for each of its points. */
function weekBefore(points: readonly InjuryPoint[], index: number): InjuryPoint[] {
  const atMs = points[index]?.atMs ?? 0
  let first = index
  while (first > 0 && atMs - (points[first - 1]?.atMs ?? 0) <= 7 * dayMs) first -= 1
  return points.slice(first, index)
}

/** KDIGO definition and stage of one point against those before it. */
function judgePoint(points: readonly InjuryPoint[], index: number, input: InjuryInput): { stage: Stage, rules: string[] } {
  const point = points[index]
  if (point === undefined) return { stage: 0, rules: [] }
  const week = weekBefore(points, index)
  const rose = week.some(earlier => point.atMs - earlier.atMs <= 48 * hourMs && reaches(point.umolPerL - earlier.umolPerL, stepUmolPerL))
  const ratio = week.length === 0 ? 1 : point.umolPerL / Math.min(...week.map(earlier => earlier.umolPerL))
  const rules: string[] = []
  if (rose) rules.push('rise>=0.3mg/dL in 48h')
  if (reaches(ratio, 1.5)) rules.push('ratio>=1.5 in 7d')
  if (rules.length === 0) return { stage: 0, rules }
  if (reaches(ratio, 2)) rules.push('ratio>=2')
  if (reaches(ratio, 3)) rules.push('ratio>=3')
  const routes = stage3Routes(point.umolPerL, input)
  return { stage: routes.length > 0 ? 3 : stageOfRatio(ratio), rules: [...rules, ...routes] }
}

/** Whether creatinine moved, up or down, in the week before the last value. A fall can hide a GFR that was far lower. */
function isUnsteady(points: readonly InjuryPoint[], lastMs: number): boolean {
  return points.some((later, index) => lastMs - later.atMs <= 7 * dayMs && weekBefore(points, index).some((earlier) => {
    const high = Math.max(later.umolPerL, earlier.umolPerL)
    const low = Math.min(later.umolPerL, earlier.umolPerL)
    return reaches(high / low, 1.5) || (later.atMs - earlier.atMs <= 48 * hourMs && reaches(high - low, stepUmolPerL))
  }))
}

function insufficient(rule: string, text: string): InjuryAssessment {
  return { status: 'insufficient', stageCurrent: null, stagePeak: null, steady: null, rule, text }
}

/**
 * Looks for acute kidney injury in a creatinine series.
 * Definition and stages: KDIGO Clinical Practice Guideline for AKI, Kidney Int Suppl 2012;2:1-138, table 2. Urine output
 * is not in the data. The median of the past year as baseline follows the NHS England algorithm of 2014.
 * Windows are inclusive. A series with a bound ("<0.2") that shows no injury is `insufficient`, since a bound cannot exclude one.
 *
 * @returns stages 0 to 3 at the last value and at the peak; `insufficient` never means "none"
 */
export function assessInjury(input: InjuryInput): InjuryAssessment {
  if (input.dialysis === 'chronic') {
    return {
      status: 'not-applicable', stageCurrent: null, stagePeak: null, steady: false,
      rule: 'chronic dialysis: neither eGFR nor creatinine-based AKI staging applies',
      text: 'On dialysis: creatinine says nothing about acute kidney injury',
    }
  }
  if (input.dialysis === 'acute-rrt') {
    return {
      status: 'aki', stageCurrent: 3, stagePeak: 3, steady: false, rule: 'renal replacement therapy started for AKI',
      text: 'Acute kidney injury, stage 3: dialysis was started for it',
    }
  }
  const points = tidy(input.series)
  const last = points.at(-1)
  if (last === undefined) return insufficient('no values', 'Acute kidney injury cannot be judged without a creatinine')
  if (points.length === 1) return insufficient('one value only', 'Acute kidney injury cannot be judged from one creatinine')
  const others = points.slice(0, -1).filter(point => last.atMs - point.atMs <= 365 * dayMs)
  if (others.length === 0) {
    return insufficient('no other value in the last 365 days', 'Acute kidney injury cannot be judged: the other results are more than a year older')
  }
  return judgeSeries(points, last, others, input)
}

function judgeSeries(
  points: readonly InjuryPoint[], last: InjuryPoint, others: readonly InjuryPoint[], input: InjuryInput,
): InjuryAssessment {
  const judged = points.map((_, index) => judgePoint(points, index, input))
  const peakOfSeries = judged.reduce<Stage>((peak, { stage }) => (stage > peak ? stage : peak), 0)
  const current = judged.at(-1) ?? { stage: 0, rules: [] }
  if (current.stage > 0) {
    return {
      status: 'aki', stageCurrent: current.stage, stagePeak: peakOfSeries, steady: false, rule: current.rules.join(' + '),
      text: `Acute kidney injury, stage ${current.stage}: ${inWords(current.rules)}`,
    }
  }
  const older = others.filter(point => last.atMs - point.atMs > 7 * dayMs)
  const ratio = older.length === 0 ? 1 : last.umolPerL / median(older.map(point => point.umolPerL))
  if (reaches(ratio, 1.5)) {
    const stage = stage3Routes(last.umolPerL, input).length > 0 ? 3 : stageOfRatio(ratio)
    return {
      status: 'aki-presumed', stageCurrent: stage, stagePeak: stage > peakOfSeries ? stage : peakOfSeries, steady: false,
      rule: 'last/median(8-365d)>=1.5, onset unknown',
      text: `Acute kidney injury presumed, stage ${stage}: creatinine is ${times(ratio)} times its usual level of the past year, onset unknown`,
    }
  }
  const steady = !isUnsteady(points, last.atMs)
  if (judged.some(({ stage }, index) => stage > 0 && last.atMs - (points[index]?.atMs ?? 0) <= 7 * dayMs)) {
    return {
      status: 'recent-aki', stageCurrent: 0, stagePeak: peakOfSeries, steady,
      rule: 'AKI met within the last 7 days, last value no longer meets it',
      text: 'Acute kidney injury within the 7 days before the last result, which no longer shows it',
    }
  }
  if (steady && [last, ...others].some(point => point.comparator !== null)) {
    return insufficient('bounded values', 'Acute kidney injury cannot be judged: a result is only known as a limit')
  }
  return steady
    ? { status: 'none', stageCurrent: 0, stagePeak: peakOfSeries, steady, rule: 'no criterion met', text: 'No sign of acute kidney injury in the results' }
    : {
        status: 'none', stageCurrent: 0, stagePeak: peakOfSeries, steady, rule: 'falling creatinine, not steady',
        text: 'Creatinine is falling and not steady: kidney function may have been far lower',
      }
}

/** Cut, not rounded: 1.99 must not read as the next stage. */
function times(ratio: number): string {
  return (Math.floor((ratio + tolerance) * 10) / 10).toFixed(1)
}

function inWords(rules: readonly string[]): string {
  const words: string[] = []
  if (rules.includes('rise>=0.3mg/dL in 48h')) words.push('creatinine rose by 0.3 mg/dL or more within 48 hours')
  const factor = rules.includes('ratio>=3') ? '3' : rules.includes('ratio>=2') ? '2' : '1.5'
  if (rules.includes('ratio>=1.5 in 7d')) words.push(`creatinine rose to ${factor} times or more within 7 days`)
  if (rules.includes('value>=4.0mg/dL with AKI met')) words.push('creatinine reached 4.0 mg/dL')
  if (rules.includes('age<18 and eGFR<35')) words.push('eGFR below 35 in a child')
  return words.join('; ')
}

/**
 * Whether an estimate must be handled like an eGFR below 30 until a clinician says otherwise: injury now, presumed or
 * recent, or a creatinine that is not steady (project convention after KDIGO 2012).
 */
export function isAcute(injury: InjuryAssessment): boolean {
  return injury.status === 'aki' || injury.status === 'aki-presumed' || injury.status === 'recent-aki'
    || (injury.steady === false && injury.status !== 'not-applicable')
}
