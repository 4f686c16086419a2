import type { Judgement } from './judge'
import type { Assessment, Clause } from './types'
import type { SafetyFinding } from '../safety/types'
import type { Source } from '../source'
import { examNameFor } from '../contrast/exam-name'
import { isIntravenous, outcomeWords } from '../contrast/outcome'
import { isAcute } from '../kidney/injury'
import { safetySources } from '../safety/sources'
import { plainNeed } from './plain-needs'
import { windowAdjective } from './words'

/** Why the suggestion was turned, to stand after "because" in the sentence, by finding. */
const turnedInShort: Record<string, string> = {
  'pregnancy-yes': 'pregnancy holds contrast back',
  'reaction-allergic-severe': 'an earlier reaction to a gadolinium agent was severe',
  'condition-nsf': 'nephrogenic systemic fibrosis is known',
}

/** The headline: exam, contrast and reason, or what is still needed. No full stop. */
export function sentenceOf({ question, guidance, suggestion, turnedBy }: Judgement): string {
  if (question === null) return 'Choose the clinical question: it decides whether contrast helps'
  if (guidance === null || suggestion === null) {
    const open = guidance?.status === 'needs-answers' ? guidance.deciders.length : 1
    return `${question.exam}, with or without contrast: ${open === 1 ? 'one answer decides' : `${['two', 'three'][open - 2] ?? open} answers decide`}`
  }
  const reason = turnedBy === null ? (guidance.status === 'answered' ? guidance.inShort : 'what decides is not known') : turnedInShort[turnedBy.id] ?? 'a safety finding holds contrast back'
  const name = examNameFor(question.exam, suggestion)
  // "MRI pituitary, dynamic, without contrast", "MRI pancreas with MRCP, without contrast": such names need a comma after them, as does an arthrogram.
  const comma = /,| with |^MR arthrogram/.test(name) ? ',' : ''
  return `${name}${comma} ${outcomeWords[suggestion].phrase}, because ${reason}`
}

/** The guidance's reason, each safety finding that turned, barred or holds, then one line on the kidneys. */
export function becauseClauses(judged: Judgement): Clause[] {
  const { question, guidance, findings, wanted, suggestion } = judged
  const clauses: Clause[] = []
  if (question !== null && guidance?.status === 'answered') {
    const note = guidance.despiteUnknown ? ' What is not known would not change this.' : ''
    clauses.push({ text: guidance.because + note, source: mainSource(question.sources) })
  }
  else if (guidance !== null && wanted === 'discuss') {
    clauses.push({ text: 'The answers that decide about contrast are not known: a radiologist decides.', source: null })
  }
  for (const found of findings) {
    if (weighs(found) && found.topic !== 'kidney' && found.topic !== 'dialysis') clauses.push({ text: found.text, source: found.source })
  }
  if (wanted !== null && wanted !== 'none' && suggestion !== 'none') clauses.push(...kidneyClauses(judged))
  return clauses
}

/** Whether a finding moved the answer; one that only adds a need stands under Provided. */
function weighs(found: SafetyFinding): boolean {
  return found.turns !== null || found.asksRadiologist || (found.severity !== 'info' && found.barsAgents.length > 0)
}

function mainSource(sources: readonly Source[]): Source | null {
  return sources.find(source => source.status === 'confirmed') ?? sources[0] ?? null
}

function kidneyClauses({ findings, kidney, wanted }: Judgement): Clause[] {
  const found = findings.filter(item => (item.topic === 'kidney' || item.topic === 'dialysis') && item.severity !== 'info')
  if (found.length > 0) return found.map(item => ({ text: item.text, source: item.source }))
  const informing = findings.find(item => item.id === 'kidney-joint-not-needed' || item.id === 'kidney-30-to-59')
  if (informing) return [{ text: informing.text, source: informing.source }]
  if (wanted === 'intra-articular') return []
  if (kidney.gateEgfr !== null) {
    return [{ text: 'Kidney function: no reason found in the data available to hold back a group II agent.', source: safetySources.acrNkf }]
  }
  const reason = isInfant(findings) ? ' No creatinine is asked for at this age.' : ' Policy asks for no creatinine without a kidney risk factor.'
  const asked = kidney.currency === 'not-needed' ? reason : ''
  return [{ text: `${kidney.headline}.${asked}`, source: safetySources.acrManual }]
}

/** Under one year no equation estimates GFR: neither a creatinine nor a policy answers for the kidneys. */
function isInfant(findings: readonly SafetyFinding[]): boolean {
  return findings.some(found => found.id === 'child-under-one')
}

/** What must be in place, with its owner; then what is not needed, so that nobody orders it. */
export function providedClauses(judged: Judgement): Clause[] {
  const needed = judged.needs.map((need): Clause => ({ text: need.text, source: need.source, owner: need.owner }))
  return [...needed, ...notNeeded(judged)]
}

function notNeeded({ suggestion, kidney, needs, findings }: Judgement): Clause[] {
  if (suggestion === 'none') return [{ text: 'No IV start and no lab work: nothing is injected', source: null }]
  if (suggestion === 'intra-articular') return [{ text: 'No lab work: kidney function does not decide an injection into a joint', source: safetySources.joints }]
  if (suggestion === null || !isIntravenous(suggestion) || needs.some(need => need.kind === 'creatinine')) return []
  if (kidney.status === 'dialysis') return [{ text: 'No new lab work: on dialysis the creatinine decides nothing', source: safetySources.acrNkf }]
  // Whether a baby needs a blood test is for the radiologist and the pediatric team.
  if (isInfant(findings)) return []
  // An unsteady creatinine, or a single one in acute illness, may well be repeated: nobody is told that no lab is needed.
  if (isAcute(kidney.injury) || findings.some(found => found.id === 'kidney-injury-not-judged')) return []
  if (kidney.currency === 'current' && kidney.windowDays !== null) {
    return [{ text: `No new lab work: the creatinine is inside the ${windowAdjective(kidney.windowDays)} window`, source: null }]
  }
  if (kidney.currency === 'not-needed') return [{ text: 'No lab work: policy asks for no creatinine without a risk factor', source: null }]
  return []
}

/** The same for the patient: why, and what to do before. */
export function plainVersion({ guidance, turnedBy, needs, findings, suggestion }: Judgement): Assessment['plain'] {
  const why = turnedBy !== null
    ? turnedBy.plain
    : guidance?.status === 'answered' ? guidance.plain : suggestion === 'discuss' ? 'Some answers that matter are not known. A doctor decides about contrast.' : ''
  const before = needs.flatMap(need => plainNeed(need.kind, { findings, suggestion }) ?? [])
  return { why, before: [...new Set(before)].filter(line => line !== why) }
}
