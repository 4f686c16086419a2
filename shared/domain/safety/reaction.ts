import type { SafetyContext } from './context'
import type { SafetyFinding } from './types'
import type { AgentId } from '../contrast/types'
import { unsuited } from '../contrast/rank'
import { agentName, mayUseContrast } from './context'
import { finding } from './finding'
import { safetySources } from './sources'

/** An earlier reaction to a gadolinium agent, by kind and severity. Shellfish and iodinated contrast are not asked: no cross-reaction. */
export function findReactions(context: SafetyContext): SafetyFinding[] {
  if (!mayUseContrast(context)) return []
  if (context.screening.earlierReaction === 'unknown') {
    return [finding({
      id: 'reaction-history-unknown', topic: 'reaction', severity: 'caution',
      text: 'Whether the patient ever reacted to a gadolinium agent is not known: treated as unknown, not as none.',
      plain: 'We need to know if you ever had a reaction to contrast.',
      addsNeeds: ['reaction-history', 'observation'],
      source: safetySources.acrReactions,
    })]
  }
  if (context.screening.earlierReaction !== 'yes') return []
  return context.screening.reactionKind === 'physiologic' ? [physiologic(context)] : [allergicLike(context)]
}

/** The agent named in the history, so that another one is taken instead. */
function namedAgent({ screening }: SafetyContext): AgentId[] {
  return screening.reactionAgent === null || screening.reactionAgent === 'unknown' ? [] : [screening.reactionAgent]
}

/** Whether the department stocks another agent that suits this exam. */
function canSwitch({ agents, outcome, policy }: SafetyContext, named: readonly AgentId[]): boolean {
  return agents.some(agent => !named.includes(agent.id) && policy.stockedAgents.value.includes(agent.id) && outcome !== null && unsuited(agent, outcome) === null)
}

/** What to give instead of the agent named; a liver exam may have no other, and then goes without a liver agent. */
function otherAgent(context: SafetyContext, named: readonly AgentId[]): string {
  if (named.length === 0 || canSwitch(context, named)) return 'Another agent'
  return context.outcome === 'iv-hepatobiliary'
    ? 'No other liver agent is stocked, so a protocol without a liver agent on the radiologist\'s word'
    : 'No other stocked agent suits this exam, so a radiologist chooses another way'
}

/** "Earlier reaction to gadobutrol: mild, allergic-like"; what is not known says how it is taken. */
function described({ screening, agents }: SafetyContext): string {
  const severity = screening.reactionSeverity === null || screening.reactionSeverity === 'unknown'
    ? 'severity not known (taken as moderate)'
    : screening.reactionSeverity
  const kind = screening.reactionKind === null || screening.reactionKind === 'unknown' ? 'kind not known (taken as allergic-like)' : screening.reactionKind
  return `Earlier reaction to ${agentName(screening.reactionAgent, agents)}: ${severity}, ${kind}`
}

/** Unknown kind counts as allergic-like, unknown severity as moderate. */
function allergicLike(context: SafetyContext): SafetyFinding {
  const { policy } = context
  const severity = context.screening.reactionSeverity
  const named = namedAgent(context)
  const what = described(context)
  const change = named.length > 0 ? otherAgent(context, named) : 'Find out which agent it was, so that another can be taken (a reaction to iodinated contrast does not count)'
  const { oral, accelerated } = policy.premedicationLeadHours.value
  const lead = `premedication from ${oral} hours before (${accelerated} on the accelerated schedule)`
  const watch = `${policy.observationMinutes.value} minutes of observation`
  const common = { topic: 'reaction', barsAgents: named, asksRadiologist: true, source: safetySources.acrReactions } as const
  const agentOpen = named.length > 0 ? [] : ['reaction-history' as const]
  if (severity === 'severe') {
    return finding({
      ...common, id: 'reaction-allergic-severe', severity: 'hold',
      text: `${what}. Leave contrast out or use another test unless it is essential. If it is: ${otherAgent(context, named).replace(/^\w/, first => first.toLowerCase())}, ${lead}, a physician in the room. `
        + 'Labels bar an agent after a severe reaction to it. An allergy work-up helps.',
      plain: 'You had a strong reaction to contrast before. A doctor decides if contrast is needed at all.',
      addsNeeds: ['radiologist-word', 'premedication', 'radiologist-present', 'observation', ...agentOpen],
      turns: 'discuss',
    })
  }
  if (severity === 'mild' && named.length > 0) {
    return finding({
      ...common, id: 'reaction-allergic-mild', severity: 'caution',
      text: `${what}. ${otherAgent(context, named)}, then ${watch}. Many departments add no premedication after a mild reaction; the radiologist decides.`,
      plain: canSwitch(context, named)
        ? 'You had a mild reaction to contrast before. We use another type and watch you for longer.'
        : 'You had a mild reaction to contrast before. A doctor decides what we use now.',
      addsNeeds: ['radiologist-word', 'observation'],
    })
  }
  return finding({
    ...common, id: severity === 'mild' ? 'reaction-allergic-mild-agent-unknown' : 'reaction-allergic-moderate', severity: 'hold',
    text: `${what}. ${change}; ${lead}; ${watch}. The radiologist decides.`,
    plain: 'You had a reaction to contrast before. A doctor decides, and you may need to take medicine first.',
    addsNeeds: ['radiologist-word', 'premedication', 'observation', ...(severity === null || severity === 'unknown' ? ['reaction-history' as const] : agentOpen)],
  })
}

/** Nausea, warmth, fainting and the like: premedication does not prevent them. */
function physiologic(context: SafetyContext): SafetyFinding {
  const what = described(context)
  if (context.screening.reactionSeverity === 'severe') {
    return finding({
      id: 'reaction-physiologic-severe', topic: 'reaction', severity: 'hold',
      text: `${what}. A radiologist's word is needed. Premedication does not prevent this kind.`,
      plain: 'You were very unwell after contrast before. A doctor decides about contrast first.',
      addsNeeds: ['radiologist-word', 'radiologist-present', 'observation'], barsAgents: namedAgent(context), asksRadiologist: true,
      source: safetySources.acrReactions,
    })
  }
  const mild = context.screening.reactionSeverity === 'mild'
  return finding({
    id: mild ? 'reaction-physiologic-mild' : 'reaction-physiologic-moderate', topic: 'reaction', severity: mild ? 'info' : 'caution',
    text: `${what}. No premedication, which helps only against allergic-like reactions.`,
    plain: 'You felt unwell after contrast before. We keep an eye on you after the injection.',
    addsNeeds: mild ? [] : ['observation'],
    source: safetySources.acrReactions,
  })
}
