/** What the scan is done with. The list is closed: guidance, decisions, marks and letters all speak these words. */
export const contrastOutcomes = [
  'none',
  'iv-with-and-without',
  'iv-with-only',
  'iv-hepatobiliary',
  'intra-articular',
  'discuss',
] as const

export type ContrastOutcome = (typeof contrastOutcomes)[number]

/** What a radiologist may sign: `discuss` is a suggestion, never a decision. */
export const decidableOutcomes = [
  'none',
  'iv-with-and-without',
  'iv-with-only',
  'iv-hepatobiliary',
  'intra-articular',
] as const satisfies readonly ContrastOutcome[]

export type DecidableOutcome = (typeof decidableOutcomes)[number]

/** Words for each outcome: `label` beside a mark, `phrase` inside a sentence after the exam's name. */
export const outcomeWords = {
  'none': { label: 'Without', phrase: 'without contrast' },
  'iv-with-and-without': { label: 'Without and with', phrase: 'without and with contrast' },
  'iv-with-only': { label: 'With only', phrase: 'with contrast only' },
  'iv-hepatobiliary': { label: 'Liver agent', phrase: 'without and with a liver contrast agent' },
  'intra-articular': { label: 'Into the joint', phrase: 'with contrast in the joint' },
  'discuss': { label: 'To be discussed', phrase: 'with or without contrast, to be discussed with a radiologist' },
} as const satisfies Record<ContrastOutcome, { label: string, phrase: string }>

/** Whether the agent goes into a vein, so that kidney function, weight and an IV start matter. */
export function isIntravenous(outcome: ContrastOutcome): boolean {
  return outcome === 'iv-with-and-without' || outcome === 'iv-with-only' || outcome === 'iv-hepatobiliary'
}

/** Whether any gadolinium is given, by vein or into a joint. */
export function usesContrast(outcome: ContrastOutcome): boolean {
  return isIntravenous(outcome) || outcome === 'intra-articular'
}
