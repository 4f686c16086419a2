import type { Answers, Branch, ClinicalQuestion, Decider } from './types'

/** The answer "not known", possible for every decider. */
export const unknownAnswer = 'unknown'

/** Values that settle a decider, in the order they are offered; `unknown` is not among them. */
export function decidedValues(decider: Decider): string[] {
  return decider.kind === 'yesno' ? ['yes', 'no'] : decider.options.map(option => option.id)
}

/** Words for an answer: "Yes", "No", "Not known" or the option's label; the stored value where it is none of these. */
export function answerLabel(decider: Decider, value: string): string {
  if (value === unknownAnswer) return 'Not known'
  if (decider.kind === 'yesno') return value === 'yes' ? 'Yes' : value === 'no' ? 'No' : value
  return decider.options.find(option => option.id === value)?.label ?? value
}

/**
 * How a decider stands: answered with a value that settles it, declared unknown, or still missing. A value the question
 * does not offer (an option dropped by a later guidance version) counts as missing: it has to be asked again.
 */
export function standing(decider: Decider, answers: Answers): 'decided' | 'unknown' | 'missing' {
  const value = Object.hasOwn(answers, decider.id) ? answers[decider.id] : undefined
  if (value === undefined) return 'missing'
  if (value === unknownAnswer) return 'unknown'
  return decidedValues(decider).includes(value) ? 'decided' : 'missing'
}

/** How many full sets of answers `completions` would list. */
export function countCompletions(deciders: Decider[], answers: Answers): number {
  return deciders.reduce(
    (count, decider) => count * (standing(decider, answers) === 'decided' ? 1 : decidedValues(decider).length), 1)
}

/** Every full set of answers that agrees with the decided ones: unknown and missing deciders take each value in turn. */
export function completions(deciders: Decider[], answers: Answers): Answers[] {
  return deciders.reduce<Answers[]>((sets, decider) => {
    const value = answers[decider.id]
    const values = value !== undefined && standing(decider, answers) === 'decided' ? [value] : decidedValues(decider)
    return sets.flatMap(set => values.map(each => ({ ...set, [decider.id]: each })))
  }, [{}])
}

/** Whether every condition of a branch accepts these answers. A decider without an answer is accepted by no condition. */
export function accepts(branch: Branch, answers: Answers): boolean {
  return Object.entries(branch.when).every(([decider, values]) => {
    const value = answers[decider]
    return value !== undefined && values.includes(value)
  })
}

/** Index of the first branch that accepts a full set of answers; null where the table has a gap. */
export function firstHit(question: ClinicalQuestion, answers: Answers): number | null {
  const index = question.branches.findIndex(branch => accepts(branch, answers))
  return index === -1 ? null : index
}
