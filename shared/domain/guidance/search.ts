import MiniSearch from 'minisearch'
import type { SearchResult } from 'minisearch'
import { regionLabel } from './regions'
import { indexTerms, searchTerm, splitSearchText } from './search-words'
import type { ClinicalQuestion } from './types'

export interface QuestionSearch {
  /**
   * Ids of the questions that fit what was typed, best first. Text that names nothing (empty, or only words such as
   * "MRI with contrast") lists all, most common first. `region` keeps one region's questions only.
   */
  search: (text: string, options?: { region?: string, limit?: number }) => string[]
}

/** Added to a question's score, per volume step: among equal matches, the everyday question comes first. */
const volumeWeight = 0.2

/**
 * An index over clinical questions, built once per guidance version, on the server and in the browser alike. Words match
 * from their beginning and with small misspellings; a question matching every word ranks before those matching some.
 */
export function createQuestionSearch(questions: ClinicalQuestion[]): QuestionSearch {
  const byId = new Map(questions.map(question => [question.id, question]))
  const byVolume = [...questions].sort((a, b) => b.volume - a.volume).map(question => question.id)
  const index = new MiniSearch<ClinicalQuestion>({
    fields: ['searchWords', 'question', 'exam', 'plainQuestion', 'region'],
    extractField: (question, field) => {
      switch (field) {
        case 'searchWords': return question.searchWords.join('\n')
        case 'question': return question.question
        case 'exam': return question.exam
        case 'plainQuestion': return question.plainQuestion
        case 'region': return `${question.region} ${regionLabel(question.region)}`
        default: return question.id
      }
    },
    tokenize: splitSearchText,
    processTerm: indexTerms,
    searchOptions: { processTerm: searchTerm },
  })
  index.addAll(questions)

  return {
    search(text, { region, limit } = {}) {
      const kept = (id: string) => region === undefined || byId.get(id)?.region === region
      const terms = new Set(splitSearchText(text).flatMap(word => searchTerm(word) ?? []))
      const ids = terms.size === 0 ? byVolume.filter(kept) : ranked([...terms], kept)
      return limit === undefined ? ids : ids.slice(0, limit)
    },
  }

  function ranked(terms: string[], kept: (id: string) => boolean): string[] {
    const found = index.search(terms.join(' '), {
      boost: { searchWords: 2.5, question: 2, exam: 1.5, region: 1.5, plainQuestion: 1 },
      // Short words are mostly abbreviations, where one letter makes another disease.
      fuzzy: term => (term.length < 5 ? false : term.length < 8 ? 1 : 2),
      prefix: term => term.length > 1,
      weights: { prefix: 0.35, fuzzy: 0.25 },
      boostDocument: id => 1 + volumeWeight * ((byId.get(String(id))?.volume ?? 1) - 1),
      filter: result => kept(String(result.id)),
    })
    // Parts of longer words add up over many fields; a word found as it was typed counts for more than all of them.
    const score = (result: SearchResult) => result.score * (1 + terms.filter(term => result.terms.includes(term)).length)
    return found
      .sort((a, b) => b.queryTerms.length - a.queryTerms.length || score(b) - score(a))
      .map(result => String(result.id))
  }
}
