import { contrastOutcomes } from '#shared/domain/contrast/outcome'
import { starterQuestions } from '#shared/domain/guidance/questions/index'
import type { Answers, ClinicalQuestion, Decider } from '#shared/domain/guidance/types'
import fc from 'fast-check'

/** A starter question by id. */
export function starter(id: string): ClinicalQuestion {
  const question = starterQuestions.find(each => each.id === id)
  if (question === undefined) throw new Error(`no starter question ${id}`)
  return question
}

function valuesOf(decider: Decider): string[] {
  return decider.kind === 'yesno' ? ['yes', 'no'] : decider.options.map(option => option.id)
}

/** Every full set of answers, counted up like the digits of a number: written apart from the code under test. */
export function allAnswers(question: ClinicalQuestion): Answers[] {
  const sizes = question.deciders.map(decider => valuesOf(decider).length)
  const total = sizes.reduce((a, b) => a * b, 1)
  return Array.from({ length: total }, (_, number) => {
    let rest = number
    return Object.fromEntries(question.deciders.map((decider, place) => {
      const size = sizes[place] ?? 1
      const value = valuesOf(decider)[rest % size] ?? ''
      rest = Math.floor(rest / size)
      return [decider.id, value]
    }))
  })
}

/** The first row of the table that takes these answers; -1 where none does. */
export function firstRow(question: ClinicalQuestion, answers: Answers): number {
  for (let row = 0; row < question.branches.length; row += 1) {
    let takes = true
    for (const [decider, accepted] of Object.entries(question.branches[row]?.when ?? {})) {
      if (!accepted.some(value => value === answers[decider])) takes = false
    }
    if (takes) return row
  }
  return -1
}

/** Answers in any state: given, unknown or missing. */
export function arbitraryAnswers(question: ClinicalQuestion): fc.Arbitrary<Answers> {
  const states = question.deciders.map(decider => fc.constantFrom<(string | undefined)[]>(undefined, 'unknown', ...valuesOf(decider)))
  return fc.tuple(...states).map(values => Object.fromEntries(
    question.deciders.flatMap((decider, index) => {
      const value = values[index]
      return value === undefined ? [] : [[decider.id, value] as const]
    })))
}

const arbitraryDeciders: fc.Arbitrary<Decider[]> = fc.array(fc.option(fc.integer({ min: 2, max: 4 })), { maxLength: 3 })
  .map(sizes => sizes.map((size, place): Decider => {
    const id = `fact${place}`
    return size === null
      ? { id, ask: id, kind: 'yesno' }
      : { id, ask: id, kind: 'choice', options: Array.from({ length: size }, (_, n) => ({ id: `o${n}`, label: `Option ${n}` })) }
  }))

/** Complete decision tables with any conditions, for properties that must hold beyond the starter set. */
export const arbitraryQuestion: fc.Arbitrary<ClinicalQuestion> = arbitraryDeciders.chain((deciders) => {
  const condition = fc.tuple(...deciders.map(decider => fc.option(fc.subarray(valuesOf(decider), { minLength: 1 }))))
  const when = condition.map(accepted => Object.fromEntries(deciders.flatMap((decider, index) => {
    const values = accepted[index]
    return values === null || values === undefined ? [] : [[decider.id, values] as const]
  })))
  const outcome = fc.constantFrom(...contrastOutcomes)
  return fc.tuple(fc.array(fc.tuple(when, outcome), { maxLength: 4 }), outcome).map(([rows, otherwise]): ClinicalQuestion => ({
    ...starter('headache-adult'),
    id: 'any',
    usualBranch: rows.length,
    deciders,
    branches: [...rows, [{}, otherwise] as const].map(([conditions, contrast]) => ({
      when: conditions, contrast, inShort: 'it does', because: 'It does.', plain: 'It does.',
    })),
  }))
})
