import { inspect, inspectGuidance } from '#shared/domain/guidance/inspect'
import type { ProblemKind } from '#shared/domain/guidance/inspect'
import { starterQuestions } from '#shared/domain/guidance/questions/index'
import type { Branch, ClinicalQuestion, Decider } from '#shared/domain/guidance/types'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { allAnswers, arbitraryQuestion, firstRow, starter } from './support'

const base = starter('first-seizure-adult')
const [yes, otherwise] = base.branches
const [decider] = base.deciders
if (yes === undefined || otherwise === undefined || decider === undefined) throw new Error('the base question has two branches')

const withBranches = (...branches: Branch[]): ClinicalQuestion => ({ ...base, branches, usualBranch: 0 })
const many = (count: number): Decider[] => Array.from({ length: count }, (_, n) => ({ id: `fact${n}`, ask: 'Is it so?', kind: 'yesno' }))

const faults: [string, ProblemKind, ClinicalQuestion][] = [
  ['text is left empty', 'empty-text', { ...base, plainQuestion: ' ' }],
  ['the region is not in the list', 'unknown-region', { ...base, region: 'brian' }],
  ['two deciders share an id', 'repeated-id', { ...base, deciders: [decider, decider] }],
  ['two options share an id', 'repeated-id', { ...base, deciders: [{ ...decider, kind: 'choice', options: [{ id: 'yes', label: 'A' }, { id: 'yes', label: 'B' }] }] }],
  ['an option takes the word for not known', 'reserved-id', { ...base, deciders: [{ ...decider, kind: 'choice', options: [{ id: 'yes', label: 'A' }, { id: 'unknown', label: 'B' }] }] }],
  ['a choice offers one option', 'too-few-options', { ...base, deciders: [{ ...decider, kind: 'choice', options: [{ id: 'yes', label: 'A' }] }] }],
  ['there is no answer', 'no-branches', withBranches()],
  ['a branch asks for a decider that does not exist', 'unknown-decider', withBranches({ ...yes, when: { fever: ['yes'] } }, otherwise)],
  ['a branch accepts an answer that does not exist', 'unknown-option', withBranches({ ...yes, when: { tumorInfection: ['maybe'] } }, otherwise)],
  ['the last branch has conditions', 'last-branch-not-empty', withBranches(yes, { ...otherwise, when: { tumorInfection: ['no'] } })],
  ['the table leaves a combination unanswered', 'gap', withBranches(yes)],
  ['a branch stands behind "otherwise"', 'unreachable-branch', withBranches(otherwise, yes, otherwise)],
  ['a branch accepts nothing', 'unreachable-branch', withBranches({ ...yes, when: { tumorInfection: [] } }, otherwise)],
  ['a decider never changes the contrast', 'idle-decider', withBranches({ ...yes, contrast: 'none' }, otherwise)],
  ['the usual branch does not exist', 'usual-branch', { ...base, usualBranch: 2 }],
  ['there are more combinations than can be reviewed', 'too-many-combinations', { ...base, deciders: [decider, ...many(9)] }],
  ['no source is named', 'missing-source', { ...base, sources: [] }],
  ['contrast may be given and no alternative is named', 'missing-alternatives', { ...base, alternatives: null }],
  ['the answer is left to the radiologist and no alternative is named', 'missing-alternatives', { ...withBranches({ ...otherwise, contrast: 'discuss' }), deciders: [], alternatives: null }],
  ['the short reason is a sentence of its own', 'headline', withBranches({ ...yes, inShort: 'Tumor is likely.' }, otherwise)],
  ['the patient text is hard to read', 'hard-to-read', withBranches(yes, {
    ...otherwise, plain: 'Non-contrast acquisition sufficiently characterizes epileptogenic abnormalities in uncomplicated presentations.',
  })],
]

describe('inspecting a question', () => {
  it.each(faults)('reports when %s', (_, kind, question) => {
    expect(inspect(question).map(problem => problem.kind)).toContain(kind)
  })

  it('finds nothing wrong with a sound question', () => {
    expect(inspect(base)).toEqual([])
  })

  it('points to the branch or the decider, in words for the editor', () => {
    expect(inspect(withBranches(otherwise, yes, otherwise))).toContainEqual(expect.objectContaining({ kind: 'unreachable-branch', branch: 1 }))
    expect(inspect(withBranches({ ...yes, contrast: 'none' }, otherwise))).toEqual([
      expect.objectContaining({ kind: 'idle-decider', decider: 'tumorInfection' }),
    ])
    expect(inspect(withBranches(yes))).toContainEqual({ kind: 'gap', message: 'No branch answers tumorInfection = no.' })
  })

  it('lets a question without contrast go without alternatives', () => {
    expect(inspect({ ...starter('knee-internal-derangement'), alternatives: null })).toEqual([])
  })

  it('agrees with plain enumeration about reachable branches and idle deciders of any table', () => {
    fc.assert(fc.property(arbitraryQuestion, (question) => {
      const rows = allAnswers(question).map(answers => ({ answers, row: firstRow(question, answers) }))
      const unreached = question.branches.map((_, index) => index).filter(index => !rows.some(each => each.row === index))
      const idle = question.deciders.filter(each => rows.every(one => rows.every(other =>
        question.deciders.some(fact => fact !== each && one.answers[fact.id] !== other.answers[fact.id])
        || question.branches[one.row]?.contrast === question.branches[other.row]?.contrast))).map(each => each.id)
      const problems = inspect(question)
      expect(problems.filter(problem => problem.kind === 'unreachable-branch').map(problem => problem.branch)).toEqual(unreached)
      expect(problems.filter(problem => problem.kind === 'idle-decider').map(problem => problem.decider)).toEqual(idle)
      expect(problems.some(problem => problem.kind === 'gap')).toBe(false)
    }), { numRuns: 300 })
  })
})

describe('inspecting a guidance version', () => {
  it('finds nothing wrong with the starter guidance', () => {
    expect(inspectGuidance(starterQuestions)).toEqual([])
  })

  it('reports an id that two questions carry', () => {
    const found = inspectGuidance([base, base, starter('ms-follow-up')])
    expect(found.map(each => each.questionId)).toEqual([base.id, base.id])
    expect(found[0]?.problems).toEqual([expect.objectContaining({ kind: 'repeated-id' })])
  })
})
