/** Why something else was given than signed: a short list, so that the patient can be told in words that were chosen with care. */
export const differsCauses = [
  'patient-declined', 'iv-failed', 'reaction', 'kidney-function', 'agent-not-at-hand', 'seen-on-images', 'scan-stopped', 'other',
] as const
export type DiffersCause = (typeof differsCauses)[number]

export const differsWords = {
  'patient-declined': { label: 'The patient declined contrast', plain: 'You told us that you did not want contrast.' },
  'iv-failed': { label: 'No IV access', plain: 'We could not place the small tube in a vein.' },
  'reaction': { label: 'Reaction, injection stopped', plain: 'We stopped the contrast because you did not feel well.' },
  'kidney-function': { label: 'New kidney result', plain: 'A new blood test changed the plan.' },
  'agent-not-at-hand': { label: 'Another agent was used', plain: 'We used another contrast than planned. It does the same job.' },
  'seen-on-images': { label: 'The images showed what was needed', plain: 'The doctor looked at the first pictures and changed the plan.' },
  'scan-stopped': { label: 'The exam was stopped early', plain: 'The scan had to end early.' },
  'other': { label: 'Another reason', plain: 'The team changed the plan on the day.' },
} as const satisfies Record<DiffersCause, { label: string, plain: string }>
