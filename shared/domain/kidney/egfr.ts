import type { Sex } from './types'
import { convertCreatinine } from './units'

/** Why an equation gives no number. The first obstacle is named, in the order each function states. */
export type GfrRefusal = 'needs-sex' | 'needs-height' | 'age-out-of-range' | 'bad-unit' | 'missing-value' | 'bad-value'

/** eGFR in mL/min/1.73 m², unrounded, with the multiplier where the equation has one; or the obstacle. */
export type GfrResult = { status: 'ok', egfr: number, k: number | null } | { status: GfrRefusal }

interface Creatinine { value: number | null, unit: string | null }

/** Ages above this are taken for a wrong birth date (project convention). */
export const oldestPlausibleAge = 120

function isAdult(ageYears: number): boolean {
  return ageYears >= 18 && ageYears <= oldestPlausibleAge
}

function isBinary(sex: Sex): sex is 'female' | 'male' {
  return sex === 'female' || sex === 'male'
}

/** Unit, then missing, then value: an unreadable unit makes any number meaningless. */
function readCreatinine({ value, unit }: Creatinine): { status: 'ok', mgPerDl: number } | { status: GfrRefusal } {
  const amount = convertCreatinine(value, unit)
  return amount.status === 'missing-unit' ? { status: 'bad-unit' } : amount.status === 'ok' ? amount : { status: amount.status }
}

/** The two-slope term of the CKD-EPI equations: one exponent below the knot, another above. */
function twoSlopes(value: number, knot: number, below: number, above: number): number {
  const ratio = value / knot
  return Math.min(ratio, 1) ** below * Math.max(ratio, 1) ** above
}

/**
 * CKD-EPI 2021 from creatinine, adults of 18 and more. No race term.
 * Source: Inker et al., N Engl J Med 2021;385:1737-1749.
 * Checks in the order sex, age, unit, missing, value.
 *
 * @param input completed years; creatinine traceable to isotope-dilution mass spectrometry
 */
export function ckdEpi2021Creatinine(input: { ageYears: number, sex: Sex, creatinine: Creatinine }): GfrResult {
  if (!isBinary(input.sex)) return { status: 'needs-sex' }
  if (!isAdult(input.ageYears)) return { status: 'age-out-of-range' }
  const amount = readCreatinine(input.creatinine)
  if (amount.status !== 'ok') return amount
  const female = input.sex === 'female'
  const egfr = 142 * twoSlopes(amount.mgPerDl, female ? 0.7 : 0.9, female ? -0.241 : -0.302, -1.2)
    * 0.9938 ** input.ageYears * (female ? 1.012 : 1)
  return { status: 'ok', egfr, k: null }
}

/**
 * CKD-EPI 2021 from creatinine and cystatin C, adults of 18 and more; preferred near a decision threshold.
 * Source: Inker et al., N Engl J Med 2021;385:1737-1749.
 * Checks in the order sex, age, missing, value.
 */
export function ckdEpi2021CreatinineCystatinC(
  input: { ageYears: number, sex: Sex, creatinineMgPerDl: number | null, cystatinCMgPerL: number | null },
): GfrResult {
  if (!isBinary(input.sex)) return { status: 'needs-sex' }
  if (!isAdult(input.ageYears)) return { status: 'age-out-of-range' }
  const { creatinineMgPerDl, cystatinCMgPerL } = input
  if (creatinineMgPerDl === null || cystatinCMgPerL === null) return { status: 'missing-value' }
  if (!isPositive(creatinineMgPerDl) || !isPositive(cystatinCMgPerL)) return { status: 'bad-value' }
  const female = input.sex === 'female'
  const egfr = 135 * twoSlopes(creatinineMgPerDl, female ? 0.7 : 0.9, female ? -0.219 : -0.144, -0.544)
    * twoSlopes(cystatinCMgPerL, 0.8, -0.323, -0.778)
    * 0.9961 ** input.ageYears * (female ? 0.963 : 1)
  return { status: 'ok', egfr, k: null }
}

/**
 * CKD-EPI 2012 from cystatin C alone, adults of 18 and more. The age base is 0.996, as the source prints it;
 * some later pages print 0.9962, which gives 1.6 % more at 80 years.
 * Source: Inker et al., N Engl J Med 2012;367:20-29.
 * Checks in the order sex, age, missing, value.
 */
export function ckdEpi2012CystatinC(input: { ageYears: number, sex: Sex, cystatinCMgPerL: number | null }): GfrResult {
  if (!isBinary(input.sex)) return { status: 'needs-sex' }
  if (!isAdult(input.ageYears)) return { status: 'age-out-of-range' }
  if (input.cystatinCMgPerL === null) return { status: 'missing-value' }
  if (!isPositive(input.cystatinCMgPerL)) return { status: 'bad-value' }
  const egfr = 133 * twoSlopes(input.cystatinCMgPerL, 0.8, -0.499, -1.328)
    * 0.996 ** input.ageYears * (input.sex === 'female' ? 0.932 : 1)
  return { status: 'ok', egfr, k: null }
}

/** Factor K of CKiD U25, for a height in meters; it changes within a year, so the age is decimal. */
function u25Factor(ageYears: number, sex: 'female' | 'male'): number {
  const fromTwelve = ageYears - 12
  if (ageYears < 12) return (sex === 'male' ? 39.0 : 36.1) * 1.008 ** fromTwelve
  if (ageYears < 18) return sex === 'male' ? 39.0 * 1.045 ** fromTwelve : 36.1 * 1.023 ** fromTwelve
  return sex === 'male' ? 50.8 : 41.4
}

/**
 * CKiD U25 from creatinine, 1 to 25 years.
 * Source: Pierce et al., Kidney Int 2021;99:948-956.
 * Checks in the order height, unit, missing, value, sex, age.
 *
 * @param input decimal years, height in cm
 */
export function ckidU25Creatinine(
  input: { ageYears: number, sex: Sex, heightCm: number | null, creatinine: Creatinine },
): GfrResult {
  if (input.heightCm === null || !isPositive(input.heightCm)) return { status: 'needs-height' }
  const amount = readCreatinine(input.creatinine)
  if (amount.status !== 'ok') return amount
  if (!isBinary(input.sex)) return { status: 'needs-sex' }
  if (!(input.ageYears >= 1 && input.ageYears <= 25)) return { status: 'age-out-of-range' }
  const k = u25Factor(input.ageYears, input.sex)
  return { status: 'ok', egfr: k * (input.heightCm / 100) / amount.mgPerDl, k }
}

/**
 * Bedside Schwartz (CKiD 2009), 1 to under 18 years; sex plays no part. Older factors (0.45, 0.55, 0.7) belong to
 * creatinine methods no longer in use.
 * Source: Schwartz et al., J Am Soc Nephrol 2009;20:629-637.
 * Checks in the order height, unit, missing, value, age.
 *
 * @param input decimal years, height in cm
 */
export function bedsideSchwartz(input: { ageYears: number, heightCm: number | null, creatinine: Creatinine }): GfrResult {
  if (input.heightCm === null || !isPositive(input.heightCm)) return { status: 'needs-height' }
  const amount = readCreatinine(input.creatinine)
  if (amount.status !== 'ok') return amount
  if (!(input.ageYears >= 1 && input.ageYears < 18)) return { status: 'age-out-of-range' }
  return { status: 'ok', egfr: 0.413 * input.heightCm / amount.mgPerDl, k: 0.413 }
}

function isPositive(value: number): boolean {
  return Number.isFinite(value) && value > 0
}
