import type { Assessment } from './types'
import type { AgentId } from '../contrast/types'
import { outcomeWords } from '../contrast/outcome'

/** `outcome`: another contrast. `hold`: a radiologist's word is now, or no longer, needed. The rest in order of weight. */
export type DifferenceKind = 'outcome' | 'hold' | 'kidney' | 'finding' | 'agent' | 'need' | 'rules'

/** One thing that two assessments of a request disagree on, in words. */
export interface Difference { kind: DifferenceKind, text: string }

type Compared = Pick<Assessment,
  'suggestion' | 'asksRadiologist' | 'kidney' | 'findings' | 'agents' | 'needs' | 'guidanceVersion' | 'policyVersion' | 'exam'>

/**
 * What changed from one assessment to the next, the weightiest first; empty where nothing a reader would act on did.
 * The radiologist sees it after an answer, the sheet after a changed field.
 */
export function differenceBetween(before: Compared, after: Compared): Difference[] {
  return [
    ...outcomeDifference(before, after),
    ...holdDifference(before, after),
    ...kidneyDifference(before, after),
    ...findingDifference(before, after),
    ...agentDifference(before, after),
    ...needDifference(before, after),
    ...rulesDifference(before, after),
  ]
}

function outcomeDifference(before: Compared, after: Compared): Difference[] {
  const differences: Difference[] = []
  if (before.exam?.questionId !== after.exam?.questionId && after.exam !== null) {
    differences.push({ kind: 'outcome', text: `The question is now: ${after.exam.question}` })
  }
  if (before.suggestion === after.suggestion) return differences
  const was = before.suggestion === null ? null : outcomeWords[before.suggestion].phrase
  const text = after.suggestion === null
    ? 'Answers are missing again: whether contrast helps is open'
    : `Now ${outcomeWords[after.suggestion].phrase}${was === null ? '' : `; it was ${was}`}`
  return [...differences, { kind: 'outcome', text }]
}

function holdDifference(before: Compared, after: Compared): Difference[] {
  if (before.asksRadiologist === after.asksRadiologist) return []
  return [{ kind: 'hold', text: after.asksRadiologist ? 'Contrast now waits for a radiologist\'s word' : 'Contrast no longer waits for a radiologist\'s word' }]
}

function kidneyDifference({ kidney: before }: Compared, { kidney: after }: Compared): Difference[] {
  const unchanged = before.headline === after.headline
    || (before.egfr?.display === after.egfr?.display && before.creatinine?.reading.id === after.creatinine?.reading.id
      && before.currency === after.currency && before.status === after.status)
  if (unchanged) return []
  return [{ kind: 'kidney', text: `Kidney function: ${after.headline}` }]
}

function findingDifference(before: Compared, after: Compared): Difference[] {
  const weighty = ({ findings }: Compared) => findings.filter(found => found.severity !== 'info')
  const had = new Set(weighty(before).map(found => found.id))
  const has = new Set(weighty(after).map(found => found.id))
  return [
    ...weighty(after).filter(found => !had.has(found.id)).map((found): Difference => ({ kind: 'finding', text: `New: ${found.text}` })),
    ...weighty(before).filter(found => !has.has(found.id)).map((found): Difference => ({ kind: 'finding', text: `No longer: ${found.text}` })),
  ]
}

function nameOf({ agents }: Compared, id: AgentId | null): string | null {
  return agents?.ranked.find(entry => entry.agent === id)?.name ?? null
}

function agentDifference(before: Compared, after: Compared): Difference[] {
  if (before.agents === null || after.agents === null || before.agents.best === after.agents.best) return []
  const now = nameOf(after, after.agents.best)
  const was = nameOf(before, before.agents.best)
  return [{ kind: 'agent', text: now === null ? 'No stocked agent fits any longer' : `Agent suggested now: ${now}${was === null ? '' : ` instead of ${was}`}` }]
}

function needDifference(before: Compared, after: Compared): Difference[] {
  const had = new Map(before.needs.map(need => [need.kind, need.text]))
  const has = new Map(after.needs.map(need => [need.kind, need.text]))
  return [
    ...after.needs.filter(need => had.get(need.kind) !== need.text).map((need): Difference => ({ kind: 'need', text: `Needed now: ${need.text}` })),
    ...before.needs.filter(need => !has.has(need.kind)).map((need): Difference => ({ kind: 'need', text: `No longer needed: ${need.text}` })),
  ]
}

function rulesDifference(before: Compared, after: Compared): Difference[] {
  const differences: Difference[] = []
  if (before.guidanceVersion !== after.guidanceVersion) differences.push({ kind: 'rules', text: `Guidance ${after.guidanceVersion} applies, not ${before.guidanceVersion}` })
  if (before.policyVersion !== after.policyVersion) differences.push({ kind: 'rules', text: `Policy ${after.policyVersion} applies, not ${before.policyVersion}` })
  return differences
}
