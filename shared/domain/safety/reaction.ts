import type { SafetyContext } from './context'
import type { SafetyFinding } from './types'
import type { AgentId } from '../contrast/types'
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

/** Unknown kind counts as allergic-like, unknown severity as moderate. */
function allergicLike(context: SafetyContext): SafetyFinding {
  const { screening, policy, agents } = context
  const severity = screening.reactionSeverity
  const to = `to ${agentName(screening.reactionAgent, agents)}`
  const kind = screening.reactionKind === 'allergic-like' ? 'allergic-like' : 'not described, so taken as allergic-like'
  const named = namedAgent(context)
  const bars = named
  const change = named.length > 0 ? 'Take another agent' : 'Find out which agent it was, so that another can be taken'
  const oral = policy.premedicationLeadHours.value.oral
  const lead = `premedication starts ${oral} hours before (${policy.premedicationLeadHours.value.accelerated} on the accelerated schedule)`
  const common = { topic: 'reaction', barsAgents: bars, asksRadiologist: true, source: safetySources.acrReactions } as const
  if (severity === 'severe') {
    return finding({
      ...common, id: 'reaction-allergic-severe', severity: 'hold',
      text: `Severe earlier reaction ${to}, ${kind}: leave contrast out or use another test unless it is essential. If it is: another agent, ${lead}, `
        + 'a physician in the room. Labels bar an agent after a severe reaction to it. An allergy work-up helps.',
      plain: 'You had a strong reaction to contrast before. A doctor decides if contrast is needed at all.',
      addsNeeds: ['radiologist-word', 'premedication', 'radiologist-present', 'observation', ...(named.length > 0 ? [] : ['reaction-history' as const])],
      turns: 'discuss',
    })
  }
  if (severity === 'mild' && named.length > 0) {
    return finding({
      ...common, id: 'reaction-allergic-mild', severity: 'caution',
      text: `Mild earlier reaction ${to}, ${kind}: another agent, then ${policy.observationMinutes.value} minutes of observation. `
        + 'Many departments add no premedication after a mild reaction; the radiologist decides.',
      plain: 'You had a mild reaction to contrast before. We use another type and watch you for longer.',
      addsNeeds: ['radiologist-word', 'observation'],
    })
  }
  const degree = severity === 'moderate' ? 'Moderate' : severity === 'mild' ? 'Mild' : 'Undescribed (taken as moderate)'
  return finding({
    ...common, id: severity === 'mild' ? 'reaction-allergic-mild-agent-unknown' : 'reaction-allergic-moderate', severity: 'hold',
    text: `${degree} earlier reaction ${to}, ${kind}. ${change}; ${lead}; ${policy.observationMinutes.value} minutes of observation. The radiologist decides.`,
    plain: 'You had a reaction to contrast before. A doctor decides, and you may need to take medicine first.',
    addsNeeds: ['radiologist-word', 'premedication', 'observation', ...(named.length > 0 && severity !== null && severity !== 'unknown' ? [] : ['reaction-history' as const])],
  })
}

function physiologic(context: SafetyContext): SafetyFinding {
  const { screening, agents } = context
  const to = `to ${agentName(screening.reactionAgent, agents)}`
  if (screening.reactionSeverity === 'severe') {
    return finding({
      id: 'reaction-physiologic-severe', topic: 'reaction', severity: 'hold',
      text: `Severe physiologic reaction ${to}: a radiologist's word is needed. Premedication does not prevent this kind.`,
      plain: 'You were very unwell after contrast before. A doctor decides about contrast first.',
      addsNeeds: ['radiologist-word', 'radiologist-present', 'observation'], barsAgents: namedAgent(context), asksRadiologist: true,
      source: safetySources.acrReactions,
    })
  }
  const mild = screening.reactionSeverity === 'mild'
  return finding({
    id: mild ? 'reaction-physiologic-mild' : 'reaction-physiologic-moderate', topic: 'reaction', severity: mild ? 'info' : 'caution',
    text: `${mild ? 'Mild' : 'Moderate'} physiologic reaction ${to}: no premedication, which helps only against allergic-like reactions.`,
    plain: 'You felt unwell after contrast before. We keep an eye on you after the injection.',
    addsNeeds: mild ? [] : ['observation'],
    source: safetySources.acrReactions,
  })
}
