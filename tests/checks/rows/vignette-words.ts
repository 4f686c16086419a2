import { agentIds } from '#shared/domain/contrast/types'
import { findAgent } from '#shared/domain/contrast/agents'
import type { AgentId } from '#shared/domain/contrast/types'
import type { ScreeningAnswers } from '#shared/domain/safety/types'

/** What free words say about the safety questions; null where nothing in them is understood. */
export type Answered = Partial<ScreeningAnswers> | null

/** One spelling: lower case, no accents, American ("haemodialysis", "dialysed", "oedema"). */
export function plain(text: string): string {
  return text.normalize('NFKD').replace(/\p{M}/gu, '').toLowerCase()
    .replaceAll('haem', 'hem').replaceAll('oedema', 'edema').replaceAll('dialyse', 'dialyze').replaceAll('anaes', 'anes').replaceAll('paed', 'ped')
}

const clausesOf = (text: string) => plain(text).split(/[;,.()]|\bbut\b|\bthen\b/).map(part => part.trim()).filter(part => part !== '')

/** Whether one of the three words before a place takes it back: "no known kidney disease", "not yet on dialysis". */
function deniedAt(clause: string, at: number): boolean {
  const before = clause.slice(0, at).replaceAll('-', ' ').trim().split(/\s+/).slice(-3)
  return before.some(word => /^(no|not|never|without|denies|denied|nil|non)$/.test(word))
}

/** Whether any clause states what the pattern means, without taking it back. */
function states(clauses: readonly string[], pattern: RegExp): boolean {
  return clauses.some((clause) => {
    const match = pattern.exec(clause)
    return match !== null && !deniedAt(clause, match.index)
  })
}

const nothing = /^(no|none|false|0|normal|nil|negative|healthy|n\/a|na|no known .*|nothing( known)?)$/
const notKnown = /^(unknown|not known|unsure|not sure|\?|unclear|not asked|cannot be asked|unobtainable)$/

const dialysisWords = /dialy|hemofiltration|hemodiafiltration|renal replacement|kidney replacement|\bcrrt\b|\bc?apd\b|\bccpd\b|\bcvvhd?f?\b|\bhd\b|\bpd\b/
const peritonealWords = /peritoneal|\bc?apd\b|\bccpd\b|\bpd\b/
const endedOrAhead = /\b(former|formerly|previous|previously|past|until|stopped|off|no longer|before transplant|declin\w*|refus\w*|planned|planning|awaiting|approaching|predialysis|pre-dialysis|pre dialysis)\b/
const continuous = /\bcrrt\b|\bcvv|continuous|acute (hemo)?dialysis|hemofiltration/

/** Dialysis as the clauses have it; null where it is not spoken of. */
function dialysisIn(clauses: readonly string[]): ScreeningAnswers['dialysis'] {
  const spoken = clauses.flatMap((clause): NonNullable<ScreeningAnswers['dialysis']>[] => {
    const match = dialysisWords.exec(clause)
    if (match === null) return []
    if (deniedAt(clause, match.index) || endedOrAhead.test(clause)) return ['none']
    if (/unknown|not known|unsure|unclear|\?/.test(clause)) return ['unknown']
    return [peritonealWords.test(clause) ? 'peritoneal' : 'hemodialysis']
  })
  return spoken.find(each => each !== 'none') ?? spoken[0] ?? null
}

