import { answerLabel, decidedValues, standing } from '#shared/domain/guidance/deciders'
import { decide } from '#shared/domain/guidance/decide'
import { starterQuestions } from '#shared/domain/guidance/questions/index'
import type { Answers, ClinicalQuestion } from '#shared/domain/guidance/types'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { allAnswers, arbitraryAnswers, arbitraryQuestion, firstRow, starter } from './support'

const anyQuestion = fc.oneof(fc.constantFrom(...starterQuestions), arbitraryQuestion)
const questionAndAnswers = anyQuestion.chain(question => arbitraryAnswers(question).map(answers => ({ question, answers })))

/** Full sets of answers that do not contradict what is decided, by plain filtering. */
function agreeing(question: ClinicalQuestion, answers: Answers): Answers[] {
  return allAnswers(question).filter(full => question.deciders.every((decider) => {
    const value = answers[decider.id]
    return value === undefined || value === 'unknown' || full[decider.id] === value
  }))
}

describe('deciding a clinical question', () => {
  it('gives the first branch whose conditions hold, for every combination of every starter question', () => {
    let combinations = 0
    for (const question of starterQuestions) {
      for (const answers of allAnswers(question)) {
        combinations += 1
        const row = firstRow(question, answers)
        expect(decide(question, answers), question.id).toMatchObject({
          status: 'answered', branch: row, contrast: question.branches[row]?.contrast, despiteUnknown: false,
        })
      }
    }
    // 261 over the 142 questions of the reference set, and 2 for the question added to it.
    expect(combinations).toBe(263)
  })

  it('answers a question without deciders at once', () => {
    expect(decide(starter('brain-metastases'), {})).toMatchObject({ status: 'answered', contrast: 'iv-with-and-without', branch: 0 })
  })

  it('answers without a fact that the earlier answers have made idle', () => {
    expect(decide(starter('ms-follow-up'), { reason: 'routine' })).toMatchObject({ status: 'answered', contrast: 'none', despiteUnknown: false })
    expect(decide(starter('low-back-pain-sciatica'), { redFlag: 'fracture' })).toMatchObject({ status: 'answered', branch: 1 })
  })

  it('asks for the missing fact that could still change the answer, and says what is possible', () => {
    expect(decide(starter('ms-follow-up'), { reason: 'attack' })).toEqual({
      status: 'needs-answers', deciders: ['recentBaseline'], possible: ['iv-with-and-without', 'none'],
    })
  })

  it('does not pass over an unanswered branch even where the contrast would be the same', () => {
    expect(decide(starter('headache-adult'), { postural: 'yes' })).toEqual({
      status: 'needs-answers', deciders: ['tumorInfection'], possible: ['iv-with-and-without'],
    })
  })

  it('answers despite an unknown fact when all its values lead to one outcome, with a reason that claims nothing unknown', () => {
    const result = decide(starter('headache-adult'), { tumorInfection: 'unknown', postural: 'yes' })
    expect(result).toMatchObject({ status: 'answered', contrast: 'iv-with-and-without', branch: 1, despiteUnknown: true })
    const prostate = decide(starter('prostate-cancer-detection'), { setting: 'unknown', artifact: 'yes' })
    expect(prostate).toMatchObject({ status: 'answered', contrast: 'iv-with-and-without', branch: 1, despiteUnknown: true })
  })

  it('names an unknown fact when it decides the outcome', () => {
    expect(decide(starter('first-seizure-adult'), { tumorInfection: 'unknown' })).toEqual({
      status: 'needs-answers', deciders: ['tumorInfection'], possible: ['iv-with-and-without', 'none'],
    })
  })

  it('names missing and unknown facts together when both could settle it', () => {
    expect(decide(starter('headache-adult'), { tumorInfection: 'unknown' })).toMatchObject({
      status: 'needs-answers', deciders: ['tumorInfection', 'postural'],
    })
  })

  it('asks again for an answer the question no longer offers, and ignores answers to other questions', () => {
    expect(decide(starter('ms-follow-up'), { reason: 'yearly' })).toMatchObject({ status: 'needs-answers', deciders: ['reason', 'recentBaseline'] })
    expect(decide(starter('brain-metastases'), { postural: 'yes' })).toMatchObject({ status: 'answered' })
    expect(decide(starter('first-seizure-adult'), { toString: 'yes' })).toMatchObject({ status: 'needs-answers' })
  })

  it('needs fresh plain images where the recent ones cannot be used', () => {
    const question = starter('brain-contrast-completion')
    expect(decide(question, { usableBaseline: 'yes' })).toMatchObject({ contrast: 'iv-with-only' })
    expect(decide(question, { usableBaseline: 'no' })).toMatchObject({ contrast: 'iv-with-and-without' })
    expect(decide(question, { usableBaseline: 'unknown' })).toMatchObject({ status: 'needs-answers' })
  })

  it('refuses a table with a gap instead of inventing an answer', () => {
    const question = starter('first-seizure-adult')
    const gap = { ...question, branches: question.branches.slice(0, 1) }
    expect(() => decide(gap, { tumorInfection: 'no' })).toThrow(RangeError)
  })
})

