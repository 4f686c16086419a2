import { IANAZone } from 'luxon'
import type { Policy } from './types'

/** A setting that cannot be meant: where it stands in the policy, and why it is refused, for the person who wrote it. */
export interface PolicyProblem { path: (string | number)[], message: string }

interface Range { least: number, most: number, unit: string, whole?: boolean }

/** Numbers outside are taken for slips of the pen, not for a choice. Limits are project conventions unless a source is named. */
const limits = {
  holdBelowEgfr: { least: 5, most: 60, unit: 'mL/min/1.73 m²' },
  windowDays: { least: 1, most: 365, unit: 'days', whole: true },
  ageRiskYears: { least: 18, most: 100, unit: 'years', whole: true },
  pregnancyYears: { least: 8, most: 65, unit: 'years', whole: true },
  premedicationHours: { least: 1, most: 48, unit: 'hours' },
  dialysisHours: { least: 1, most: 72, unit: 'hours' },
  weightKg: { least: 0.3, most: 400, unit: 'kg' },
  observationMinutes: { least: 0, most: 120, unit: 'minutes', whole: true },
  intervalHours: { least: 1, most: 720, unit: 'hours' },
  decisionMinutes: { least: 5, most: 43_200, unit: 'minutes', whole: true },
  bookDays: { least: 1, most: 90, unit: 'days', whole: true },
  examMinutes: { least: 10, most: 240, unit: 'minutes', whole: true },
  addedMinutes: { least: 0, most: 120, unit: 'minutes', whole: true },
  linkDays: { least: 1, most: 365, unit: 'days', whole: true },
  birthDateTries: { least: 3, most: 20, unit: 'tries', whole: true },
} as const satisfies Record<string, Range>

/** Pregnancy is asked at these ages at least. Source: WHO's years of childbearing age, 15 to 49, from memory. */
const childbearingYears = { from: 15, to: 49 } as const
/** Longest exam that can be booked, minutes. */
const longestExam = 240

const decisionOrder = ['stat', 'asap', 'urgent', 'routine'] as const
const windowOrder = ['acute', 'egfrBelow30', 'egfr30To59', 'riskFactorStable'] as const
const windowWords = {
  acute: 'acute illness', egfrBelow30: 'an eGFR below 30', egfr30To59: 'an eGFR of 30 to 59', riskFactorStable: 'a stable risk factor',
} as const satisfies Record<(typeof windowOrder)[number], string>
const bands = [
  { key: 'below30', words: 'an eGFR below 30' }, { key: 'from30To60', words: 'an eGFR of 30 to 60' }, { key: 'above60', words: 'an eGFR above 60' },
] as const

function outside(value: number, range: Range, path: PolicyProblem['path'], what: string): PolicyProblem[] {
  const { least, most, unit, whole } = range
  if (Number.isFinite(value) && value >= least && value <= most && !(whole && !Number.isInteger(value))) return []
  return [{ path, message: `${what} must be ${whole ? 'a whole number of' : ''} ${unit} from ${least} to ${most}`.replace('  ', ' ') }]
}

/**
 * Settings of a policy that cannot be meant, in its own order; empty where it may come into force. A choice a department may make
 * is not judged: only numbers no department means, orders turned round, and what the rules could not work with.
 */
export function policyProblems(policy: Policy): PolicyProblem[] {
  return [
    ...departmentProblems(policy),
    ...kidneyProblems(policy),
    ...personProblems(policy),
    ...timeProblems(policy),
    ...agentProblems(policy),
    ...workProblems(policy),
  ]
}

function departmentProblems({ department }: Policy): PolicyProblem[] {
  return IANAZone.isValidZone(department.timeZone)
    ? []
    : [{ path: ['department', 'timeZone'], message: 'The time zone must be one of the IANA list, for instance America/Chicago' }]
}

