import { DateTime } from 'luxon'
import type { SafetyContext } from './context'
import type { SafetyFinding } from './types'
import { acrGroupOf, cannotWait, groupOneAgents, mayBeIntravenous } from './context'
import { finding } from './finding'
import { safetySources } from './sources'

/** Dialysis: highest risk whatever the creatinine says; timing after the scan, and no session for the contrast's sake. */
export function findDialysis(context: SafetyContext): SafetyFinding[] {
  if (!mayBeIntravenous(context)) return []
  switch (context.screening.dialysis) {
    case 'hemodialysis': return [hemodialysis(context), ...timing(context)]
    case 'peritoneal': return [finding({
      id: 'dialysis-peritoneal', topic: 'dialysis', severity: 'hold',
      text: 'Peritoneal dialysis clears gadolinium slowly: group II agents only, on a radiologist\'s word, with the nephrologist informed. '
        + 'Changing to hemodialysis on account of the contrast is not needed.',
      plain: 'You have dialysis through the belly. A doctor decides about contrast first.',
      addsNeeds: ['radiologist-word'], asksRadiologist: true,
      barsAgents: context.agents.filter(agent => acrGroupOf(agent, context.policy) !== 'II').map(agent => agent.id),
      source: safetySources.dialysisTiming,
    })]
    case 'unknown': return [finding({
      id: 'dialysis-unknown', topic: 'dialysis', severity: 'hold',
      text: 'Whether the patient is on dialysis is not known: treated as yes until it is.',
      plain: 'We need to know if you have dialysis.',
      addsNeeds: ['radiologist-word'], barsAgents: groupOneAgents(context), asksRadiologist: true,
      source: safetySources.acrNkf,
    })]
    default: return []
  }
}

function hemodialysis(context: SafetyContext): SafetyFinding {
  return finding({
    id: 'dialysis-hemodialysis', topic: 'dialysis', severity: 'hold',
    text: 'Hemodialysis: eGFR means nothing here. A group II agent may be given on a radiologist\'s word, shortly before the next regular session. '
      + 'No extra session is needed on account of the contrast.',
    plain: 'You have dialysis, so a doctor looks at contrast first. Keep your dialysis plan. '
      + (cannotWait(context) ? 'Your scan is urgent and does not wait for a session.' : 'We book the scan shortly before a session.'),
    addsNeeds: ['radiologist-word', 'dialysis-after'], barsAgents: groupOneAgents(context), asksRadiologist: true,
    source: safetySources.acrNkf,
  })
}

function timing(context: SafetyContext): SafetyFinding[] {
  if (!context.planned || context.screening.nextDialysisAt === null) return []
  const hours = DateTime.fromISO(context.screening.nextDialysisAt).diff(DateTime.fromISO(context.at), 'hours').hours
  const limit = context.policy.dialysisWithinHours.value
  if (Number.isNaN(hours) || (hours >= 0 && hours <= limit)) return []
  return [finding({
    id: 'dialysis-timing', topic: 'dialysis', severity: 'caution',
    text: hours < 0
      ? 'The dialysis session named comes before the planned exam: book the exam before a session, or name the one after it.'
      : `The next dialysis session is ${Math.round(hours)} hours after the planned exam; policy asks for it within ${limit} hours.${cannotWait(context) ? ' The exam need not wait for it: let the nephrologist know.' : ''}`,
    plain: cannotWait(context) ? 'Your scan is urgent. We tell your dialysis team about it.' : 'The scan should come shortly before your dialysis. We may move the time.',
    addsNeeds: ['dialysis-after'],
    source: context.policy.dialysisWithinHours.source,
  })]
}
