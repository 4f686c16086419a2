import { reachableBranches, reachableOutcomes, whatIfs } from '#shared/domain/guidance/reach'
import { decide } from '#shared/domain/guidance/decide'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { allAnswers, arbitraryQuestion, firstRow, starter } from './support'

describe('what answers can still lead to', () => {
  it('lists every outcome while nothing is answered, and one when all is', () => {
    const question = starter('low-back-pain-sciatica')
    expect(reachableBranches(question, {})).toEqual([0, 1, 2, 3])
    expect(reachableOutcomes(question, {})).toEqual(['iv-with-and-without', 'none'])
    expect(reachableOutcomes(question, { redFlag: 'none' })).toEqual(['iv-with-and-without', 'none'])
    expect(reachableOutcomes(question, { redFlag: 'none', priorSurgery: 'no' })).toEqual(['none'])
  })

  it('treats a fact declared unknown like one not given', () => {
    const question = starter('first-seizure-adult')
    expect(reachableOutcomes(question, { tumorInfection: 'unknown' })).toEqual(reachableOutcomes(question, {}))
  })

  it('refuses a table with a gap', () => {
    expect(() => reachableOutcomes({ ...starter('first-seizure-adult'), branches: [] }, {})).toThrow(RangeError)
  })
})

describe('the answers that would change the contrast', () => {
  it('names each single change of answer that leads elsewhere', () => {
    expect(whatIfs(starter('low-back-pain-sciatica'), { redFlag: 'none', priorSurgery: 'no' })).toEqual([
      { decider: 'redFlag', value: 'cancer', possible: ['iv-with-and-without'] },
      { decider: 'redFlag', value: 'infection', possible: ['iv-with-and-without'] },
      { decider: 'priorSurgery', value: 'yes', possible: ['iv-with-and-without'] },
    ])
  })

  it('says where a change would depend on a further answer', () => {
    expect(whatIfs(starter('ms-follow-up'), { reason: 'routine' })).toContainEqual(
      { decider: 'reason', value: 'attack', possible: ['iv-with-and-without', 'none'] })
  })

  it('is silent while the answers leave more than one outcome', () => {
    expect(whatIfs(starter('ms-follow-up'), { reason: 'attack' })).toEqual([])
  })

  it('holds for any question: a named change changes the contrast, and no other single change does', () => {
    fc.assert(fc.property(arbitraryQuestion, fc.nat(), (question, pick) => {
      const sets = allAnswers(question)
      const answers = sets[pick % sets.length] ?? {}
      const now = decide(question, answers)
      if (now.status !== 'answered') throw new Error('full answers must decide')
      const named = whatIfs(question, answers).map(each => `${each.decider}=${each.value}`)
      const found = sets
        .filter(other => question.deciders.filter(decider => other[decider.id] !== answers[decider.id]).length === 1)
        .filter(other => question.branches[firstRow(question, other)]?.contrast !== now.contrast)
        .flatMap(other => question.deciders.filter(decider => other[decider.id] !== answers[decider.id]).map(decider => `${decider.id}=${other[decider.id]}`))
      expect(named.sort()).toEqual(found.sort())
    }))
  })
})
