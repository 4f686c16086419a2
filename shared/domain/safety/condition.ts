import type { SafetyContext } from './context'
import type { SafetyFinding } from './types'
import { cannotWait, groupOneAgents, mayBeIntravenous, mayUseContrast } from './context'
import { finding } from './finding'
import { safetySources } from './sources'

/**
 * Conditions that bear on contrast: known NSF, severe liver disease, asthma.
 * Sickle cell disease, myasthenia, pheochromocytoma, thyroid disease, myeloma and metformin are left out on purpose: none restricts gadolinium.
 */
export function findConditions(context: SafetyContext): SafetyFinding[] {
  if (!mayUseContrast(context)) return []
  return [...findFibrosis(context), ...findLiver(context), ...findAsthma(context)]
}

function findFibrosis(context: SafetyContext): SafetyFinding[] {
  if (context.screening.nephrogenicSystemicFibrosis === 'yes') {
    return [finding({
      id: 'condition-nsf', topic: 'condition', severity: 'stop',
      text: 'Known nephrogenic systemic fibrosis: no further gadolinium unless it saves a life, on a radiologist\'s word.',
      plain: 'You have a rare skin illness that contrast can make worse. So contrast is left out.',
      barsAgents: context.agents.map(agent => agent.id), asksRadiologist: true, addsNeeds: ['radiologist-word'],
      turns: cannotWait(context) ? 'discuss' : 'none',
      source: safetySources.practice,
    })]
  }
  if (context.screening.nephrogenicSystemicFibrosis !== 'unknown') return []
  return [finding({
    id: 'condition-nsf-unknown', topic: 'condition', severity: 'info',
    text: 'Whether the patient has nephrogenic systemic fibrosis is not known: group I agents are barred.',
    plain: 'We choose the type of contrast with the lowest known risk.',
    barsAgents: groupOneAgents(context),
    source: safetySources.practice,
  })]
}

function findLiver(context: SafetyContext): SafetyFinding[] {
  const answer = context.screening.liverDisease
  if (!mayBeIntravenous(context) || (answer !== 'yes' && answer !== 'unknown')) return []
  // Around a transplant and in hepatorenal syndrome people are in hospital or acutely ill.
  const acute = context.setting !== 'outpatient' || context.screening.acuteIllness === 'yes'
  const stated = answer === 'yes' ? 'Severe liver disease or liver transplant' : 'Severe liver disease is not ruled out'
  const findings = [finding({
    id: acute ? 'condition-liver-acute' : 'condition-liver', topic: 'condition', severity: acute && answer === 'yes' ? 'hold' : 'caution',
    text: acute
      ? `${stated} in an acute setting: around a transplant or with hepatorenal syndrome, treated like acute kidney injury. A radiologist decides.`
      : `${stated}: with hepatorenal syndrome or around a transplant it counts like acute kidney injury. Group I agents are barred.`,
    plain: answer === 'unknown' ? 'We need to know if your liver is ill.' : acute ? 'Your liver is ill. A doctor decides about contrast first.' : 'Your liver can affect your kidneys. We check this first.',
    barsAgents: groupOneAgents(context),
    ...(acute ? { addsNeeds: ['radiologist-word' as const], asksRadiologist: true } : {}),
    source: safetySources.usLabels,
  })]
  if (context.outcome === 'iv-hepatobiliary') {
    findings.push(finding({
      id: 'condition-liver-uptake', topic: 'condition', severity: 'caution',
      text: 'The liver takes up the agent weakly when bilirubin is above 3 mg/dL: check it, or image within 60 minutes.',
      plain: 'When the liver is very ill, this type of contrast may show less.',
      source: { title: 'US prescribing information, gadoxetate', body: 'US Food and Drug Administration', year: 2026, status: 'confirmed' },
    }))
  }
  return findings
}

function findAsthma(context: SafetyContext): SafetyFinding[] {
  const answer = context.screening.asthma
  if (answer !== 'yes' && answer !== 'unknown') return []
  return [finding({
    id: answer === 'yes' ? 'condition-asthma' : 'condition-asthma-unknown', topic: 'condition', severity: answer === 'yes' ? 'caution' : 'info',
    text: `Asthma${answer === 'yes' ? '' : ' is not ruled out'}: reactions are two to three times as common, and still rare. No reason to hold contrast or premedicate; `
      + `${context.policy.observationMinutes.value} minutes of observation, and wait while asthma is active.`,
    plain: 'With asthma we watch you a little longer after the injection.',
    addsNeeds: ['observation'],
    source: safetySources.practice,
  })]
}
