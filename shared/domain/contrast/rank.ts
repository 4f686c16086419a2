import type { Policy } from '../policy/types'
import { describeAgent } from './agents'
import { computeDose, isBelowLabel } from './dose'
import { isIntravenous, usesContrast } from './outcome'
import type { ContrastOutcome } from './outcome'
import type { Agent, AgentChoice, AgentId, RankedAgent } from './types'

export interface RankInput {
  outcome: ContrastOutcome
  patient: { ageYears: number | null, weightKg: number | null }
  policy: Pick<Policy, 'stockedAgents' | 'acrGroups' | 'weightLimitsKg'>
  /** Agents that a safety finding rules out, with its words. */
  barred: readonly { agent: AgentId, reason: string }[]
  agents: readonly Agent[]
}

/** In a liver exam the agent with the stronger uptake comes first. */
const liverOrder: readonly AgentId[] = ['gadoxetate', 'gadobenate']

/** Why an agent does not suit this exam, or null where it does; a patient's own reasons stand beside it. */
export function unsuited(agent: Agent, outcome: ContrastOutcome): string | null {
  if (outcome === 'iv-hepatobiliary') return agent.liverUptake ? null : 'Not taken up by the liver'
  if (outcome === 'intra-articular') return agent.intraArticularCommon ? null : 'Not in common use in joints'
  return agent.id === 'gadoxetate' ? 'Kept for liver exams' : null
}

function exclusions(agent: Agent, { outcome, policy, barred }: RankInput): string[] {
  const reasons = barred.filter(bar => bar.agent === agent.id).map(bar => bar.reason)
  const unfit = unsuited(agent, outcome)
  if (unfit !== null) reasons.push(unfit)
  if (!policy.stockedAgents.value.includes(agent.id)) reasons.push('Not stocked by the department')
  return [...new Set(reasons)]
}

function merits(agent: Agent, { outcome, policy, patient }: RankInput): string[] {
  const reasons: string[] = []
  if (outcome === 'iv-hepatobiliary') {
    reasons.push(agent.id === 'gadoxetate' ? 'Half of it leaves through the liver' : 'A small part is taken up by the liver')
  }
  else {
    reasons.push(agent.structure === 'macrocyclic' ? 'Macrocyclic agents come first' : 'Linear: after the macrocyclic agents')
    if (outcome === 'intra-articular') reasons.push('In common use in joints; the label does not cover it in the US')
  }
  const place = policy.stockedAgents.value.indexOf(agent.id) + 1
  reasons.push(`Number ${place} in the department's order`)
  if (outcome === 'intra-articular') return reasons
  if (isBelowLabel(agent, patient.ageYears)) {
    const youngest = agent.youngestLabelledAgeYears
    reasons.push(`Off label at this age: the label ${youngest === null ? 'covers adults only' : `starts at ${youngest} years`}`)
  }
  const { low, high } = policy.weightLimitsKg.value
  const dose = computeDose({ agent, ...patient, limitsKg: policy.weightLimitsKg.value })
  if (dose.status === 'bad-weight') reasons.push('No dose without a weight')
  else if (dose.dose.checks.includes('check-weight')) reasons.push(`Weight outside ${low} to ${high} kg: a person confirms the dose`)
  return reasons
}

/** Smaller comes first; compared from left to right. */
function sortKey(agent: Agent, eligible: boolean, { outcome, policy, patient, agents }: RankInput): number[] {
  const shelf = policy.stockedAgents.value.indexOf(agent.id)
  const place = [shelf === -1 ? Number.MAX_SAFE_INTEGER : shelf, agents.findIndex(({ id }) => id === agent.id)]
  if (!eligible) return [1, ...place]
  if (outcome === 'iv-hepatobiliary') {
    const liver = liverOrder.indexOf(agent.id)
    return [0, liver === -1 ? liverOrder.length : liver, ...place]
  }
  const offLabel = isIntravenous(outcome) && isBelowLabel(agent, patient.ageYears)
  return [0, agent.structure === 'macrocyclic' ? 0 : 1, offLabel ? 1 : 0, ...place]
}

function compareKeys(a: readonly number[], b: readonly number[]): number {
  const index = a.findIndex((part, at) => part !== b[at])
  return index === -1 ? 0 : (a[index] ?? 0) - (b[index] ?? 0)
}

/**
 * Orders the agents for one exam and patient. Those that may be given come first: macrocyclic before linear, then labelled
 * for the age before off label, then the department's own order; in a liver exam gadoxetate, then gadobenate. Every agent
 * left out names each of its reasons. Volumes are for checking only.
 *
 * @returns no agents where the outcome uses none, or is still to be discussed
 */
export function rankAgents(input: RankInput): AgentChoice {
  const { outcome, agents, policy, patient } = input
  if (!usesContrast(outcome)) return { outcome, ranked: [], best: null }
  const rows = agents.map((agent) => {
    const against = exclusions(agent, input)
    const eligible = against.length === 0
    const dose = isIntravenous(outcome) ? computeDose({ agent, ...patient, limitsKg: policy.weightLimitsKg.value }) : null
    const ranked: RankedAgent = {
      agent: agent.id,
      name: agent.name,
      descriptor: describeAgent(agent, policy.acrGroups.value[agent.id]),
      concentrationMmolPerMl: agent.concentrationMmolPerMl,
      eligible,
      reasons: eligible ? merits(agent, input) : against,
      dose: dose?.status === 'ok' ? dose.dose : null,
    }
    return { ranked, key: sortKey(agent, eligible, input) }
  })
  const ranked = rows.sort((a, b) => compareKeys(a.key, b.key)).map(row => row.ranked)
  return { outcome, ranked, best: ranked.find(({ eligible }) => eligible)?.agent ?? null }
}
