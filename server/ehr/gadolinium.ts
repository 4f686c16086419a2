import type { AgentId } from '#shared/domain/contrast/types'
import { isSystem, snomed, wordsOf } from './codes'
import type { Concept } from './resources'

const atc = 'http://www.whocc.no/atc'

interface AgentNames { id: AgentId, atc: string, snomed: string | null, words: RegExp }

/**
 * How records name each agent: generic name with its salts. ATC V08CA02, 03, 04, 06, 08, 09 and 12 and the SNOMED CT codes
 * were seen in a public SNOMED CT to ATC map; V08CA01, 10 and 11 are from memory.
 */
const agents: readonly AgentNames[] = [
  { id: 'gadopentetate', atc: 'V08CA01', snomed: null, words: /gadopentet/ },
  { id: 'gadoterate', atc: 'V08CA02', snomed: '710812003', words: /gadoter(ate|ic)/ },
  { id: 'gadodiamide', atc: 'V08CA03', snomed: '396067007', words: /gadodiamid/ },
  { id: 'gadoteridol', atc: 'V08CA04', snomed: '420600009', words: /gadoteridol/ },
  { id: 'gadoversetamide', atc: 'V08CA06', snomed: '409476008', words: /gadoversetamid/ },
  { id: 'gadobenate', atc: 'V08CA08', snomed: null, words: /gadoben(ate|ic)/ },
  { id: 'gadobutrol', atc: 'V08CA09', snomed: '418351005', words: /gadobutrol/ },
  { id: 'gadoxetate', atc: 'V08CA10', snomed: null, words: /gadoxet(ate|ic)/ },
  { id: 'gadofosveset', atc: 'V08CA11', snomed: null, words: /gadofosveset/ },
  { id: 'gadopiclenol', atc: 'V08CA12', snomed: null, words: /gadopiclenol/ },
]

/** The gadolinium agent a concept names, `group` for gadolinium without an agent, null for anything else. */
export function gadoliniumOf(concept: Concept | undefined): AgentId | 'group' | null {
  if (!concept) return null
  const words = wordsOf(concept)
  const named = agents.find(agent => agent.words.test(words) || concept.coding.some(({ system, code }) =>
    code !== undefined && ((isSystem(system, atc) && code === agent.atc) || (isSystem(system, snomed) && agent.snomed === code))))
  if (named) return named.id
  const group = concept.coding.some(({ system, code }) => isSystem(system, atc) && code === 'V08CA')
  return group || /gadolinium|gadolinio|\bgbca\b/.test(words) ? 'group' : null
}

/** An entry that says contrast without saying iodine or gadolinium. */
export function namesSomeContrast(concept: Concept | undefined): boolean {
  const words = wordsOf(concept)
  return /contrast|\bdye\b/.test(words) && !/iod|iohexol|iopamidol|iodixanol|iopromide|ioversol|barium|gado/.test(words)
}
