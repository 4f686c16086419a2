import { usesContrast } from '../contrast/outcome'
import { fleschKincaidGrade, readingGradeCeiling } from '../letter/readability'
import { completions, countCompletions, decidedValues, firstHit, unknownAnswer } from './deciders'
import { isRegionId } from './regions'
import type { Answers, ClinicalQuestion } from './types'

/** What can be wrong with a clinical question; the list is closed. */
export type ProblemKind =
  | 'empty-text' | 'unknown-region' | 'repeated-id' | 'reserved-id' | 'too-few-options'
  | 'no-branches' | 'unknown-decider' | 'unknown-option' | 'last-branch-not-empty' | 'usual-branch'
  | 'too-many-combinations' | 'gap' | 'unreachable-branch' | 'idle-decider'
  | 'missing-source' | 'missing-alternatives' | 'headline' | 'hard-to-read'

export interface Problem {
  kind: ProblemKind
  /** A sentence for the guidance editor. */
  message: string
  /** Where it stands: a branch by index or a decider by id; neither where the whole question is meant. */
  branch?: number
  decider?: string
}

/** Most words of an `inShort` clause; more no longer reads as a headline. */
export const headlineWords = 14

/** Most full sets of answers a question may have; more cannot be reviewed by a person, nor tried at each keystroke. */
export const combinationLimit = 500

/**
 * Checks one clinical question before it is put in force: its table is complete and every branch can be reached, every
 * decider can change the contrast, every answer is sourced and has an alternative where contrast may be given, and the
 * patient's text stays at or below `readingGradeCeiling` by Flesch-Kincaid. SMOG needs longer text and is left to the
 * letter. An empty list means none found; it says nothing about whether the answer is right.
 */
export function inspect(question: ClinicalQuestion): Problem[] {
  const names = [...nameProblems(question), ...conditionProblems(question)]
  return [
    ...textProblems(question),
    ...names,
    // A table with faulty names would only repeat them as gaps and unreachable branches.
    ...(names.length === 0 ? tableProblems(question) : []),
    ...coverProblems(question),
    ...readingProblems(question),
  ]
}

/** `inspect` over a whole guidance version, with ids that more than one question carries. Only questions with problems. */
export function inspectGuidance(questions: ClinicalQuestion[]): { questionId: string, problems: Problem[] }[] {
  const repeated = new Set(repeats(questions.map(question => question.id)))
  return questions
    .map((question) => {
      const own: Problem[] = repeated.has(question.id)
        ? [{ kind: 'repeated-id', message: `More than one question has the id "${question.id}".` }]
        : []
      return { questionId: question.id, problems: [...own, ...inspect(question)] }
    })
    .filter(found => found.problems.length > 0)
}

function textProblems(question: ClinicalQuestion): Problem[] {
  const problems: Problem[] = []
  const need = (text: string, what: string, at: Partial<Problem> = {}) => {
    if (text.trim() === '') problems.push({ kind: 'empty-text', message: `${what} is empty.`, ...at })
  }
  need(question.id, 'The id')
  need(question.exam, 'The exam')
  need(question.question, 'The clinical question')
  need(question.plainQuestion, 'The question in plain words')
  if (!isRegionId(question.region)) {
    problems.push({ kind: 'unknown-region', message: `The region "${question.region}" is not in the list.` })
  }
  for (const decider of question.deciders) need(decider.ask, 'What to ask', { decider: decider.id })
  question.branches.forEach((branch, index) => {
    need(branch.inShort, 'The short reason', { branch: index })
    need(branch.because, 'The reason', { branch: index })
    need(branch.plain, 'The text for the patient', { branch: index })
    const short = branch.inShort.trim()
    if (/\.$/.test(short) || short.split(/\s+/).length > headlineWords || /^[A-Z][a-z]/.test(short)) {
      const message = `The short reason follows "because": start in lower case, at most ${headlineWords} words, no full stop.`
      problems.push({ kind: 'headline', message, branch: index })
    }
  })
  return problems
}

function nameProblems(question: ClinicalQuestion): Problem[] {
  const problems: Problem[] = repeats(question.deciders.map(decider => decider.id))
    .map(id => ({ kind: 'repeated-id', message: `More than one decider has the id "${id}".`, decider: id }))
  for (const decider of question.deciders) {
    const values = decidedValues(decider)
    if (values.length < 2) {
      problems.push({ kind: 'too-few-options', message: 'A choice needs at least two options.', decider: decider.id })
    }
    if (values.includes(unknownAnswer)) {
      const message = '"Not known" is always offered and cannot be an option of its own.'
      problems.push({ kind: 'reserved-id', message, decider: decider.id })
    }
    for (const id of repeats(values)) {
      problems.push({ kind: 'repeated-id', message: `More than one option has the id "${id}".`, decider: decider.id })
    }
  }
  return problems
}

