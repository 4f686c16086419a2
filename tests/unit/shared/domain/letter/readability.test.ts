import { countSyllables, countText, fleschKincaidGrade, smogGrade } from '#shared/domain/letter/readability'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'

describe('counting syllables', () => {
  // Syllable divisions as printed in American English dictionaries.
  it.each([
    ['brain', 1], ['scan', 1], ['used', 1], ['bones', 1], ['shapes', 1], ['the', 1], ['whole', 1], ['tried', 1], ['heart', 1],
    ['contrast', 2], ['pictures', 2], ['tables', 2], ['treated', 2], ['muscle', 2], ['watches', 2], ['fluid', 2], ['being', 2], ['kidney’s', 2],
    ['images', 3], ['area', 3], ['diseases', 3], ['video', 3], ['serious', 3], ['carrying', 3], ['easier', 3], ['kidney-shaped', 3],
    ['injection', 3], ['material', 4], ['infectious', 3], ['physician', 3], ['special', 2], ['trials', 2], ['gadolinium', 5], ['radiology', 5], ['creatinine', 4], ['radiologist', 5], ['appendicitis', 5],
  ])('counts those of "%s"', (word, count) => {
    expect(countSyllables(word)).toBe(count)
  })

  it('spells out abbreviations and reads numbers digit by digit', () => {
    expect(countSyllables('MRI')).toBe(3)
    expect(countSyllables('MRIs')).toBe(3)
    expect(countSyllables('30')).toBe(2)
    expect(countSyllables('X-ray')).toBe(2)
  })
})

describe('counting a text', () => {
  it('ends sentences at full stops, question marks and line breaks, not at decimals', () => {
    expect(countText('You get 7.5 mL. Why?\n- Drink water\n- Come early')).toMatchObject({ sentences: 4, words: 9 })
  })

  it('finds nothing in a text without words', () => {
    expect(countText(' ... \n —')).toEqual({ sentences: 0, words: 0, syllables: 0, longWords: 0 })
  })
})

describe('the Flesch-Kincaid grade', () => {
  it('follows the published formula', () => {
    // Kincaid and others 1975: 0.39 x words/sentences + 11.8 x syllables/words - 15.59. Here 6 words, 1 sentence, 6 syllables.
    expect(fleschKincaidGrade('The cat sat on the mat.')).toBeCloseTo(0.39 * 6 + 11.8 - 15.59, 10)
    // 10 words, 2 sentences, 12 syllables.
    expect(fleschKincaidGrade('The scan takes an hour. Contrast helps show swelling there.')).toBeCloseTo(0.39 * 5 + 11.8 * 1.2 - 15.59, 10)
  })

  it('is 0 without words', () => {
    expect(fleschKincaidGrade('')).toBe(0)
  })
})

describe('the SMOG grade', () => {
  it('follows the published formula', () => {
    // McLaughlin 1969: 30 sentences with 30 words of three or more syllables: 3.1291 + 1.0430 x sqrt(30).
    const text = Array.from({ length: 30 }, () => 'The injection helps.').join(' ')
    expect(smogGrade(text)).toBeCloseTo(3.1291 + 1.0430 * Math.sqrt(30), 10)
  })

  it('is the constant for a text of short words, and 0 without words', () => {
    expect(smogGrade('The scan is short.')).toBeCloseTo(3.1291, 10)
    expect(smogGrade('')).toBe(0)
  })
})

describe('both grades', () => {
  it('are finite for any text', () => {
    fc.assert(fc.property(fc.string({ unit: 'grapheme' }), (text) => {
      expect(Number.isFinite(fleschKincaidGrade(text))).toBe(true)
      expect(Number.isFinite(smogGrade(text))).toBe(true)
    }))
  })

  it('do not fall when short words give way to long ones', () => {
    fc.assert(fc.property(fc.array(fc.constantFrom('scan', 'bone', 'show', 'heart'), { minLength: 1, maxLength: 30 }), fc.nat(), (words, pick) => {
      const harder = words.map((word, index) => (index === pick % words.length ? 'infection' : word))
      expect(fleschKincaidGrade(harder.join(' '))).toBeGreaterThan(fleschKincaidGrade(words.join(' ')))
      expect(smogGrade(harder.join(' '))).toBeGreaterThan(smogGrade(words.join(' ')))
    }))
  })
})
