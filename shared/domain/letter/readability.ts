/** Counts that the grade formulas need. */
export interface TextCounts {
  sentences: number
  words: number
  syllables: number
  /** Words of three or more syllables. */
  longWords: number
}

/** Highest school grade patient text may have; AHRQ's toolkit and NIH advise sixth to eighth grade. */
export const readingGradeCeiling = 8

/** Words whose spelling misleads the counting rules below; the usual pronunciation in American English. */
const spokenSyllables: Readonly<Record<string, number>> = {
  area: 3, areas: 3, create: 2, created: 3, creatinine: 4, diet: 2, being: 2, fluid: 2, fluids: 2, idea: 3, ideas: 3,
  people: 2, real: 1, really: 2, science: 2, someone: 2, something: 2, sometimes: 2, somewhere: 2, therefore: 2,
  wherefore: 2, whole: 1, women: 2, every: 2, everything: 3, different: 3, several: 3, dialysis: 4, uterus: 3,
  ultrasound: 3, whenever: 3, doing: 2, going: 2, seeing: 2, quiet: 2, reaction: 3, reactions: 3,
  safely: 2, likely: 2, closely: 2, rarely: 2, surely: 2, purely: 2, mainly: 2, movement: 2, statement: 2, lifetime: 2,
  breastfeeding: 3, careful: 2, carefully: 3, useful: 2, diabetes: 4, react: 2, heart: 1, eye: 1, eyes: 1, biopsy: 3,
}

/** Vowels written together but spoken apart, as in "radiology", "serious", "video" and "carrying"; not "special". */
const spokenApart = /(?<![tcsgxl])i(?:a|o(?!n))|iu|eo(?!u)|ism$|[^aeiouy]ying$|[^aeiouy]ier$/gu

const sentenceEnd = /[.!?]+(?=\s|$)|\n+/u
const wordPattern = /[\p{L}\p{N}]+(?:[’'.,-][\p{L}\p{N}]+)*/gu

/**
 * Syllables of one word as read aloud in American English, by spelling: groups of vowels, less silent endings, plus
 * vowel pairs spoken apart. An abbreviation in capitals is spelled out and a number read digit by digit. An estimate:
 * single words may be off by one, a text of some length hardly.
 */
export function countSyllables(word: string): number {
  return word.split('-').reduce((sum, part) => sum + partSyllables(part), 0)
}

/** Counts of a text. A line break ends a sentence, so that list items and headings are not run together. */
export function countText(text: string): TextCounts {
  const sentences = text.split(sentenceEnd).filter(part => /[\p{L}\p{N}]/u.test(part))
  const syllables = (text.match(wordPattern) ?? []).map(countSyllables)
  return {
    sentences: sentences.length,
    words: syllables.length,
    syllables: syllables.reduce((sum, count) => sum + count, 0),
    longWords: syllables.filter(count => count >= 3).length,
  }
}

/**
 * Flesch-Kincaid grade level: the US school grade a text asks for. May be below 0 for very short sentences; 0 for text
 * without words. English only.
 *
 * Source: Kincaid, Fishburne, Rogers, Chissom, "Derivation of new readability formulas for Navy enlisted personnel",
 * Research Branch Report 8-75, 1975: 0.39 words per sentence + 11.8 syllables per word − 15.59.
 */
export function fleschKincaidGrade(text: string): number {
  const { sentences, words, syllables } = countText(text)
  if (words === 0) return 0
  return 0.39 * (words / sentences) + 11.8 * (syllables / words) - 15.59
}

/**
 * SMOG grade: the US school grade needed to understand a text fully. English only; 0 for text without words. It was
 * fitted on samples of 30 sentences: below that it is scaled up and one long word weighs heavily, so judge whole
 * letters with it, not single sentences.
 *
 * Source: McLaughlin, "SMOG grading: a new readability formula", Journal of Reading 12, 1969:
 * 3.1291 + 1.0430 × √(words of three or more syllables × 30 / sentences).
 */
export function smogGrade(text: string): number {
  const { sentences, words, longWords } = countText(text)
  if (words === 0) return 0
  return 3.1291 + 1.0430 * Math.sqrt(longWords * 30 / sentences)
}

function partSyllables(part: string): number {
  const letters = part.replace(/[^\p{L}\p{N}]/gu, '')
  if (/^\p{N}+$/u.test(letters)) return letters.length
  if (/^\p{Lu}{2,5}s?$/u.test(letters)) return letters.replace(/s$/u, '').length
  const word = part.toLowerCase().replace(/[’']s?$/u, '').replace(/[^\p{L}]/gu, '')
  return spokenSyllables[word] ?? spelledSyllables(word)
}

function spelledSyllables(word: string): number {
  const stem = /(?:[sxzcg]|[cs]h)es$|[sui]s$/u.test(word) ? word : word.replace(/s$/u, '')
  const silent = /[^aeiouy]le$/u.test(stem) ? false : /[^aeiouy]e$|[^aeioutd]ed$/u.test(stem)
  const groups = stem.match(/[aeiouyáéíóúü]+/gu)?.length ?? 0
  const apart = stem.match(spokenApart)?.length ?? 0
  return Math.max(1, groups + apart - (silent ? 1 : 0))
}
