import { assess } from '#shared/domain/assessment/assess'
import type { Assessment, AssessmentRules } from '#shared/domain/assessment/types'
import { starterAgents } from '#shared/domain/contrast/agents'
import { starterQuestions } from '#shared/domain/guidance/questions/index'
import type { EquationId } from '#shared/domain/kidney/types'
import { starterPolicy } from '#shared/domain/policy/defaults'
import { near, same } from './row'
import type { Shortfall } from './row'
import { inputsOf } from './vignette'
import type { Vignette } from './vignette'

const rules: AssessmentRules = { guidance: { version: 'starter', questions: starterQuestions }, policy: starterPolicy, agents: starterAgents }

export interface ScoredVignette { shortfalls: Shortfall[], beside: string[] }

/** Scores a case against the starter guidance and policy; `beside` is for a person to compare and is not scored. */
export function scoreVignette(vignette: Vignette): ScoredVignette {
  const { inputs, notUnderstood } = inputsOf(vignette)
  const assessment = assess(inputs, rules)
  return {
    shortfalls: [...same('contrast', vignette.expectedContrast, contrastOf(assessment)), ...scoreKidney(assessment, vignette)],
    beside: [
      assessment.sentence,
      `expected safety: ${vignette.expectedSafety ?? 'nothing said'}`,
      ...listed('finding', assessment.findings.map(found => `${found.severity}, ${found.id}: ${found.text}`)),
      ...listed('need', assessment.needs.map(need => `${need.owner}: ${need.text}`)),
      ...equationBeside(assessment, vignette),
      ...regionBeside(assessment, vignette),
      ...notUnderstood.map(words => `not understood: ${words}`),
    ],
  }
}

function listed(what: string, lines: readonly string[]): string[] {
  return lines.length === 0 ? [`${what}: none`] : lines.map(line => `${what}: ${line}`)
}

function contrastOf({ guidance }: Assessment): string {
  if (guidance === null) return 'question not found'
  return guidance.status === 'answered' ? guidance.contrast : `open until answered: ${guidance.deciders.join(', ')}`
}

/** The cases give whole numbers: within 1 mL/min/1.73 m². Null means that none may be shown, a missing key nothing at all. */
function egfrNear(what: string, expected: number | null | undefined, shown: number | null | undefined): Shortfall[] {
  if (expected === undefined) return []
  return expected === null ? same(what, null, shown ?? null) : near(what, expected, shown ?? null, 1)
}

function scoreKidney({ kidney }: Assessment, { context }: Vignette): Shortfall[] {
  if (context == null) return []
  const { expectedEgfr, expectedEgfrMain, expectedEgfrCombined, expectedEgfrCreatinineOnly, expectedEgfrRange, expectedAkiStage } = context
  const by = (equation: EquationId) => [kidney.egfr, kidney.beside].find(value => value?.equation === equation)?.value
  return [
    ...(expectedEgfrMain == null
      ? egfrNear('eGFR', expectedEgfr, kidney.egfr?.value)
      : [...egfrNear('main eGFR', expectedEgfrMain, kidney.egfr?.value), ...egfrNear('eGFR beside', expectedEgfr, kidney.beside?.value)]),
    ...egfrNear('eGFR with cystatin C', expectedEgfrCombined ?? undefined, by('ckd-epi-2021-cr-cys')),
    ...egfrNear('eGFR from creatinine alone', expectedEgfrCreatinineOnly ?? undefined, by('ckd-epi-2021-cr')),
    ...egfrNear('lower eGFR', expectedEgfrRange?.[0], kidney.range?.low.value),
    ...egfrNear('higher eGFR', expectedEgfrRange?.[1], kidney.range?.high.value),
    ...(expectedAkiStage == null ? [] : same('stage of acute injury', expectedAkiStage, kidney.injury.stageCurrent)),
  ]
}

function equationBeside({ kidney }: Assessment, { context }: Vignette): string[] {
  if (context?.equation == null) return []
  const used = [kidney.egfr ?? kidney.range?.low ?? null, kidney.beside].flatMap(value => (value === null ? [] : [`${value.equationLabel} ${value.display}`]))
  return [`equation: expected ${context.equation}, shown ${used.join(' and ') || 'none'}`]
}

function regionBeside({ exam }: Assessment, { region }: Vignette): string[] {
  return region == null || exam === null || region === exam.region ? [] : [`region: the case says ${region}, the question belongs to ${exam.region}`]
}