function conditionProblems(question: ClinicalQuestion): Problem[] {
  const problems: Problem[] = []
  const deciders = new Map(question.deciders.map(decider => [decider.id, decider]))
  question.branches.forEach((branch, index) => {
    for (const [id, values] of Object.entries(branch.when)) {
      const decider = deciders.get(id)
      if (decider === undefined) {
        problems.push({ kind: 'unknown-decider', message: `The branch asks for "${id}", which is not a decider.`, branch: index })
        continue
      }
      for (const value of values.filter(value => !decidedValues(decider).includes(value))) {
        const message = `The branch accepts "${value}", which is not an answer to "${id}".`
        problems.push({ kind: 'unknown-option', message, branch: index, decider: id })
      }
    }
  })
  return problems
}

function tableProblems(question: ClinicalQuestion): Problem[] {
  const { branches, deciders } = question
  const lastBranch = branches.at(-1)
  if (lastBranch === undefined) return [{ kind: 'no-branches', message: 'The question has no answer yet.' }]

  const problems: Problem[] = []
  if (Object.keys(lastBranch.when).length > 0) {
    const message = 'The last branch must stand for "otherwise", without conditions.'
    problems.push({ kind: 'last-branch-not-empty', message, branch: branches.length - 1 })
  }
  if (branches[question.usualBranch] === undefined) {
    problems.push({ kind: 'usual-branch', message: 'The usual branch is not one of the branches.' })
  }
  if (countCompletions(deciders, {}) > combinationLimit) {
    const message = `The deciders allow more than ${combinationLimit} combinations of answers; ask less.`
    return [...problems, { kind: 'too-many-combinations', message }]
  }

  const table = completions(deciders, {}).map(answers => ({ answers, hit: firstHit(question, answers) }))
  const gap = table.find(row => row.hit === null)
  if (gap !== undefined) {
    problems.push({ kind: 'gap', message: `No branch answers ${describe(gap.answers)}.` })
  }
  branches.forEach((_, index) => {
    if (!table.some(row => row.hit === index)) {
      const message = 'No combination of answers reaches this branch: earlier branches take them all.'
      problems.push({ kind: 'unreachable-branch', message, branch: index })
    }
  })
  for (const decider of deciders) {
    const contrastOf = (answers: Answers) => branches[firstHit(question, answers) ?? -1]?.contrast
    const changes = table.some(row => decidedValues(decider)
      .some(value => contrastOf({ ...row.answers, [decider.id]: value }) !== contrastOf(row.answers)))
    if (!changes) {
      problems.push({ kind: 'idle-decider', message: 'No answer to this changes the contrast: it need not be asked.', decider: decider.id })
    }
  }
  return problems
}

function coverProblems(question: ClinicalQuestion): Problem[] {
  const problems: Problem[] = []
  if (!question.sources.some(source => source.title.trim() !== '')) {
    problems.push({ kind: 'missing-source', message: 'The question names no source.' })
  }
  const mayUseContrast = question.branches.some(branch => usesContrast(branch.contrast) || branch.contrast === 'discuss')
  if (mayUseContrast && (question.alternatives ?? '').trim() === '') {
    const message = 'An answer may use contrast: say what to do when contrast cannot be given.'
    problems.push({ kind: 'missing-alternatives', message })
  }
  return problems
}

function readingProblems(question: ClinicalQuestion): Problem[] {
  const texts: { text: string, branch?: number }[] = [
    { text: question.plainQuestion },
    ...question.branches.map((branch, index) => ({ text: branch.plain, branch: index })),
  ]
  return texts.flatMap(({ text, branch }) => {
    const grade = fleschKincaidGrade(text)
    if (grade <= readingGradeCeiling) return []
    const message = `The text for the patient reads at grade ${grade.toFixed(1)}; ${readingGradeCeiling} is the ceiling. Use shorter words and sentences.`
    return [branch === undefined ? { kind: 'hard-to-read', message } : { kind: 'hard-to-read', message, branch }]
  })
}

function repeats(ids: string[]): string[] {
  return [...new Set(ids.filter((id, index) => ids.indexOf(id) !== index))]
}

function describe(answers: Answers): string {
  const parts = Object.entries(answers).map(([decider, value]) => `${decider} = ${value}`)
  return parts.length > 0 ? parts.join(', ') : 'the question'
}
