import { afterAll, describe, expect, it } from 'vitest'
import { z } from 'zod'
import { assess } from '#shared/domain/assessment/assess'
import type { Assessment } from '#shared/domain/assessment/types'
import { starterAgents } from '#shared/domain/contrast/agents'
import { starterQuestions } from '#shared/domain/guidance/questions/index'
import { starterPolicy } from '#shared/domain/policy/defaults'
import table from './tables/vignettes.json'
import type { Vignette } from './vignette-case'
import { inputsOf, vignetteSchema } from './vignette-case'

const cases = z.array(vignetteSchema).parse(table)
const rules = { guidance: { version: 'starter', questions: starterQuestions }, policy: starterPolicy, agents: starterAgents }
const beside: string[] = []

function contrastOf({ guidance }: Assessment): string {
  if (guidance === null) return 'question not found'
  return guidance.status === 'answered' ? guidance.contrast : `needs ${guidance.deciders.join(', ')}`
}

/** The tables print whole numbers: within 1 mL/min/1.73 m². */
function expectEgfr(shown: number | null | undefined, expected: number | null | undefined): void {
  if (expected === undefined) return
  if (expected === null) expect(shown ?? null).toBeNull()
  else expect(Math.abs((shown ?? Number.NaN) - expected)).toBeLessThanOrEqual(1)
}

function expectKidney({ kidney }: Assessment, { context }: Vignette): void {
  const combined = [kidney.egfr, kidney.beside].find(value => value?.equation === 'ckd-epi-2021-cr-cys')
  const alone = [kidney.egfr, kidney.beside].find(value => value?.equation === 'ckd-epi-2021-cr')
  if (context.expectedEgfrMain != null) {
    expectEgfr(kidney.egfr?.value, context.expectedEgfrMain)
    expectEgfr(kidney.beside?.value, context.expectedEgfr)
  }
  else expectEgfr(kidney.egfr?.value, context.expectedEgfr)
  if (context.expectedEgfrCombined != null) expectEgfr(combined?.value, context.expectedEgfrCombined)
  if (context.expectedEgfrCreatinineOnly != null) expectEgfr(alone?.value, context.expectedEgfrCreatinineOnly)
  if (context.expectedEgfrRange != null) {
    expectEgfr(kidney.range?.low.value, context.expectedEgfrRange[0])
    expectEgfr(kidney.range?.high.value, context.expectedEgfrRange[1])
  }
  if (context.expectedAkiStage != null) expect(kidney.injury.stageCurrent).toBe(context.expectedAkiStage)
}

describe('vignettes against the starter guidance', () => {
  it.each(cases.map(vignette => ({ title: `${vignette.id}: ${vignette.history}`.slice(0, 90), vignette })))('$title', ({ vignette }) => {
    const { inputs, notUnderstood } = inputsOf(vignette)
    const assessment = assess(inputs, rules)
    beside.push([
      `${vignette.id} ${assessment.sentence}`, `  expected: ${vignette.expectedSafety ?? ''}`,
      `  found: ${assessment.findings.map(found => found.id).join(', ') || 'nothing'}`, `  needs: ${assessment.needs.map(need => need.kind).join(', ') || 'nothing'}`,
      ...notUnderstood.map(words => `  not understood: ${words}`),
    ].join('\n'))
    expect(contrastOf(assessment)).toBe(vignette.expectedContrast)
    expectKidney(assessment, vignette)
  })
})

// The expectation on safety is prose: a person compares it with what was found.
afterAll(() => console.info(beside.join('\n')))
