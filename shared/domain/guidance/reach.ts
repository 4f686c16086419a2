import type { ContrastOutcome } from '../contrast/outcome'
import { completions, firstHit } from './deciders'
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

/** The contrast outcomes among what was reached, each once, in the table's order. */
export function outcomesOf(reached: Reached[]): ContrastOutcome[] {
  const inOrder = [...reached].sort((a, b) => a.index - b.index)
  return [...new Set(inOrder.map(each => each.branch.contrast))]
}

/**
 * Contrast outcomes these answers can still lead to, each once, in the table's order: one where the outcome is settled,
 * several where a missing or unknown fact could still turn it. Throws as `reach` does.
 */
export function reachableOutcomes(question: ClinicalQuestion, answers: Answers): ContrastOutcome[] {
  return outcomesOf(reach(question, answers))
}