/** `kidney`: dialysis, disease, risk factors and acute illness; a transplant counts as a risk factor. */
export function kidneyAnswers(text: string): Answered {
  const whole = plain(text).trim()
  if (nothing.test(whole)) return {}
  if (notKnown.test(whole)) return { kidneyDisease: 'unknown', kidneyRiskFactor: 'unknown' }
  if (/^(yes|true)$/.test(whole)) return { kidneyDisease: 'yes' }
  const clauses = clausesOf(text)
  const said = (pattern: RegExp) => states(clauses, pattern)
  const dialysis = dialysisIn(clauses)
  const transplant = said(/transplant|allograft|\bgraft/)
  const ended = said(/\besrd\b|\beskd\b|end[- ]?stage/)
  const answers: Partial<ScreeningAnswers> = {}
  if (dialysis !== null) answers.dialysis = dialysis
  // The last stage without a word on how it is treated leaves dialysis open.
  else if (ended && !transplant) answers.dialysis = 'unknown'
  if (dialysis !== null || ended || said(/\bckd\b|chronic kidney|(kidney|renal) (disease|failure|insufficiency|impairment)|\bstage\b|\bg[1-5][ab]?\b|nephropath|nephriti|glomerul|polycystic|nephrotic/)) {
    answers.kidneyDisease = 'yes'
  }
  if (transplant || said(/single|solitary|one kidney|nephrectom|agenesis|diabet|hypertens|high blood pressure|proteinuria|albuminuria|\bgout|kidney surgery/)) {
    answers.kidneyRiskFactor = 'yes'
  }
  if (said(/sepsis|septic|shock|\bacute|\baki\b|dehydrat|hypovol|unsteady|unstable|\brising|rhabdomyolysis|hepato-?renal|\bicu\b|intensive care|oligur|anuric? renal failure|surgery (last|this|\d)/)
    || (dialysis === 'hemodialysis' && said(continuous))) {
    answers.acuteIllness = 'yes'
  }
  if (said(/hepato-?renal|cirrho|liver (disease|failure|transplant)/)) answers.liverDisease = 'yes'
  if (Object.keys(answers).length > 0) return answers
  return /\b(no|not|never|without|denies|normal)\b/.test(whole) ? {} : null
}

/** `pregnancy`: also what is said of breastfeeding; a number is weeks. */
export function pregnancyAnswers(text: string): Answered {
  const whole = plain(text).trim()
  const clauses = clausesOf(text)
  const feeding = states(clauses, /breast-?\s?feed|breastfed|lactat|nursing/)
  const answers: Partial<ScreeningAnswers> = feeding ? { breastfeeding: 'yes' } : {}
  const settle = (pregnancy: ScreeningAnswers['pregnancy']) => ({ ...answers, pregnancy })
  if (/^\d+([.,]\d+)?$/.test(whole)) return settle(Number(whole.replace(',', '.')) > 0 ? 'yes' : 'no')
  if (nothing.test(whole) || /\bnot (currently )?pregnant|non-?pregnant|post-?\s?menopaus|hysterectom|steriliz|negative|post-?\s?partum|delivered|not applicable/.test(whole)) return settle('no')
  if (notKnown.test(whole) || /unknown|not known|not asked|not sure|unsure|unclear|cannot say/.test(whole)) return settle('unknown')
  if (/possib|maybe|might|could be|suspect|late period|missed|overdue|late menses|trying|embryo transfer|not excluded|not ruled out|cannot be excluded/.test(whole)) return settle('possible')
  if (/\d+\s*-?\s*(weeks?|wks?|w|months?)\b|trimester|^(yes|true)\b|gravid|gestation/.test(whole) || states(clauses, /pregnan/)) return settle('yes')
  if (feeding) return settle('no')
  return /^(no|not)\b/.test(whole) ? settle('no') : null
}

const gadolinium = /gad[o0]|\bgbca\b|\bgd\b|\bmri? (contrast|dye)|magnetic resonance contrast/
const otherContrast = /iodin|iodide|\bct\b|x-?ray|angiogra|shellfish|seafood|\bfish\b/

/** `allergy`: an earlier reaction to a gadolinium agent, its severity and kind, and asthma; nothing follows from iodinated contrast. */
export function reactionAnswers(text: string): Answered {
  const whole = plain(text).trim()
  const clauses = clausesOf(text)
  const asthma: Partial<ScreeningAnswers> = states(clauses, /asthma/) ? { asthma: 'yes' } : {}
  if (nothing.test(whole) || /^no (known )?((drug|contrast|gadolinium) )?(allerg|reaction)|^nkd?a$/.test(whole)) return { earlierReaction: 'no' }
  if (notKnown.test(whole)) return { earlierReaction: 'unknown' }
  const agent = agentNamed(text)
  if (agent === null && !gadolinium.test(whole)) {
    if (otherContrast.test(whole)) return { ...asthma, earlierReaction: 'no' }
    // "Contrast" alone may be of either kind.
    if (/contrast|\bdye\b/.test(whole)) return { ...asthma, earlierReaction: 'unknown' }
    return asthma.asthma === 'yes' ? asthma : null
  }
  if (clauses.every(clause => !/gad[o0]|\bgbca\b|contrast|dye/.test(clause) || /\b(no|never|without|tolerated|denies)\b/.test(clause)) && /\b(no|never|without|denies)\b.*(reaction|allerg)|tolerated/.test(whole)) {
    return { ...asthma, earlierReaction: 'no' }
  }
  return { ...asthma, earlierReaction: 'yes', reactionAgent: agent ?? 'unknown', reactionSeverity: severityIn(whole), reactionKind: kindIn(whole) }
}

