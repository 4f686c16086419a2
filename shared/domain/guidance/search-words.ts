/**
 * How typed words become search terms. Requests are typed in shorthand: the same normalisation runs over the questions
 * and over what is typed, so that "r/o mets" and "rule out metastases" look for the same.
 */

/** Shorthand with signs in it, replaced before the signs are dropped. Longest first where one contains another. */
const shorthand: readonly (readonly [RegExp, string])[] = [
  [/\bw\s*\/\s*(?:wo|w\s*\/\s*o)\b|\bw\s*\/\s*o\b|\bw\s*\//g, ' '],
  [/\b(?:r|c|h|k|s)\s*\/\s*o\b|\bruled?[\s-]+out\b|\bh\s*\/\s*o\b/g, ' '],
  [/\bs\s*\/\s*p\b/g, ' after '],
  [/\bf\s*\/\s*u\b/g, ' follow up '],
  [/\bpost[\s-]+op\b/g, ' postop '],
  [/\bt2\s*\*/g, ' t2star '],
  [/\bx[\s-]rays?\b/g, ' xray '],
  [/\bcrohn['’]?s\b/g, ' crohn '],
  [/['’]s\b/g, ' '],
]

/** One word for several spellings: British, abbreviated, lay. Kept to words that mean the same in every question. */
const sameWord: Readonly<Record<string, string>> = {
  tumour: 'tumor', tumours: 'tumor', tumors: 'tumor', tumer: 'tumor', oedema: 'edema', paediatric: 'pediatric',
  peds: 'pediatric', pedi: 'pediatric', kid: 'child', kids: 'child', children: 'child', childs: 'child',
  haemorrhage: 'hemorrhage', haemangioma: 'hemangioma', anaemia: 'anemia', oesophagus: 'esophagus',
  mets: 'metastases', met: 'metastases', metastasis: 'metastases', metastatic: 'metastases',
  fx: 'fracture', frx: 'fracture', fractures: 'fracture', broken: 'fracture', infxn: 'infection', inf: 'infection',
  ca: 'cancer', carcinoma: 'cancer', cancers: 'cancer', cancerous: 'cancer', surveillance: 'follow', fu: 'follow',
  bleeding: 'hemorrhage', bleed: 'hemorrhage', disk: 'disc', discs: 'disc', disks: 'disc', lbp: 'back',
  shoulders: 'shoulder', hips: 'hip', knees: 'knee', seizures: 'seizure', szs: 'seizure', sz: 'seizure', ha: 'headache',
  abd: 'abdominal', abdomen: 'abdominal', stomach: 'abdominal', belly: 'abdominal', lesion: 'lesion', lesions: 'lesion',
  preg: 'pregnant', pregnancy: 'pregnant', renal: 'kidney', hepatic: 'liver', kidneys: 'kidney', breasts: 'breast',
}

/** Words that tell no question apart: they are typed in most requests. */
const idleWords = new Set([
  'mri', 'mr', 'scan', 'image', 'images', 'imaging', 'exam', 'study', 'protocol', 'contrast', 'gad', 'gadolinium',
  'please', 'eval', 'evaluate', 'evaluation', 'assess', 'query', 'possible', 'suspected', 'suspect', 'concern', 'hx', 'dx', 'sx',
  'pt', 'patient', 'known', 'left', 'right', 'lt', 'rt', 'bilateral', 'yo', 'history',
  'a', 'an', 'and', 'any', 'are', 'at', 'be', 'can', 'did', 'do', 'does', 'for', 'from', 'has', 'have', 'how', 'i', 'in',
  'is', 'it', 'me', 'my', 'of', 'on', 'or', 'that', 'the', 'there', 'this', 'to', 'was', 'what', 'where', 'which', 'why',
  'with', 'without', 'no', 'out', 'rule',
])

/** Splits text into search terms, in order; idle words are kept (see `searchTerm`), signs are not. */
export function splitSearchText(text: string): string[] {
  const lower = text.toLowerCase().normalize('NFKD').replace(/\p{M}/gu, '')
  const spelled = shorthand.reduce((result, [pattern, words]) => result.replace(pattern, words), lower)
  return spelled.split(/[^\p{L}\p{N}]+/u).filter(word => word !== '')
}

/** The term a typed word is looked up by; null for words that tell no question apart. */
export function searchTerm(word: string): string | null {
  return idleWords.has(word) ? null : sameWord[word] ?? word
}

/** The terms a question's word is indexed under: as written too, so that it is found while still being typed. */
export function indexTerms(word: string): string[] {
  const term = searchTerm(word)
  return term === null ? [] : [...new Set([term, word])]
}
