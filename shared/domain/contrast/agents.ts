import type { Source } from '../source'
import type { AcrGroup, Agent, AgentId } from './types'

const regrouped = '2024-04'
const firstGrouped = '2021'

function label(name: string, year: number | null = null): Source {
  return { title: `US prescribing information for ${name}`, body: 'US Food and Drug Administration', year, status: 'confirmed' }
}

function historic(name: string, status: Source['status'] = 'confirmed'): Source {
  return { title: `${name}: kept to read earlier records`, body: 'European Medicines Agency, opinion on gadolinium contrast agents', year: 2017, status }
}

/**
 * The gadolinium contrast agents met in practice and in earlier records, by generic name.
 * Doses, strengths and ages: US labels. ACR groups: ACR and National Kidney Foundation, Radiology 2021;298:28-35; gadopiclenol
 * and gadoxetate were moved to group II in April 2024 (from memory). Groups move, so the department's policy has the last word.
 * Relaxivity in L/mmol/s, 37 °C, bovine plasma: Rohrer et al. 2005; gadopiclenol: Robic et al., Invest Radiol 2019;54:475
 * (r2 values from memory). Ligand charges follow from the structures; net charge is computed.
 */
export const starterAgents: readonly Agent[] = [
  {
    id: 'gadobutrol', name: 'gadobutrol', synonyms: ['gd-bt-do3a', 'gd-do3a-butrol'], structure: 'macrocyclic', ligandCharge: -3,
    acrGroup: 'II', acrGroupAsOf: firstGrouped, concentrationMmolPerMl: 1, doseMmolPerKg: 0.1, youngestLabelledAgeYears: 0,
    structureRank: 2, liverUptake: false, intraArticularCommon: true,
    relaxivity: { r1At1_5T: 5.2, r2At1_5T: 6.1, r1At3T: 5.0, r2At3T: 7.1 }, source: label('gadobutrol', 2025),
  },
  {
    id: 'gadoterate', name: 'gadoterate', synonyms: ['gadoteric acid', 'gadoterate meglumine', 'gd-dota'], structure: 'macrocyclic', ligandCharge: -4,
    acrGroup: 'II', acrGroupAsOf: firstGrouped, concentrationMmolPerMl: 0.5, doseMmolPerKg: 0.1, youngestLabelledAgeYears: 0,
    structureRank: 1, liverUptake: false, intraArticularCommon: true,
    relaxivity: { r1At1_5T: 3.6, r2At1_5T: 4.3, r1At3T: 3.5, r2At3T: 4.9 }, source: label('gadoterate', 2017),
  },
  {
    id: 'gadoteridol', name: 'gadoteridol', synonyms: ['gd-hp-do3a'], structure: 'macrocyclic', ligandCharge: -3,
    acrGroup: 'II', acrGroupAsOf: firstGrouped, concentrationMmolPerMl: 0.5, doseMmolPerKg: 0.1, youngestLabelledAgeYears: 0,
    structureRank: 2, liverUptake: false, intraArticularCommon: true,
    relaxivity: { r1At1_5T: 4.1, r2At1_5T: 5.0, r1At3T: 3.7, r2At3T: 5.7 }, source: label('gadoteridol'),
  },
  {
    id: 'gadopiclenol', name: 'gadopiclenol', synonyms: ['p03277'], structure: 'macrocyclic', ligandCharge: -3,
    acrGroup: 'II', acrGroupAsOf: regrouped, concentrationMmolPerMl: 0.5, doseMmolPerKg: 0.05, youngestLabelledAgeYears: 2,
    structureRank: 2, liverUptake: false, intraArticularCommon: false,
    relaxivity: { r1At1_5T: 12.8, r2At1_5T: 15.1, r1At3T: 11.6, r2At3T: 14.7 }, source: label('gadopiclenol', 2022),
  },
  {
    id: 'gadobenate', name: 'gadobenate', synonyms: ['gadobenic acid', 'gadobenate dimeglumine', 'gd-bopta'], structure: 'linear', ligandCharge: -5,
    acrGroup: 'II', acrGroupAsOf: firstGrouped, concentrationMmolPerMl: 0.5, doseMmolPerKg: 0.1, youngestLabelledAgeYears: 0,
    structureRank: 3, liverUptake: true, intraArticularCommon: false,
    relaxivity: { r1At1_5T: 6.3, r2At1_5T: 8.7, r1At3T: 5.5, r2At3T: 11.0 }, source: label('gadobenate'),
  },
  {
    id: 'gadoxetate', name: 'gadoxetate', synonyms: ['gadoxetic acid', 'gadoxetate disodium', 'gd-eob-dtpa'], structure: 'linear', ligandCharge: -5,
    acrGroup: 'II', acrGroupAsOf: regrouped, concentrationMmolPerMl: 0.25, doseMmolPerKg: 0.025, youngestLabelledAgeYears: null,
    structureRank: 3, liverUptake: true, intraArticularCommon: false,
    relaxivity: { r1At1_5T: 6.9, r2At1_5T: 8.7, r1At3T: 6.2, r2At3T: 11.0 }, source: label('gadoxetate'),
  },
  {
    id: 'gadopentetate', name: 'gadopentetate', synonyms: ['gadopentetic acid', 'gadopentetate dimeglumine', 'gd-dtpa'], structure: 'linear', ligandCharge: -5,
    acrGroup: 'I', acrGroupAsOf: firstGrouped, concentrationMmolPerMl: 0.5, doseMmolPerKg: 0.1, youngestLabelledAgeYears: 2,
    structureRank: 3, liverUptake: false, intraArticularCommon: true,
    relaxivity: { r1At1_5T: 4.1, r2At1_5T: 4.6, r1At3T: 3.7, r2At3T: 5.2 }, source: historic('Gadopentetate'),
  },
  {
    id: 'gadodiamide', name: 'gadodiamide', synonyms: ['gd-dtpa-bma'], structure: 'linear', ligandCharge: -3,
    acrGroup: 'I', acrGroupAsOf: firstGrouped, concentrationMmolPerMl: 0.5, doseMmolPerKg: 0.1, youngestLabelledAgeYears: 2,
    structureRank: 4, liverUptake: false, intraArticularCommon: false,
    relaxivity: { r1At1_5T: 4.3, r2At1_5T: 5.2, r1At3T: 4.0, r2At3T: 5.6 }, source: historic('Gadodiamide'),
  },
  {
    id: 'gadoversetamide', name: 'gadoversetamide', synonyms: ['gd-dtpa-bmea'], structure: 'linear', ligandCharge: -3,
    acrGroup: 'I', acrGroupAsOf: firstGrouped, concentrationMmolPerMl: 0.5, doseMmolPerKg: 0.1, youngestLabelledAgeYears: null,
    structureRank: 4, liverUptake: false, intraArticularCommon: false,
    relaxivity: { r1At1_5T: 4.7, r2At1_5T: 5.2, r1At3T: 4.5, r2At3T: 5.9 }, source: historic('Gadoversetamide'),
  },
  {
    id: 'gadofosveset', name: 'gadofosveset', synonyms: ['gadofosveset trisodium', 'ms-325'], structure: 'linear', ligandCharge: -6,
    acrGroup: 'not listed', acrGroupAsOf: firstGrouped, concentrationMmolPerMl: 0.25, doseMmolPerKg: 0.03, youngestLabelledAgeYears: null,
    structureRank: 3, liverUptake: false, intraArticularCommon: false,
    relaxivity: { r1At1_5T: 19.0, r2At1_5T: 34.0, r1At3T: 9.9, r2At3T: 60.0 }, source: historic('Gadofosveset', 'from memory'),
  },
]

