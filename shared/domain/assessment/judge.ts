import type { Assessment, AssessmentInputs, AssessmentRules } from './types'
import type { ContrastOutcome, DecidableOutcome } from '../contrast/outcome'
import type { AgentChoice, AgentId } from '../contrast/types'
import type { ClinicalQuestion, GuidanceResult } from '../guidance/types'
import type { KidneyFunction } from '../kidney/types'
import type { Policy } from '../policy/types'
import type { SafetyContext } from '../safety/context'
import type { SafetyFinding } from '../safety/types'
import { usesContrast } from '../contrast/outcome'
import { rankAgents } from '../contrast/rank'
import { decide } from '../guidance/decide'
import { evaluateKidney } from '../kidney/evaluate'
import { ageBounds } from '../safety/age'
import { finding } from '../safety/finding'
import { findSafety } from '../safety/index'
import { deriveNeeds } from './derive-needs'

/** What a radiologist signed, where needs and findings are wanted for that instead of for the suggestion. */
export interface Decided { contrast: DecidableOutcome, agent: AgentId | null }

/** The facts of an assessment before they are put into words. */
export interface Judgement {
  question: ClinicalQuestion | null
  guidance: GuidanceResult | null
  /** What the clinical question asks for, before safety. */
  wanted: ContrastOutcome | null
  suggestion: ContrastOutcome | null
  /** The finding that turned the suggestion, if one did. */
  turnedBy: SafetyFinding | null
  kidney: KidneyFunction
  findings: SafetyFinding[]
  agents: AgentChoice | null
  needs: Assessment['needs']
  asksRadiologist: boolean
}

/** The kidney function of these inputs: apart, so that counterfactuals can put another in its place. */
export function kidneyOf(inputs: AssessmentInputs, rules: AssessmentRules): KidneyFunction {
  return evaluateKidney({
    now: inputs.now,
    plannedAt: inputs.plannedAt,
    patient: inputs.patient,
    readings: inputs.readings,
    record: inputs.record,
    screening: inputs.screening,
    setting: inputs.setting,
    priority: inputs.priority,
    policy: rules.policy,
  })
}

/** Guidance, kidney, safety, agents and needs for these inputs; for `decided` instead of the suggestion where given. */
export function judge(inputs: AssessmentInputs, rules: AssessmentRules, options: { decided?: Decided, kidney?: KidneyFunction } = {}): Judgement {
  const { policy } = rules
  const question = rules.guidance.questions.find(candidate => candidate.id === inputs.questionId) ?? null
  const guidance = question === null ? null : decide(question, inputs.answers)
  const asked = guidance === null ? null : askedFor(guidance, inputs)
  const wanted = options.decided?.contrast ?? asked
  const kidney = options.kidney ?? kidneyOf(inputs, rules)
  const at = inputs.plannedAt ?? inputs.now
  const age = ageBounds(inputs.patient.birthDate, at, policy.department.timeZone)
  const context: SafetyContext = {
    outcome: wanted,
    now: inputs.now,
    at,
    planned: inputs.plannedAt !== null,
    priority: inputs.priority,
    setting: inputs.setting,
    patient: inputs.patient,
    age,
    screening: inputs.screening,
    exposures: inputs.exposures,
    recordState: inputs.record.state,
    kidney,
    policy,
    agents: rules.agents,
  }
  const found = findSafety(context)
  const turnedBy = options.decided ? null : turningFinding(wanted, found)
  const suggestion = turnedBy?.turns ?? wanted
  const ranked = suggestion === 'discuss' ? wanted : suggestion
  const agents = ranked !== null && usesContrast(ranked)
    ? rankAgents({
        outcome: ranked, policy, agents: rules.agents, barred: barredAgents(found, inputs.screening),
        patient: { ageYears: age?.youngest ?? null, weightKg: inputs.patient.weightKg },
      })
    : null
  const findings = agents !== null && agents.best === null && !found.some(item => item.id === 'condition-nsf') ? [noAgentFits(policy, ranked), ...found] : found
  return {
    question, guidance, wanted, suggestion, turnedBy, kidney, findings, agents,
    needs: deriveNeeds({
      inputs, policy, kidney, findings, outcome: suggestion, examName: question?.exam ?? null,
      agent: options.decided ? options.decided.agent : agents?.best ?? null,
      decided: options.decided !== undefined,
    }),
    asksRadiologist: suggestion === 'discuss' || findings.some(found => found.asksRadiologist),
  }
}

/** What guidance asks for; where all that decides is answered "not known", nobody can answer more and a radiologist decides. */
function askedFor(guidance: GuidanceResult, { answers }: AssessmentInputs): ContrastOutcome | null {
  if (guidance.status === 'answered') return guidance.contrast
  return guidance.deciders.every(decider => answers[decider] === 'unknown') ? 'discuss' : null
}

/** Contrast is asked for and no stocked agent can give it: somebody has to choose otherwise. */
function noAgentFits(policy: Policy, outcome: ContrastOutcome | null): SafetyFinding {
  return finding({
    id: 'condition-no-agent-fits', topic: 'condition', severity: 'hold',
    text: 'No stocked agent fits this exam and this patient: a radiologist chooses another way.'
      + (outcome === 'iv-hepatobiliary' ? ' A protocol without a liver agent may answer the question.' : ''),
    plain: 'None of our types of contrast fits you. A doctor decides what to do.',
    addsNeeds: ['radiologist-word'], asksRadiologist: true, source: policy.stockedAgents.source,
  })
}

/** "Without contrast" outweighs "to be discussed"; nothing turns a scan that uses none. */
function turningFinding(wanted: ContrastOutcome | null, findings: SafetyFinding[]): SafetyFinding | null {
  if (wanted === null || wanted === 'none') return null
  const turning = findings.filter(found => found.turns !== null && found.turns !== wanted)
  return turning.find(found => found.turns === 'none') ?? turning[0] ?? null
}

/** Why a finding bars an agent, short enough for a list of agents; its full words stand under the findings. */
const barReasons: Record<string, string> = {
  'kidney-unsteady': 'Group I: not while creatinine is unsteady',
  'kidney-below-hold': 'Group I: not at this eGFR',
  'kidney-group-one-barred': 'Group I: not at this eGFR',
  'kidney-group-one-without-value': 'Group I: not without a current eGFR',
  'dialysis-hemodialysis': 'Group I: not on dialysis',
  'dialysis-peritoneal': 'Not group II: not on dialysis',
  'dialysis-unknown': 'Group I: not while dialysis is not ruled out',
  'condition-nsf': 'Not with known nephrogenic systemic fibrosis',
  'condition-nsf-unknown': 'Group I: not while nephrogenic systemic fibrosis is not ruled out',
  'condition-liver': 'Group I: not with severe liver disease',
  'condition-liver-acute': 'Group I: not with severe liver disease',
  'child-under-one': 'Not labeled from birth, or not macrocyclic',
  'history-not-obtainable': 'Group I: not without a history',
}

function barredAgents(findings: SafetyFinding[], { liverDisease }: AssessmentInputs['screening']): { agent: AgentId, reason: string }[] {
  const reasonOf = ({ id, topic, text }: SafetyFinding) => {
    if (liverDisease === 'unknown' && (id === 'condition-liver' || id === 'condition-liver-acute')) return 'Group I: whether there is severe liver disease is not known'
    return barReasons[id] ?? (topic === 'reaction' ? 'An earlier reaction to it' : text)
  }
  return findings.flatMap(found => found.barsAgents.map(agent => ({ agent, reason: reasonOf(found) })))
}
