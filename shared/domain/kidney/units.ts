/**
 * 1 mg/dL of creatinine in µmol/L, from its molar mass of 113.12 g/mol. KDIGO prints the same factor
 * (Clinical Practice Guideline for CKD, 2012, SI units).
 */
export const umolPerLInMgPerDl = 88.4

/** A concentration that could not be read, with the reason in words a clinician understands. */
export interface UnreadableAmount {
  status: 'missing-unit' | 'bad-unit' | 'missing-value' | 'bad-value'
  reason: string
}

export type CreatinineAmount = { status: 'ok', mgPerDl: number, umolPerL: number } | UnreadableAmount
export type CystatinCAmount = { status: 'ok', mgPerL: number } | UnreadableAmount

/** How many of the unit make 1 mg/dL. Keys are folded spellings. */
const massUnits = new Map([
  ['mg/dl', 1], ['mg/100ml', 1], ['mg%', 1], ['mg/l', 10], ['ug/ml', 10], ['ug/dl', 1000], ['g/l', 0.01],
])

/** How many of the unit make 1 µmol/L. */
const molarUnits = new Map([
  ['umol/l', 1], ['micromol/l', 1], ['mcmol/l', 1], ['nmol/ml', 1], ['mmol/l', 0.001],
])

/** How many of the unit make 1 mg/L of cystatin C. */
const cystatinUnits = new Map([['mg/l', 1], ['ug/ml', 1], ['mg/dl', 0.1], ['mg/100ml', 0.1]])

/** Drops blanks and makes one letter of the two micro signs (U+00B5, U+03BC); laboratories send both. */
function foldUnit(unit: string): string {
  return unit.replace(/\s+/g, '').replace(/[\u00B5\u03BC]/g, 'u').replace(/[\u00B2]/g, '2')
}

/** Why a unit is refused, named so that a person sees what was filed. */
function refuseUnit(unit: string, analyte: string): UnreadableAmount {
  const folded = foldUnit(unit).toLowerCase()
  const shown = unit.trim()
  let what = `is not a unit of ${analyte} in blood`
  if (folded.includes('ml/min') || folded.includes('ml/s')) {
    what = `belongs to an eGFR or a clearance, filed as ${analyte}`
  }
  else if (/^(?:[munkp]?g|[mun]?mol)\/(?:[muk]?g|[mu]?mol)(?:[{(].*)?$/.test(folded)) {
    what = `is a urine ratio, not ${analyte} in blood`
  }
  else if (/\/(?:24\.?h(?:rs?|ours?)?|d|day|h|hr|min)$/.test(folded)) {
    what = `is an amount in urine over time, not ${analyte} in blood`
  }
  return { status: 'bad-unit', reason: `The unit "${shown}" ${what}` }
}

const missingUnit: UnreadableAmount = { status: 'missing-unit', reason: 'Sent without a unit; it is not guessed from the size' }
const missingValue: UnreadableAmount = { status: 'missing-value', reason: 'No usable value' }
const badValue: UnreadableAmount = { status: 'bad-value', reason: 'The value is not a positive number' }

function checkValue(value: number | null): { status: 'ok', value: number } | UnreadableAmount {
  if (value === null) return missingValue
  return Number.isFinite(value) && value > 0 ? { status: 'ok', value } : badValue
}

/**
 * Reads a creatinine in any spelling of a unit that laboratories send for blood. An absent unit is never guessed.
 * Spellings: UCUM, and those met in feeds that UCUM does not know ("MG/DL", "mg%", "µmol/L", "uM").
 *
 * @param value the number as sent, null where none was
 * @param unit the unit as sent, null or empty where none was
 * @returns the same concentration in mg/dL and µmol/L, or why it cannot be read; the unit is judged before the value
 */
export function convertCreatinine(value: number | null, unit: string | null): CreatinineAmount {
  if (unit === null || unit.trim() === '') return missingUnit
  const folded = foldUnit(unit)
  const perMgPerDl = massUnits.get(folded.toLowerCase())
  // "uM" is micromolar only with a capital M; "um" is a micrometer.
  const perUmolPerL = folded === 'uM' ? 1 : molarUnits.get(folded.toLowerCase())
  if (perMgPerDl === undefined && perUmolPerL === undefined) return refuseUnit(unit, 'creatinine')
  const checked = checkValue(value)
  if (checked.status !== 'ok') return checked
  if (perMgPerDl !== undefined) {
    const mgPerDl = checked.value / perMgPerDl
    return { status: 'ok', mgPerDl, umolPerL: mgPerDl * umolPerLInMgPerDl }
  }
  const umolPerL = checked.value / (perUmolPerL ?? 1)
  return { status: 'ok', mgPerDl: umolPerL / umolPerLInMgPerDl, umolPerL }
}

/**
 * Reads a cystatin C. Same rules as for creatinine; laboratories report mg/L, a few mg/dL.
 *
 * @returns mg/L, or why it cannot be read
 */
export function convertCystatinC(value: number | null, unit: string | null): CystatinCAmount {
  if (unit === null || unit.trim() === '') return missingUnit
  const perMgPerL = cystatinUnits.get(foldUnit(unit).toLowerCase())
  if (perMgPerL === undefined) return refuseUnit(unit, 'cystatin C')
  const checked = checkValue(value)
  return checked.status === 'ok' ? { status: 'ok', mgPerL: checked.value / perMgPerL } : checked
}
