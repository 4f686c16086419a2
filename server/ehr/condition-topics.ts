import type { ScreeningAnswers } from '#shared/domain/safety/types'
import { isSystem, snomed, wordsOf } from './codes'
import type { Concept } from './resources'

const icd10cm = 'http://hl7.org/fhir/sid/icd-10-cm'
const icd10 = 'http://hl7.org/fhir/sid/icd-10'

/** A matter the safety questions ask about, and how records name it. */
export interface Topic {
  id: string
  snomed: readonly string[]
  /** ICD-10 and ICD-10-CM prefixes, without the dot. */
  icd: readonly string[]
  /** For entries that carry words only. */
  words: RegExp | null
  suggests: { [F in keyof ScreeningAnswers]: { field: F, value: NonNullable<ScreeningAnswers[F]> } }[keyof ScreeningAnswers]
}

/**
 * Codes: SNOMED CT chronic kidney disease and its stages, end-stage kidney disease and ICD-10-CM N18, I12.0, I13.11,
 * I13.2 as in the mCODE value set; the others from memory. SNOMED CT descendants are not followed: no terminology
 * server is assumed, so words are read too. A topic listed earlier goes first where an entry fits several.
 */
export const conditionTopics: readonly Topic[] = [
  {
    id: 'hemodialysis', snomed: ['302497006', '708930002'], icd: [], words: /h(a)?emodialysis/,
    suggests: { field: 'dialysis', value: 'hemodialysis' },
  },
  {
    id: 'peritoneal-dialysis', snomed: ['71192002', '708934006'], icd: [], words: /peritoneal dialysis/,
    suggests: { field: 'dialysis', value: 'peritoneal' },
  },
  {
    id: 'dialysis', snomed: ['105502003', '265764009'], icd: ['Z992'], words: /\bon dialysis|dialysis[- ]dependen|renal dialysis|dependence on dialysis/,
    suggests: { field: 'dialysis', value: 'unknown' },
  },
  {
    id: 'end-stage-kidney-disease', snomed: ['46177005', '433146000'], icd: ['N185', 'N186', 'I120', 'I1311', 'I132'],
    words: /end[- ]stage (renal|kidney)|(?<!acute )(kidney|renal) failure|(ckd|kidney disease),? (stage )?(5|v)\b/,
    suggests: { field: 'kidneyDisease', value: 'yes' },
  },
  {
    id: 'chronic-kidney-disease', snomed: ['709044004', '431855005', '431856006', '433144002', '431857002'], icd: ['N18'],
    words: /chronic (kidney|renal)|\bckd\b/,
    suggests: { field: 'kidneyDisease', value: 'yes' },
  },
  {
    id: 'kidney-transplant', snomed: ['161665007', '737295003'], icd: ['Z940', 'T861'], words: /(kidney|renal) transplant/,
    suggests: { field: 'kidneyRiskFactor', value: 'yes' },
  },
  {
    id: 'single-kidney', snomed: ['80161003'], icd: ['Z905', 'Q600'], words: /(solitary|single) kidney|nephrectomy/,
    suggests: { field: 'kidneyRiskFactor', value: 'yes' },
  },
  {
    id: 'diabetes', snomed: ['73211009', '44054006', '46635009'], icd: ['E08', 'E09', 'E10', 'E11', 'E12', 'E13', 'E14'], words: /diabetes mellitus|type [12] diabetes|\bdiabetes\b(?! insipidus)/,
    suggests: { field: 'kidneyRiskFactor', value: 'yes' },
  },
  {
    id: 'hypertension', snomed: ['38341003', '59621000'], icd: ['I10', 'I11', 'I12', 'I13', 'I15'],
    words: /(?<!pulmonary |portal |intracranial |ocular )hypertension/,
    suggests: { field: 'kidneyRiskFactor', value: 'yes' },
  },
  { id: 'gout', snomed: ['90560007'], icd: ['M10', 'M1A'], words: /\bgout\b/, suggests: { field: 'kidneyRiskFactor', value: 'yes' } },
  { id: 'proteinuria', snomed: ['29738008'], icd: ['R80'], words: /proteinuria/, suggests: { field: 'kidneyRiskFactor', value: 'yes' } },
  {
    id: 'liver-disease', snomed: ['235856003', '19943007', '328383001'], icd: ['K70', 'K71', 'K72', 'K73', 'K74', 'K75', 'K76', 'K77'],
    words: /cirrhosis|chronic liver disease|hepatic failure|liver failure/,
    suggests: { field: 'liverDisease', value: 'yes' },
  },
  { id: 'asthma', snomed: ['195967001'], icd: ['J45'], words: /\basthma\b/, suggests: { field: 'asthma', value: 'yes' } },
  {
    id: 'nephrogenic-systemic-fibrosis', snomed: [], icd: [], words: /nephrogenic (systemic fibrosis|fibrosing dermopathy)/,
    suggests: { field: 'nephrogenicSystemicFibrosis', value: 'yes' },
  },
  {
    id: 'implant', snomed: ['441509002'], icd: ['Z950', 'Z9581', 'Z9621', 'Z9682'], words: /pacemaker|defibrillator|cochlear implant|aneurysm clip|neurostimulator/,
    suggests: { field: 'implants', value: 'yes' },
  },
  {
    id: 'claustrophobia', snomed: ['19887002'], icd: ['F40240'], words: /claustrophobi/,
    suggests: { field: 'specialNeeds', value: ['claustrophobia'] },
  },
]

/** Counted only while recent: SNOMED CT and ICD-10-CM codes from memory. */
export const acuteTopic: Topic = {
  id: 'acute-illness', snomed: ['14669001', '91302008', '34095006'], icd: ['N17', 'A40', 'A41', 'R652', 'E860'],
  words: /acute (kidney|renal) (injury|failure)|\bsepsis\b|dehydration/,
  suggests: { field: 'acuteIllness', value: 'yes' },
}

export const pregnancyTopic: Topic = {
  id: 'pregnancy', snomed: ['77386006', '72892002'], icd: ['Z331', 'Z34', 'O09', 'Z3A', 'O0', 'O1', 'O2', 'O3', 'O4', 'O9A'],
  words: /^(?!.*(history|previous|prevention|planning|ectopic|not pregnant)).*\bpregnan/,
  suggests: { field: 'pregnancy', value: 'yes' },
}

/** Words that turn an entry's meaning round. */
const turned = /\b(no|not|denies|without|family history|fh of|risk of|screening|rule out|suspected|exclu)/

export function fits(topic: Topic, concept: Concept | undefined): boolean {
  if (!concept) return false
  const coded = concept.coding.some(({ system, code }) => code !== undefined && (
    (isSystem(system, snomed) && topic.snomed.includes(code))
    || ((isSystem(system, icd10cm) || isSystem(system, icd10)) && topic.icd.some(prefix => code.replace('.', '').toUpperCase().startsWith(prefix)))
  ))
  if (coded) return true
  const words = wordsOf(concept)
  return topic.words !== null && topic.words.test(words) && !turned.test(words)
}
