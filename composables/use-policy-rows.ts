import { starterAgents } from '#shared/domain/contrast/agents'
import type { AgentId } from '#shared/domain/contrast/types'
import type { Policy, Sourced } from '#shared/domain/policy/types'
import { priorities, priorityWords } from '#shared/domain/request/priority'
import type { Source } from '#shared/domain/source'

/** A setting as the page shows it: what it is, its value in words, where it comes from. */
export interface PolicyRow { id: string, label: string, value: string[], source: Source, asOf: string }
export interface PolicyGroup { title: string, rows: PolicyRow[] }

const positions = {
  label: 'US prescribing information',
  acr: 'ACR Manual on Contrast Media',
  esur: 'ESUR guidelines on contrast agents',
  local: 'The department\'s own',
} as const

export const sourceStatusWords = {
  'confirmed': 'read in the source',
  'from memory': 'not re-checked',
  'common practice': 'common practice',
  'local': 'this department\'s choice',
} as const satisfies Record<Source['status'], string>

function agentName(id: AgentId): string {
  return starterAgents.find(agent => agent.id === id)?.name ?? id
}

function days(count: number | null): string {
  return count === null ? 'no creatinine needed' : `${count} days`
}

/** "240" minutes become "4 hours"; 90 stay "90 minutes". */
export function minutesWords(minutes: number): string {
  if (minutes < 120 || minutes % 60 !== 0) return minutes === 60 ? '1 hour' : `${minutes} minutes`
  const hours = minutes / 60
  return hours >= 48 && hours % 24 === 0 ? `${hours / 24} days` : `${hours} hours`
}

function row<T>(id: string, label: string, setting: Sourced<T>, words: (value: T) => string | string[]): PolicyRow {
  return { id, label, value: [words(setting.value)].flat(), source: setting.source, asOf: setting.asOf }
}

/** The whole policy in words, in the order in which an exam meets it. */
export function policyGroups(policy: Policy): PolicyGroup[] {
  return [
    { title: 'Kidney function', rows: [
      row('kidneyPosition', 'Position followed', policy.kidneyPosition, value => positions[value]),
      row('holdBelowEgfr', 'Contrast waits for a radiologist below', policy.holdBelowEgfr, value => `eGFR ${value} mL/min/1.73 m²`),
      row('creatinineWindowDays', 'Oldest creatinine accepted at the exam', policy.creatinineWindowDays, value => [
        `No risk factor: ${days(value.noRiskFactor)}`, `Risk factor, stable: ${days(value.riskFactorStable)}`, `eGFR 30 to 59: ${days(value.egfr30To59)}`,
        `eGFR below 30: ${days(value.egfrBelow30)}`, `Acutely ill: ${days(value.acute)}`,
      ]),
      row('ageRiskAboveYears', 'Age counts as a risk factor above', policy.ageRiskAboveYears, value => `${value} years`),
      row('dialysisWithinHours', 'Hemodialysis after contrast within', policy.dialysisWithinHours, value => `${value} hours`),
    ] },
    { title: 'Safety', rows: [
      row('pregnancyAskedAges', 'Pregnancy is asked from', policy.pregnancyAskedAges, value => `${value.from} to ${value.to} years`),
      row('premedicationLeadHours', 'Premedication begins before contrast', policy.premedicationLeadHours, value => [`By mouth: ${value.oral} hours`, `Accelerated: ${value.accelerated} hours`]),
      row('weightLimitsKg', 'A weight is confirmed outside', policy.weightLimitsKg, value => `${value.low} to ${value.high} kg`),
      row('observationMinutes', 'Observation after an earlier reaction', policy.observationMinutes, minutesWords),
      row('repeatIntervalHours', 'Time between two doses', policy.repeatIntervalHours, value => [
        `eGFR above 60: ${value.above60.optimal} hours, ${value.above60.least} at least`,
        `eGFR 30 to 60: ${value.from30To60.optimal} hours, ${value.from30To60.least} at least`,
        `eGFR below 30: ${value.below30.optimal} hours, ${value.below30.least} at least`,
      ]),
    ] },
    { title: 'Agents', rows: [
      row('stockedAgents', 'On the shelf, in order of preference', policy.stockedAgents, value => value.map(agentName)),
      row('acrGroups', 'ACR groups', policy.acrGroups, value => starterAgents.filter(agent => value[agent.id]).map(agent => `${agent.name}: ${value[agent.id]}`)),
      row('cannula', 'Cannula', policy.cannula, value => [`Usual: ${value.usualGauge}`, `Power injector: ${value.powerGauge}`]),
    ] },
    { title: 'Time', rows: [
      row('decisionWithinMinutes', 'A request is decided within', policy.decisionWithinMinutes, value => priorities.map(priority => `${priorityWords[priority]}: ${minutesWords(value[priority])}`)),
      row('bookWithinDays', 'An approved exam is booked within', policy.bookWithinDays, value => `${value} days`),
      row('examMinutes', 'An exam takes', policy.examMinutes, value => [`${value.base} minutes`, `with an IV start: ${value.ivStart} more`, `into a joint: ${value.joint} more`, `with a liver agent: ${value.liver} more`]),
      row('links', 'A patient\'s link', policy.links, value => [`works for ${value.validDays} days`, `closes after ${value.birthDateTries} wrong dates of birth`]),
    ] },
  ]
}
