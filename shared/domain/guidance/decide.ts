import { accepts, standing } from './deciders'
import { outcomesOf, reach } from './reach'
import type { Reached } from './reach'
import type { Answers, ClinicalQuestion, Decider, GuidanceResult } from './types'

/**
 * Answers a clinical question from its decision table: the first branch whose conditions all hold.
 *
 * - An answer `unknown` is tried with every value it could take. If all lead to one outcome the question is answered
 *   (`despiteUnknown`); the branch given is one whose conditions hold without the unknown facts where there is one, so
 *   that the reason claims nothing that is not known.
 * - A decider not answered yet, or answered with a value the question does not offer, blocks the answer as long as it
 *   could move it to another branch, even one with the same outcome: the reason must be right too.
 * - Otherwise `needs-answers` names, in the question's order, only the missing and unknown deciders that matter, and
 *   the outcomes still possible.
 *
 * Answers to deciders the question does not have are ignored. Throws a RangeError where the table has a gap (`inspect`
 * finds gaps before a question is put in force).
 */
export function decide(question: ClinicalQuestion, answers: Answers): GuidanceResult {
  const reached = reach(question, answers)
  const matters = (decider: Decider): boolean => {
    const state = standing(decider, answers)
    if (state === 'missing') return moves(reached, decider, each => String(each.index))
    return state === 'unknown' && moves(reached, decider, each => each.branch.contrast)
  }
  const open = question.deciders.filter(matters).map(decider => decider.id)
  if (open.length > 0) return { status: 'needs-answers', deciders: open, possible: outcomesOf(reached) }

  const chosen = reached.find(each => accepts(each.branch, answers)) ?? last(reached)
  return {
    status: 'answered',
    contrast: chosen.branch.contrast,
    branch: chosen.index,
    inShort: chosen.branch.inShort,
    because: chosen.branch.because,
    plain: chosen.branch.plain,
    despiteUnknown: question.deciders.some(decider => standing(decider, answers) === 'unknown'),
  }
}

/** Whether two sets of answers that differ in this decider alone differ in what `result` reads from them. */
function moves(reached: Reached[], decider: Decider, result: (each: Reached) => string): boolean {
  const seen = new Map<string, string>()
  return reached.some((each) => {
    const rest = JSON.stringify({ ...each.answers, [decider.id]: '' })
    const before = seen.get(rest)
    seen.set(rest, result(each))
    return before !== undefined && before !== result(each)
  })
}

/** The reached branch that stands last in the table: the one with the most general conditions. */
function last(reached: Reached[]): Reached {
  return reached.reduce((a, b) => (b.index > a.index ? b : a))
}