/** Words for the severity go before symptoms. Source of the symptoms: ACR Manual on Contrast Media, categories of reactions, from memory. */
function severityIn(text: string): ScreeningAnswers['reactionSeverity'] {
  if (/severe|life-?\s?threatening/.test(text)) return 'severe'
  if (/moderate/.test(text)) return 'moderate'
  if (/\bmild|minor/.test(text)) return 'mild'
  if (/anaphyla|shock|arrest|intubat|hypotens|laryn|seizure|arrhythm|unconscious|collapse|pulmonary edema/.test(text)) return 'severe'
  if (/wheez|bronchospasm|diffuse|generali[sz]ed|widespread|facial|face|throat|angioedema/.test(text)) return 'moderate'
  return /hives|urticaria|itch|prurit|rash|sneez|nausea|vomit|warm|flush|headache|dizz|metallic/.test(text) ? 'mild' : 'unknown'
}

function kindIn(text: string): ScreeningAnswers['reactionKind'] {
  if (/allerg|anaphyla|hives|urticaria|itch|prurit|rash|wheez|bronchospasm|edema|swelling|laryn|sneez|throat/.test(text)) return 'allergic-like'
  return /physiolog|nausea|vomit|vagal|faint|syncop|warm|flush|headache|metallic|dizz/.test(text) ? 'physiologic' : 'unknown'
}

/** An agent by one of its names, also inside other words. */
export function agentNamed(text: string): AgentId | null {
  return findAgent(text)?.id ?? agentIds.find(id => plain(text).includes(id)) ?? null
}

const small = ['zero', 'one', 'two', 'three', 'four', 'five', 'six', 'seven', 'eight', 'nine', 'ten', 'eleven', 'twelve']
const hoursIn: Record<string, number> = { h: 1, hr: 1, hour: 1, d: 24, day: 24, week: 168, wk: 168, month: 730, mo: 730, year: 8766, yr: 8766 }

export interface EarlierDoses { count: number, hoursAgo: number | null }

/** `priorGadolinium`: how many doses, and how long ago the last was; null where neither is understood. */
export function earlierDoses(text: string): EarlierDoses | null {
  let rest = plain(text).trim()
  if (nothing.test(rest) || /^never\b/.test(rest)) return { count: 0, hoursAgo: null }
  const ago = /(\d+(?:\.\d+)?)\s*(h|hr|hour|d|day|week|wk|month|mo|year|yr)s?\s*(ago|earlier|before)/.exec(rest)
  const agoHours = ago === null ? null : Number(ago[1]) * (hoursIn[ago[2] ?? ''] ?? 1)
  const hoursAgo = agoHours ?? (/\b(this morning|today|earlier today)\b/.test(rest) ? 6 : /\byesterday\b/.test(rest) ? 24 : /\blast week\b/.test(rest) ? 168 : null)
  if (ago !== null) rest = rest.replace(ago[0], ' ')
  // A year or a dose is no count.
  rest = rest.replace(/\b(19|20)\d\d\b/g, ' dated ').replace(/\d+(\.\d+)?\s*(mmol|ml|mg)\S*/g, ' ')
  const digits = /\d+/.exec(rest)?.[0]
  const word = small.findIndex(name => new RegExp(`\\b${name}\\b`).test(rest))
  if (digits !== undefined) return { count: Number(digits), hoursAgo }
  if (word >= 0) return { count: word, hoursAgo }
  const once = hoursAgo !== null || /^(yes|true)\b|\b(once|dated|single|a dose|previous|prior|earlier)\b/.test(rest)
  return once ? { count: 1, hoursAgo } : null
}
