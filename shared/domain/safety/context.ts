import type { AgeBounds } from './age'
import type { GadoliniumExposure, ScreeningAnswers } from './types'
import type { AssessedPatient, AssessmentInputs, RecordState } from '../assessment/types'
import type { Agent, AgentId, AcrGroup } from '../contrast/types'
import type { ContrastOutcome } from '../contrast/outcome'
import type { KidneyFunction } from '../kidney/types'
import type { Policy } from '../policy/types'
import type { Priority } from '../request/priority'
import { isIntravenous, usesContrast } from '../contrast/outcome'

/** What every safety topic is handed. */
export interface SafetyContext {
  /** What the clinical question asks for; null while it is open. */
  outcome: ContrastOutcome | null
  /** ISO instant of the judgement. */
  now: string
  /** Planned exam start, or `now` while no slot is set. */
  at: string
  planned: boolean
  priority: Priority
  setting: AssessmentInputs['setting']
  patient: AssessedPatient
  age: AgeBounds | null
  screening: ScreeningAnswers
  exposures: GadoliniumExposure[]
  recordState: RecordState
  kidney: KidneyFunction
  policy: Policy
  agents: readonly Agent[]
}

/** Whether the agent would go into a vein, counting an exam still to be discussed. */
export function mayBeIntravenous(context: SafetyContext): boolean {
  return context.outcome !== null && (isIntravenous(context.outcome) || context.outcome === 'discuss')
}

/** Whether any gadolinium may be given, by vein or into a joint. */
export function mayUseContrast(context: SafetyContext): boolean {
  return context.outcome !== null && (usesContrast(context.outcome) || context.outcome === 'discuss')
}

/** Whether waiting for an answer could harm: the exam goes ahead on a radiologist's word instead. */
export function cannotWait(context: Pick<SafetyContext, 'priority' | 'setting'>): boolean {
  return context.priority === 'urgent' || context.priority === 'asap' || context.priority === 'stat' || context.setting === 'emergency'
}

/** An agent's ACR group as the department's policy holds it, else as the agent's own entry says. */
export function acrGroupOf(agent: Agent, policy: Policy): AcrGroup {
  return policy.acrGroups.value[agent.id] ?? agent.acrGroup
}

/** Agents outside ACR groups II and III: group I, and those on no list. */
export function groupOneAgents(context: Pick<SafetyContext, 'agents' | 'policy'>): AgentId[] {
  return context.agents
    .filter(agent => ['I', 'not listed'].includes(acrGroupOf(agent, context.policy)))
    .map(agent => agent.id)
}

/** An agent's name for a sentence; "an agent that is not known" where it is not named. */
export function agentName(id: AgentId | 'unknown' | null, agents: readonly Agent[]): string {
  return agents.find(agent => agent.id === id)?.name ?? 'an agent that is not known'
}