function kidneyProblems({ holdBelowEgfr, creatinineWindowDays: { value: days }, ageRiskAboveYears }: Policy): PolicyProblem[] {
  const at = (key: string) => ['creatinineWindowDays', 'value', key]
  const problems = outside(holdBelowEgfr.value, limits.holdBelowEgfr, ['holdBelowEgfr', 'value'], 'The eGFR that holds contrast')
  for (const key of windowOrder) problems.push(...outside(days[key], limits.windowDays, at(key), `The creatinine window with ${windowWords[key]}`))
  if (days.noRiskFactor !== null) problems.push(...outside(days.noRiskFactor, limits.windowDays, at('noRiskFactor'), 'The creatinine window without a risk factor'))
  windowOrder.forEach((key, index) => {
    const next = windowOrder[index + 1]
    if (next !== undefined && days[key] > days[next]) {
      problems.push({ path: at(key), message: `With ${windowWords[key]} a creatinine may not be older than with ${windowWords[next]}` })
    }
  })
  if (days.noRiskFactor !== null && days.riskFactorStable > days.noRiskFactor) {
    problems.push({ path: at('riskFactorStable'), message: 'With a stable risk factor a creatinine may not be older than without one' })
  }
  return [...problems, ...outside(ageRiskAboveYears.value, limits.ageRiskYears, ['ageRiskAboveYears', 'value'], 'The age above which kidney risk is assumed')]
}

function personProblems({ pregnancyAskedAges, weightLimitsKg }: Policy): PolicyProblem[] {
  const { from, to } = pregnancyAskedAges.value
  const { low, high } = weightLimitsKg.value
  const problems = [
    ...outside(from, limits.pregnancyYears, ['pregnancyAskedAges', 'value', 'from'], 'The first age at which pregnancy is asked'),
    ...outside(to, limits.pregnancyYears, ['pregnancyAskedAges', 'value', 'to'], 'The last age at which pregnancy is asked'),
  ]
  if (from > to) problems.push({ path: ['pregnancyAskedAges', 'value', 'from'], message: 'The first age at which pregnancy is asked may not lie above the last' })
  else if (from > childbearingYears.from || to < childbearingYears.to) {
    problems.push({ path: ['pregnancyAskedAges', 'value'], message: `Pregnancy must be asked at least from ${childbearingYears.from} to ${childbearingYears.to} years` })
  }
  problems.push(
    ...outside(low, limits.weightKg, ['weightLimitsKg', 'value', 'low'], 'The low weight limit'),
    ...outside(high, limits.weightKg, ['weightLimitsKg', 'value', 'high'], 'The high weight limit'),
  )
  if (low >= high) problems.push({ path: ['weightLimitsKg', 'value', 'low'], message: 'The low weight limit must lie below the high one' })
  return problems
}

function timeProblems({ premedicationLeadHours, dialysisWithinHours, observationMinutes, repeatIntervalHours }: Policy): PolicyProblem[] {
  const { oral, accelerated } = premedicationLeadHours.value
  const problems = [
    ...outside(oral, limits.premedicationHours, ['premedicationLeadHours', 'value', 'oral'], 'The lead time of premedication'),
    ...outside(accelerated, limits.premedicationHours, ['premedicationLeadHours', 'value', 'accelerated'], 'The accelerated lead time of premedication'),
  ]
  if (accelerated > oral) {
    problems.push({ path: ['premedicationLeadHours', 'value', 'accelerated'], message: 'Accelerated premedication may not begin earlier than the usual one' })
  }
  problems.push(
    ...outside(dialysisWithinHours.value, limits.dialysisHours, ['dialysisWithinHours', 'value'], 'The time to dialysis after the exam'),
    ...outside(observationMinutes.value, limits.observationMinutes, ['observationMinutes', 'value'], 'The time of observation'),
  )
  bands.forEach(({ key, words }, index) => {
    const { optimal, least } = repeatIntervalHours.value[key]
    const at = (part: string) => ['repeatIntervalHours', 'value', key, part]
    problems.push(
      ...outside(optimal, limits.intervalHours, at('optimal'), `The advised time between doses with ${words}`),
      ...outside(least, limits.intervalHours, at('least'), `The least time between doses with ${words}`),
    )
    if (least > optimal) problems.push({ path: at('least'), message: `With ${words}, the least time between doses may not lie above the advised one` })
    const better = bands[index + 1]
    if (better === undefined) return
    const next = repeatIntervalHours.value[better.key]
    if (optimal < next.optimal || least < next.least) {
      problems.push({ path: ['repeatIntervalHours', 'value', key], message: `The times between doses with ${words} may not be shorter than with ${better.words}` })
    }
  })
  return problems
}

