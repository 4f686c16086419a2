import { describe, expect, it } from 'vitest'
import { agentIds } from '#shared/domain/contrast/types'
import { starterPolicy } from '#shared/domain/policy/defaults'
import { policyProblems } from '#shared/domain/policy/limits'
import type { Policy } from '#shared/domain/policy/types'

type Values = { [Name in Exclude<keyof Policy, 'version' | 'department'>]?: Partial<Policy[Name]['value']> | Policy[Name]['value'] }

/** The starter policy with some values changed; the parts of an object that are not named stay. */
function changed(values: Values): Policy {
  const policy = structuredClone(starterPolicy)
  for (const [name, value] of Object.entries(values)) {
    const setting: { value: unknown } = policy[name as keyof Values]
    setting.value = typeof value === 'object' && !Array.isArray(value) ? { ...setting.value as object, ...value } : value
  }
  return policy
}

const words = (values: Values) => policyProblems(changed(values)).map(({ path, message }) => `${path.join('.')}: ${message}`)

describe('a policy', () => {
  it('of the starter kind is accepted', () => {
    expect(policyProblems(starterPolicy)).toEqual([])
  })

  it('may choose within reason', () => {
    expect(words({
      holdBelowEgfr: 45, creatinineWindowDays: { noRiskFactor: 90, riskFactorStable: 90, egfr30To59: 30, egfrBelow30: 30, acute: 1 }, observationMinutes: 0,
      pregnancyAskedAges: { from: 10, to: 60 }, stockedAgents: [...agentIds], weightLimitsKg: { low: 3, high: 200 }, dialysisWithinHours: 6,
    })).toEqual([])
  })

  it.each<[string, Values, RegExp]>([
    ['a creatinine window of 0 days', { creatinineWindowDays: { acute: 0 } }, /^creatinineWindowDays\.value\.acute: The creatinine window with acute illness must be a whole number of days from 1 to 365/],
    ['part of a day', { creatinineWindowDays: { egfr30To59: 10.5 } }, /a whole number of days/],
    ['an older creatinine in sicker people', { creatinineWindowDays: { acute: 10 } }, /With acute illness a creatinine may not be older than with an eGFR below 30/],
    ['an older creatinine with a risk factor than without', { creatinineWindowDays: { noRiskFactor: 30 } }, /With a stable risk factor a creatinine may not be older than without one/],
    ['a hold below 4', { holdBelowEgfr: 4 }, /^holdBelowEgfr\.value: .*from 5 to 60/],
    ['a hold below 61', { holdBelowEgfr: 61 }, /from 5 to 60/],
    ['a hold that is no number', { holdBelowEgfr: Number.NaN }, /from 5 to 60/],
    ['a low weight above the high one', { weightLimitsKg: { low: 150 } }, /The low weight limit must lie below the high one/],
    ['negative hours', { dialysisWithinHours: -1 }, /^dialysisWithinHours\.value: The time to dialysis after the exam must be hours from 1 to 72/],
    ['accelerated premedication before the usual', { premedicationLeadHours: { accelerated: 20 } }, /may not begin earlier/],
    ['a least interval above the advised', { repeatIntervalHours: { above60: { optimal: 4, least: 12 } } }, /above60\.least: With an eGFR above 60, the least time between doses may not lie above/],
    ['a shorter interval with worse kidneys', { repeatIntervalHours: { below30: { optimal: 24, least: 8 } } }, /with an eGFR below 30 may not be shorter than with an eGFR of 30 to 60/],
    ['no agent at all', { stockedAgents: [] }, /^stockedAgents\.value: At least one agent must be stocked/],
    ['an agent twice', { stockedAgents: ['gadobutrol', 'gadobutrol'] }, /gadobutrol stands twice/],
    ['a group I agent preferred first', { stockedAgents: ['gadodiamide', 'gadobutrol'] }, /preferred first may not be one of ACR group I/],
    ['an agent of no group preferred first', { stockedAgents: ['gadofosveset'] }, /no ACR group/],
    ['ages turned round', { pregnancyAskedAges: { from: 50, to: 12 } }, /may not lie above the last/],
    ['pregnancy asked of few', { pregnancyAskedAges: { from: 20, to: 40 } }, /at least from 15 to 49 years/],
    ['a thinner cannula for the power injector', { cannula: { powerGauge: '24 G' } }, /may not be thinner/],
    ['a gauge in other words', { cannula: { usualGauge: 'blue' } }, /written like 22 G/],
    ['a stat request slower than a routine one', { decisionWithinMinutes: { stat: 3000 } }, /A more urgent request may not wait longer/],
    ['an exam longer than can be booked', { examMinutes: { base: 200 } }, /may not exceed 240 minutes/],
    ['a link without an end', { links: { validDays: 4000 } }, /whole number of days from 1 to 365/],
    ['one try at the date of birth', { links: { birthDateTries: 1 } }, /from 3 to 20/],
  ])('with %s is refused with the reason', (_what, values, reason) => {
    expect(words(values).join('\n')).toMatch(reason)
  })

  it('with a stocked agent of no named group is refused', () => {
    const policy = structuredClone(starterPolicy)
    delete policy.acrGroups.value.gadoterate
    expect(policyProblems(policy).map(({ message }) => message)).toEqual(['The ACR group of gadoterate must be named, since it is stocked'])
  })

  it.each(['Chicago', '', 'UTC+6', 'Central Time'])('in the zone %j is refused', (timeZone) => {
    const problems = policyProblems({ ...starterPolicy, department: { ...starterPolicy.department, timeZone } })
    expect(problems.map(({ path }) => path.join('.'))).toEqual(['department.timeZone'])
  })
})
