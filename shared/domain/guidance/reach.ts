import type { ContrastOutcome } from '../contrast/outcome'
import { completions, decidedValues, firstHit } from './deciders'
import type { Answers, Branch, ClinicalQuestion } from './types'

/** One full set of answers that is still possible, and the branch it leads to. */
export interface Reached {
  answers: Answers
  index: number
  branch: Branch
}

/**
 * Every full set of answers that agrees with what is decided so far, with its branch, in the deciders' order.
 * Throws a RangeError where the table has a gap; `inspect` finds gaps before a question is put in force.
 */
export function reach(question: ClinicalQuestion, answers: Answers): Reached[] {
  return completions(question.deciders, answers).map((full) => {
    const index = firstHit(question, full)
    const branch = index === null ? undefined : question.branches[index]
    if (index === null || branch === undefined) {
      throw new RangeError(`The decision table of "${question.id}" has no branch for some of its answers`)
    }
    return { answers: full, index, branch }
  })
}

/** Indexes of the branches these answers can still lead to, in the table's order. Throws as `reach` does. */
export function reachableBranches(question: ClinicalQuestion, answers: Answers): number[] {
  return [...new Set(reach(question, answers).map(reached => reached.index))].sort((a, b) => a - b)
}

/** Contrast outcomes these answers can still lead to, each once, in the table's order. Throws as `reach` does. */
export function reachableOutcomes(question: ClinicalQuestion, answers: Answers): ContrastOutcome[] {
  const outcomes = reachableBranches(question, answers).flatMap(index => question.branches[index]?.contrast ?? [])
  return [...new Set(outcomes)]
}

/** What giving one decider another answer could lead to. */
export interface WhatIf {
  decider: string
  value: string
  /** Outcomes then possible. One: the answer would change to it. Several: it then depends on further answers. */
  possible: ContrastOutcome[]
}

/**
 * The single answers that would change the contrast, for the clause "Unless": each decider takes each other value while
 * the rest stays. Empty while the answers still leave more than one outcome. Throws as `reach` does.
 */
export function whatIfs(question: ClinicalQuestion, answers: Answers): WhatIf[] {
  const [now, ...others] = reachableOutcomes(question, answers)
  if (now === undefined || others.length > 0) return []
  return question.deciders.flatMap(decider => decidedValues(decider)
    .filter(value => value !== answers[decider.id])
    .map(value => ({
      decider: decider.id,
      value,
      possible: reachableOutcomes(question, { ...answers, [decider.id]: value }),
    }))
    .filter(whatIf => whatIf.possible.some(outcome => outcome !== now)))
}
