import { z } from 'zod'
import { agentIds } from '../domain/contrast/types'
import { policyProblems } from '../domain/policy/limits'
import type { Policy } from '../domain/policy/types'
import { requiredText } from './common'

const words = (max: number) => requiredText(max, 'Must not be empty.')

const source = z.strictObject({
  title: words(300),
  body: words(200),
  year: z.number().int().min(1900).max(2200).nullable(),
  status: z.enum(['confirmed', 'from memory', 'common practice', 'local']),
})

/** A setting always says where its value comes from and since when. */
const sourced = <T extends z.ZodType>(value: T) => z.strictObject({ value, source, asOf: z.iso.date() })

const number = z.number()
const interval = z.strictObject({ optimal: number, least: number })

/**
 * The shape of a stored policy, nothing unknown in it. A version of the past is read back with this alone: limits that came later
 * must not make what it decided unreadable.
 */
export const policyShape = z.strictObject({
  version: words(60),
  department: z.strictObject({ name: words(120), timeZone: words(60), phone: words(60), callHours: words(200), address: words(300) }),
  kidneyPosition: sourced(z.enum(['label', 'acr', 'esur', 'local'])),
  holdBelowEgfr: sourced(number),
  creatinineWindowDays: sourced(z.strictObject({
    noRiskFactor: number.nullable(), riskFactorStable: number, egfr30To59: number, egfrBelow30: number, acute: number,
  })),
  ageRiskAboveYears: sourced(number),
  pregnancyAskedAges: sourced(z.strictObject({ from: number, to: number })),
  premedicationLeadHours: sourced(z.strictObject({ oral: number, accelerated: number })),
  dialysisWithinHours: sourced(number),
  weightLimitsKg: sourced(z.strictObject({ low: number, high: number })),
  observationMinutes: sourced(number),
  repeatIntervalHours: sourced(z.strictObject({ above60: interval, from30To60: interval, below30: interval })),
  stockedAgents: sourced(z.array(z.enum(agentIds))),
  acrGroups: sourced(z.partialRecord(z.enum(agentIds), z.enum(['I', 'II', 'III', 'not listed']))),
  cannula: sourced(z.strictObject({ usualGauge: words(10), powerGauge: words(10) })),
  decisionWithinMinutes: sourced(z.strictObject({ routine: number, urgent: number, asap: number, stat: number })),
  bookWithinDays: sourced(number),
  examMinutes: sourced(z.strictObject({ base: number, ivStart: number, joint: number, liver: number })),
  links: sourced(z.strictObject({ validDays: number, birthDateTries: number })),
}) satisfies z.ZodType<Policy>

/** A policy that may come into force: of this shape, and nothing in it that no department can mean. */
export const policySchema = policyShape.superRefine((policy, context) => {
  for (const { path, message } of policyProblems(policy)) context.addIssue({ code: 'custom', path, message })
})

/** The first thing wrong with a policy, for an administrator: where, and why. */
export function firstPolicyProblem(error: z.ZodError): string {
  const [issue] = error.issues
  return issue === undefined ? 'it cannot be read' : `${issue.path.join('.') || 'policy'}: ${issue.message}`
}
