import type { Assessment, AssessmentInputs, AssessmentRules } from './types'
import type { Decided } from './judge'
import { becauseClauses, plainVersion, providedClauses, sentenceOf } from './clauses'
import { examNameFor } from '../contrast/exam-name'
import { judge } from './judge'
import { engineVersion } from './types'
import { unlessClauses } from './unless'

/**
 * Works out one assessment from stored inputs and the rules in force: no clock, network or database inside.
 * Partial inputs are welcome: with no question chosen the sentence says so and only kidney function,
 * implants and pregnancy speak. Never throws on inputs of the declared types.
 */
export function assess(inputs: AssessmentInputs, rules: AssessmentRules): Assessment {
  const judged = judge(inputs, rules)
  const { question } = judged
  return {
    engineVersion,
    guidanceVersion: rules.guidance.version,
    policyVersion: rules.policy.version,
    assessedAt: inputs.now,
    exam: question && { questionId: question.id, region: question.region, name: examNameFor(question.exam, judged.suggestion), question: question.question },
    guidance: judged.guidance,
    suggestion: judged.suggestion,
    sentence: sentenceOf(judged),
    kidney: judged.kidney,
    findings: judged.findings,
    agents: judged.agents,
    needs: judged.needs,
    because: becauseClauses(judged),
    provided: providedClauses(judged),
    unless: unlessClauses(inputs, rules, judged),
    asksRadiologist: judged.asksRadiologist,
    plain: plainVersion(judged),
    alternatives: question?.alternatives ?? null,
  }
}

/** Findings, agents and needs once a radiologist has chosen the contrast; what preparation and booking work from. */
export function assessDecision(
  inputs: AssessmentInputs, rules: AssessmentRules, decided: Decided,
): Pick<Assessment, 'kidney' | 'findings' | 'agents' | 'needs' | 'asksRadiologist'> {
  const { kidney, findings, agents, needs, asksRadiologist } = judge(inputs, rules, { decided })
  return { kidney, findings, agents, needs, asksRadiologist }
}
