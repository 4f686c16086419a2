import type { SafetyContext } from './context'
import type { SafetyFinding } from './types'
import { unsuited } from '../contrast/rank'
import { mayBeIntravenous } from './context'
import { finding } from './finding'
import { safetySources } from './sources'

/** Infants under one, and children below the age on an agent's label. */
export function findChild(context: SafetyContext): SafetyFinding[] {
  const age = context.age
  const { outcome } = context
  if (outcome === null || !mayBeIntravenous(context) || age === null || age.youngest >= 18) return []
  if (age.youngest < 1) {
    return [finding({
      id: 'child-under-one', topic: 'child', severity: 'hold',
      text: 'Under one year: no equation estimates GFR. A radiologist decides with the pediatric team; a macrocyclic agent labeled from birth, '
        + 'in the lowest dose, once and by hand.',
      plain: 'Your baby is very young. A children\'s doctor and a scan doctor decide about contrast.',
      addsNeeds: ['radiologist-word'], asksRadiologist: true,
      barsAgents: context.agents
        .filter(agent => agent.structure !== 'macrocyclic' || agent.youngestLabelledAgeYears !== 0)
        .map(agent => agent.id),
      source: safetySources.usLabels,
    })]
  }
  const stocked = new Set(context.policy.stockedAgents.value)
  const older = context.agents.filter(agent => stocked.has(agent.id) && unsuited(agent, outcome) === null
    && (agent.youngestLabelledAgeYears === null || agent.youngestLabelledAgeYears > age.youngest))
  if (older.length === 0) return []
  return [finding({
    id: 'child-age-below-label', topic: 'child', severity: 'info',
    text: `Below the youngest labeled age of ${older.map(agent => agent.name).join(', ')}: use outside the label is common in children, and the radiologist's choice.`,
    plain: 'We choose a type of contrast that suits a child.',
    source: safetySources.usLabels,
  })]
}
