import { describe, expect, it } from 'vitest'
import { assess } from '#shared/domain/assessment/assess'
import { examNameFor } from '#shared/domain/contrast/exam-name'
import type { ContrastOutcome } from '#shared/domain/contrast/outcome'
import { starterQuestions } from '#shared/domain/guidance/questions/index'
import { marta, rules } from '../assessment/request-inputs'

describe('the name of an exam', () => {
  it.each<[ContrastOutcome | null, string]>([
    ['none', 'MRI shoulder'],
    ['iv-with-and-without', 'MRI shoulder'],
    ['intra-articular', 'MR arthrogram shoulder'],
    ['discuss', 'MRI or MR arthrogram shoulder'],
    [null, 'MRI or MR arthrogram shoulder'],
  ])('of a shoulder with contrast %s is %s', (outcome, name) => {
    expect(examNameFor('MRI or MR arthrogram shoulder', outcome)).toBe(name)
  })

  it('stays as it is where it names one exam only', () => {
    for (const outcome of ['none', 'intra-articular', 'discuss'] as const) {
      expect(examNameFor('MRI brain, tumor protocol', outcome)).toBe('MRI brain, tumor protocol')
    }
  })

  it('reads well in the headline of every question that offers an arthrogram', () => {
    const sentences = starterQuestions.filter(question => question.exam.startsWith('MRI or MR arthrogram')).flatMap(question => question.branches.map((branch) => {
      const guidance = { ...rules.guidance, questions: [{ ...question, deciders: [], branches: [{ ...branch, when: {} }] }] }
      return assess({ ...marta, questionId: question.id, answers: {} }, { ...rules, guidance })
    }))
    expect(sentences.length).toBeGreaterThan(0)
    for (const { suggestion, sentence, exam } of sentences) {
      expect(suggestion, sentence).not.toBeNull()
      if (suggestion === 'none') expect(sentence).toMatch(/^MRI \w+ without contrast, because/)
      if (suggestion === 'intra-articular') expect(sentence).toMatch(/^MR arthrogram \w+, with contrast in the joint, because/)
      if (suggestion === 'none') expect(exam?.name).not.toMatch(/arthrogram/)
    }
  })
})