/** Net charge of the complex: the ligand's charge and the 3 of Gd3+. */
export function netCharge(agent: Pick<Agent, 'ligandCharge'>): number {
  return agent.ligandCharge + 3
}

/** An agent is ionic where a net charge is left. */
export function isIonic(agent: Pick<Agent, 'ligandCharge'>): boolean {
  return netCharge(agent) !== 0
}

/**
 * An agent's kind in words, for instance "macrocyclic, non-ionic, group II".
 *
 * @param group the ACR group in force by policy; the agent's own where policy names none
 */
export function describeAgent(agent: Agent, group: AcrGroup = agent.acrGroup): string {
  const words = group === 'not listed' ? 'no ACR group' : `group ${group}`
  return `${agent.structure}, ${isIonic(agent) ? 'ionic' : 'non-ionic'}, ${words}`
}

/** Lower case, one blank between words, one at each end, so that whole words can be looked for. */
function foldName(text: string): string {
  return ` ${text.normalize('NFKD').replace(/\p{M}/gu, '').toLowerCase().replace(/[^a-z0-9]+/g, ' ').trim()} `
}

const foldedNames = starterAgents
  .flatMap(({ id, name, synonyms }) => [name, ...synonyms].map(spelling => ({ id, folded: foldName(spelling) })))
  // "gd dtpa" is part of "gd dtpa bma": longer names are looked for first and then taken out.
  .sort((a, b) => b.folded.length - a.folded.length)

/**
 * Finds the agent that a text names by generic name, acid or salt, without regard to case and hyphens, also inside a longer
 * product text ("Gadoterate meglumine 0.5 mmol/mL injection").
 *
 * @returns null where none is named, or more than one
 */
export function findAgent(text: string): Agent | null {
  let rest = foldName(text)
  const found = new Set<AgentId>()
  for (const { id, folded } of foldedNames) {
    if (!rest.includes(folded)) continue
    found.add(id)
    rest = rest.replaceAll(folded, ' | ')
  }
  const [only] = found
  return found.size === 1 ? starterAgents.find(({ id }) => id === only) ?? null : null
}
