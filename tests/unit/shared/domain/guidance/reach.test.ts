import { decide } from '#shared/domain/guidance/decide'
import { decidedValues } from '#shared/domain/guidance/deciders'
import { starterQuestions } from '#shared/domain/guidance/questions/index'
import { reachableOutcomes } from '#shared/domain/guidance/reach'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { arbitraryAnswers, arbitraryQuestion, starter } from './support'

describe('what answers can still lead to', () => {
  it('lists every outcome while nothing is answered, and one when all is', () => {
    const question = starter('shoulder-instability-labrum')
    expect(reachableOutcomes(question, {})).toEqual(['none', 'intra-articular'])
    expect(reachableOutcomes(question, { timing: 'later' })).toEqual(['intra-articular', 'none'])
    expect(reachableOutcomes(question, { timing: 'acute' })).toEqual(['none'])
    expect(reachableOutcomes(question, { timing: 'later', surgery: 'yes' })).toEqual(['intra-articular'])
  })

  it('treats a fact declared unknown like one not given', () => {
    const question = starter('first-seizure-adult')
    expect(reachableOutcomes(question, { tumorInfection: 'unknown' })).toEqual(reachableOutcomes(question, {}))
  })

  it('is, for a fact that is not known, all that its values together can lead to', () => {
    const cases = fc.oneof(arbitraryQuestion, fc.constantFrom(...starterQuestions))
      .chain(question => arbitraryAnswers(question).map(answers => ({ question, answers })))
    fc.assert(fc.property(cases, fc.nat(), ({ question, answers }, pick) => {
      const decider = question.deciders[pick % Math.max(1, question.deciders.length)]
      if (decider === undefined) return
      const each = decidedValues(decider).flatMap(value => reachableOutcomes(question, { ...answers, [decider.id]: value }))
      expect(new Set(reachableOutcomes(question, { ...answers, [decider.id]: 'unknown' }))).toEqual(new Set(each))
    }), { numRuns: 500 })
  })

  it('is one outcome wherever the question is answered', () => {
    const cases = arbitraryQuestion.chain(question => arbitraryAnswers(question).map(answers => ({ question, answers })))
    fc.assert(fc.property(cases, ({ question, answers }) => {
      const result = decide(question, answers)
      expect(reachableOutcomes(question, answers)).toEqual(result.status === 'answered' ? [result.contrast] : result.possible)
    }))
  })

  it('refuses a table with a gap', () => {
    expect(() => reachableOutcomes({ ...starter('first-seizure-adult'), branches: [] }, {})).toThrow(RangeError)
  })
})