function agentProblems({ stockedAgents: { value: stocked }, acrGroups: { value: groups } }: Policy): PolicyProblem[] {
  const [first] = stocked
  if (first === undefined) return [{ path: ['stockedAgents', 'value'], message: 'At least one agent must be stocked' }]
  const problems: PolicyProblem[] = []
  stocked.forEach((agent, index) => {
    const path = ['stockedAgents', 'value', index]
    if (stocked.indexOf(agent) !== index) problems.push({ path, message: `${agent} stands twice among the stocked agents` })
    if (groups[agent] === undefined) problems.push({ path, message: `The ACR group of ${agent} must be named, since it is stocked` })
  })
  if (groups[first] === 'I' || groups[first] === 'not listed') {
    problems.push({ path: ['stockedAgents', 'value', 0], message: `The agent preferred first may not be one of ${groups[first] === 'I' ? 'ACR group I' : 'no ACR group'}` })
  }
  return problems
}

/** Gauge of a cannula: a larger number is a thinner one. */
function gaugeOf(text: string): number | null {
  const gauge = Number(/^(\d{2}) G$/.exec(text)?.[1] ?? Number.NaN)
  return gauge >= 14 && gauge <= 26 ? gauge : null
}

function workProblems(policy: Policy): PolicyProblem[] {
  const problems: PolicyProblem[] = []
  const { usualGauge, powerGauge } = policy.cannula.value
  const usual = gaugeOf(usualGauge)
  const power = gaugeOf(powerGauge)
  if (usual === null) problems.push({ path: ['cannula', 'value', 'usualGauge'], message: 'The gauge must be written like 22 G, from 14 to 26' })
  if (power === null) problems.push({ path: ['cannula', 'value', 'powerGauge'], message: 'The gauge must be written like 20 G, from 14 to 26' })
  if (usual !== null && power !== null && power > usual) {
    problems.push({ path: ['cannula', 'value', 'powerGauge'], message: 'The cannula for the power injector may not be thinner than the usual one' })
  }

  const within = policy.decisionWithinMinutes.value
  decisionOrder.forEach((priority, index) => {
    const path = ['decisionWithinMinutes', 'value', priority]
    problems.push(...outside(within[priority], limits.decisionMinutes, path, 'The time to a decision'))
    const slower = decisionOrder[index + 1]
    if (slower !== undefined && within[priority] > within[slower]) problems.push({ path, message: 'A more urgent request may not wait longer than a less urgent one' })
  })
  problems.push(...outside(policy.bookWithinDays.value, limits.bookDays, ['bookWithinDays', 'value'], 'The time to booking'))

  const exam = policy.examMinutes.value
  problems.push(...outside(exam.base, limits.examMinutes, ['examMinutes', 'value', 'base'], 'The length of an exam'))
  for (const part of ['ivStart', 'joint', 'liver'] as const) {
    problems.push(...outside(exam[part], limits.addedMinutes, ['examMinutes', 'value', part], 'The minutes added'))
  }
  if (exam.base + exam.ivStart + Math.max(exam.joint, exam.liver) + policy.observationMinutes.value > longestExam) {
    problems.push({ path: ['examMinutes', 'value'], message: `The longest exam with observation may not exceed ${longestExam} minutes, the longest that can be booked` })
  }
  const links = policy.links.value
  return [
    ...problems,
    ...outside(links.validDays, limits.linkDays, ['links', 'value', 'validDays'], 'The time a patient\'s link is valid'),
    ...outside(links.birthDateTries, limits.birthDateTries, ['links', 'value', 'birthDateTries'], 'The tries at the date of birth'),
  ]
}