describe('deciding with facts not known or not given, for any question', () => {
  it('answers only when every value the open facts could take leads to that outcome', () => {
    fc.assert(fc.property(questionAndAnswers, ({ question, answers }) => {
      const outcomes = new Set(agreeing(question, answers).map(full => question.branches[firstRow(question, full)]?.contrast))
      const result = decide(question, answers)
      if (result.status === 'answered') expect([...outcomes]).toEqual([result.contrast])
      else expect(new Set(result.possible)).toEqual(outcomes)
    }), { numRuns: 1000 })
  })

  it('answers whenever all facts are given or declared unknown and one outcome is left', () => {
    fc.assert(fc.property(questionAndAnswers, ({ question, answers }) => {
      const given = Object.fromEntries(question.deciders.map(decider => [decider.id, answers[decider.id] ?? 'unknown']))
      const outcomes = new Set(agreeing(question, given).map(full => question.branches[firstRow(question, full)]?.contrast))
      const result = decide(question, given)
      expect(result.status).toBe(outcomes.size === 1 ? 'answered' : 'needs-answers')
      if (result.status === 'answered') expect(result.despiteUnknown).toBe(Object.values(given).includes('unknown'))
    }), { numRuns: 1000 })
  })

  it('is settled once the facts it names are given', () => {
    fc.assert(fc.property(questionAndAnswers, fc.nat(), ({ question, answers }, pick) => {
      const result = decide(question, answers)
      if (result.status === 'answered') return
      const completed = { ...answers }
      for (const decider of question.deciders.filter(decider => result.deciders.includes(decider.id))) {
        const values = decidedValues(decider)
        completed[decider.id] = values[pick % values.length] ?? ''
      }
      expect(decide(question, completed).status).toBe('answered')
    }), { numRuns: 1000 })
  })

  it('names no fact whose value makes no difference', () => {
    fc.assert(fc.property(questionAndAnswers, ({ question, answers }) => {
      const result = decide(question, answers)
      if (result.status === 'answered') return
      for (const decider of question.deciders.filter(decider => result.deciders.includes(decider.id))) {
        expect(standing(decider, answers)).not.toBe('decided')
        const differs = agreeing(question, answers).some(full => decidedValues(decider)
          .some(value => firstRow(question, { ...full, [decider.id]: value }) !== firstRow(question, full)))
        expect(differs).toBe(true)
      }
    }), { numRuns: 500 })
  })

  it('never widens what is possible when one more fact becomes known', () => {
    fc.assert(fc.property(questionAndAnswers, fc.nat(), ({ question, answers }, pick) => {
      const open = question.deciders.find(decider => standing(decider, answers) !== 'decided')
      if (open === undefined) return
      const values = decidedValues(open)
      const possible = (given: Answers) => {
        const result = decide(question, given)
        return result.status === 'answered' ? [result.contrast] : result.possible
      }
      const before = possible(answers)
      for (const outcome of possible({ ...answers, [open.id]: values[pick % values.length] ?? '' })) expect(before).toContain(outcome)
    }), { numRuns: 500 })
  })
})

describe('the words for an answer', () => {
  it('speaks of yes, no, not known and options by their labels', () => {
    const [reason, recent] = starter('ms-follow-up').deciders
    if (reason === undefined || recent === undefined) throw new Error('deciders expected')
    expect(answerLabel(recent, 'yes')).toBe('Yes')
    expect(answerLabel(recent, 'no')).toBe('No')
    expect(answerLabel(recent, 'unknown')).toBe('Not known')
    expect(answerLabel(reason, 'attack')).toBe('New attack or worsening')
    expect(answerLabel(reason, 'yearly')).toBe('yearly')
  })
})
