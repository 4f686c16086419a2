import type { Coding, Concept } from './resources'
import type { CodeRef } from './settings'

export const loinc = 'http://loinc.org'
export const snomed = 'http://snomed.info/sct'
export const ucum = 'http://unitsofmeasure.org'

/**
 * Creatinine in serum, plasma or blood. 2160-0, 14682-9, 77140-2: HL7 CPG value set ckd-valueset-creatinine; 38483-4,
 * 21232-4: eCQM value set serum-creatinine; 59826-8: public FHIR code.
 */
export const creatinineLoinc = ['2160-0', '14682-9', '77140-2', '38483-4', '21232-4', '59826-8'] as const

/** Cystatin C, mass per volume, serum or plasma (from memory). */
export const cystatinLoinc = ['33863-2'] as const

/** Panels that carry a creatinine as a part: creatinine and GFR, basic, comprehensive and kidney function (from memory). */
export const panelLoinc = ['45066-8', '24321-2', '24323-8', '24362-6', '51990-0'] as const

/** Urine creatinine, ratios to it and clearances, which are never a serum creatinine (from memory, save 14959-1). */
const neverLoinc = new Set([
  '2161-8', '14683-7', '35674-1', '20624-3', '2162-6', '14684-5', '9318-7', '14959-1', '13705-9', '2890-2', '34366-5', '30003-8',
  '2164-2', '2163-4', '35591-7', '12190-5', '12191-3', '12192-1',
])

/** Laboratory eGFR by code, with the formula the code names. */
export const egfrFormulas: Readonly<Record<string, string>> = {
  '98979-8': 'CKD-EPI 2021',
  '98980-6': 'CKD-EPI 2021 with cystatin C',
  '62238-1': 'CKD-EPI 2009',
  '88294-4': 'CKD-EPI 2009',
  '88293-6': 'CKD-EPI 2009',
  '94677-2': 'CKD-EPI 2012 with cystatin C',
  '50210-4': 'cystatin C',
  '50384-7': 'Schwartz',
  '77147-7': 'MDRD',
  '33914-3': 'MDRD',
  '76633-7': 'MDRD',
  '50044-7': 'MDRD',
  '70969-1': 'MDRD',
  '48642-3': 'MDRD',
  '48643-1': 'MDRD',
  '69405-9': 'formula not stated',
}

/** Weight: vital sign, measured, stated. Height: vital sign, measured, lying. */
export const weightLoinc = ['29463-7', '3141-9', '3142-7'] as const
export const heightLoinc = ['8302-2', '3137-7', '3138-5', '8306-3'] as const
/** Pregnancy status; hCG in urine and serum. */
export const pregnancyStatusLoinc = ['82810-3'] as const
export const pregnancyTestLoinc = ['2106-3', '80384-1', '2118-8'] as const

export const loincRefs = (codes: readonly string[]): CodeRef[] => codes.map(code => ({ system: loinc, code }))

/** `system|code,system|code` for a FHIR token search, escaped (R4 Search, "Escaping Search Parameters"). */
export const tokenList = (codes: readonly CodeRef[]): string => codes.map(({ system, code }) => `${escaped(system)}|${escaped(code)}`).join(',')
const escaped = (value: string): string => value.replace(/[\\,|$]/g, '\\$&')

export const hasCode = (concept: Concept | undefined, codes: readonly CodeRef[]): boolean =>
  concept?.coding.some(coding => codes.some(({ system, code }) => sameSystem(coding.system, system) && coding.code === code)) ?? false

export const hasLoinc = (concept: Concept | undefined, codes: readonly string[]): boolean => hasCode(concept, loincRefs(codes))

export const namesNever = (concept: Concept | undefined): boolean => concept?.coding
  .some(({ system, code }) => sameSystem(system, loinc) && code !== undefined && neverLoinc.has(code)) ?? false

/** The first name the record gives, or its code. */
export function nameOf(concept: Concept | undefined): string | null {
  const first = concept?.coding.find(({ display }) => display) ?? concept?.coding[0]
  return concept?.text?.trim() || first?.display?.trim() || first?.code || null
}

/** Every name a concept carries, in one lower-case text, for matching by word. */
export const wordsOf = (concept: Concept | undefined): string =>
  [concept?.text, ...(concept?.coding.map(({ display }) => display) ?? [])].filter(Boolean).join(' · ').toLowerCase()

/** The local coding to tell an administrator about, `system|code`. */
export const codingText = (coding: Coding | undefined): string =>
  coding ? [coding.system, coding.code].filter(Boolean).join('|') || coding.display || 'no code' : 'no code'

function sameSystem(found: string | undefined, wanted: string): boolean {
  if (found === undefined) return false
  // LOINC and SNOMED CT are also sent by their object identifiers.
  const name = systemAliases[found] ?? found
  return name === wanted
}

const systemAliases: Readonly<Record<string, string>> = {
  'urn:oid:2.16.840.1.113883.6.1': loinc,
  'https://loinc.org': loinc,
  'http://loinc.org/': loinc,
  'urn:oid:2.16.840.1.113883.6.96': snomed,
  'urn:oid:2.16.840.1.113883.6.90': 'http://hl7.org/fhir/sid/icd-10-cm',
  'urn:oid:2.16.840.1.113883.6.3': 'http://hl7.org/fhir/sid/icd-10',
}

/** Whether a coding's system is the wanted one, under any of its usual names. */
export const isSystem = sameSystem
