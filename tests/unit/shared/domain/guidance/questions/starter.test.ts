import { contrastOutcomes, outcomeWords, usesContrast } from '#shared/domain/contrast/outcome'
import { starterQuestions } from '#shared/domain/guidance/questions/index'
import { compareRegions, isRegionId, regionLabel, regions } from '#shared/domain/guidance/regions'
import { fleschKincaidGrade, smogGrade } from '#shared/domain/letter/readability'
import { describe, expect, it } from 'vitest'
import { starter } from '../support'

const branches = starterQuestions.flatMap(question => question.branches.map(branch => ({ question, branch })))

describe('the starter guidance', () => {
  it('holds the reference set of 142 questions and the one that completes a recent scan', () => {
    expect(starterQuestions).toHaveLength(143)
    expect(branches).toHaveLength(235)
    expect(new Set(starterQuestions.map(question => question.id)).size).toBe(143)
  })

  it('has an answer for every outcome there is', () => {
    expect(new Set(branches.map(({ branch }) => branch.contrast))).toEqual(new Set(contrastOutcomes))
  })

  it('covers all 38 regions in their order, most common question first', () => {
    expect([...new Set(starterQuestions.map(question => question.region))]).toEqual(regions.map(region => region.id))
    expect(regions).toHaveLength(38)
    for (const { id } of regions) {
      const volumes = starterQuestions.filter(question => question.region === id).map(question => question.volume)
      expect(volumes, id).toEqual([...volumes].sort((a, b) => b - a))
    }
  })

  it('gives each branch a headline of its own that reads on after "because"', () => {
    expect(new Set(branches.map(({ branch }) => branch.inShort)).size).toBe(branches.length)
    for (const { question, branch } of branches) {
      const sentence = `${question.exam} ${outcomeWords[branch.contrast].phrase}, because ${branch.inShort}`
      expect(branch.inShort.split(' ').length, sentence).toBeLessThanOrEqual(14)
      expect(branch.inShort, sentence).toMatch(/^(?:[a-z3]|T1|T2|STIR|MRI)[^.:;?!]*[^.\s]$/)
    }
  })

  it('says what to do when contrast cannot be given, and what is often ordered wrongly', () => {
    for (const question of starterQuestions) {
      if (question.branches.some(branch => usesContrast(branch.contrast) || branch.contrast === 'discuss')) {
        expect(question.alternatives, question.id).not.toBeNull()
      }
      expect(question.commonError.length, question.id).toBeGreaterThan(10)
      expect(question.searchWords.length, question.id).toBeGreaterThan(3)
    }
  })

  it('never calls contrast or its absence safe, and never speaks of an allergy to iodine', () => {
    const text = JSON.stringify(starterQuestions).toLowerCase()
    expect(text).not.toMatch(/\b(?:un)?safe\b/)
    expect(text).not.toMatch(/allergic to (?:iodine|dye)/)
  })

  it('marks statements without a published source as common practice', () => {
    const sources = starterQuestions.flatMap(question => question.sources)
    expect(sources.filter(source => source.title === 'Common practice').every(source => source.status === 'common practice')).toBe(true)
    expect(sources.filter(source => source.status === 'common practice').every(source => source.title === 'Common practice')).toBe(true)
    expect(starter('brain-contrast-completion').sources).toEqual([
      { title: 'Common practice', body: 'trade practice, no single published source', year: null, status: 'common practice' },
    ])
  })

  it('reads, taken together, at sixth grade or so by both formulas', () => {
    // AHRQ Health Literacy Universal Precautions Toolkit, tool 11: aim for 5th to 6th grade; SMOG runs 1 to 2 grades higher.
    const text = branches.map(({ branch }) => branch.plain).join('\n')
    expect(fleschKincaidGrade(text)).toBeLessThan(6)
    expect(smogGrade(text)).toBeLessThan(8)
  })
})

describe('the regions', () => {
  it('have words for screens and keep their order', () => {
    expect(regionLabel('spine, lumbar')).toBe('Spine, lumbar')
    expect(regionLabel('left knee')).toBe('left knee')
    expect(isRegionId('brain')).toBe(true)
    expect(isRegionId('toString')).toBe(false)
    expect(['knee', 'zebra', 'brain', 'apple', 'spine, lumbar'].sort(compareRegions)).toEqual(['brain', 'spine, lumbar', 'knee', 'apple', 'zebra'])
  })
})
