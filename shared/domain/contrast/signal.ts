/**
 * Signal of a diluted agent, relative to M0 = 1. Textbook steady state of the Bloch equations; relaxation rates in 1/s,
 * relaxivities in L/mmol/s, concentrations in mmol/L, times in ms as scanners show them.
 */
export interface Tissue { r10PerS: number, r20PerS: number, r1: number, r2: number }

export type Sequence =
  | { kind: 'spin-echo', trMs: number, teMs: number }
  /** Spoiled gradient echo; `r2` and `r20PerS` then stand for the starred values. */
  | { kind: 'spoiled-gradient-echo', trMs: number, teMs: number, flipDegrees: number }

function seconds(ms: number): number {
  return ms / 1000
}

function cosine(sequence: Sequence): number {
  return sequence.kind === 'spin-echo' ? 0 : Math.cos(sequence.flipDegrees * Math.PI / 180)
}

/**
 * Signal at a concentration. Spin echo: (1 - exp(-TR R1)) exp(-TE R2), for TE far below TR.
 * Spoiled gradient echo: sin a (1 - E1) / (1 - cos a E1) exp(-TE R2*), with E1 = exp(-TR R1).
 *
 * At low concentration the signal rises, at high it falls to nothing: a dark joint may hold too little agent or too much.
 */
export function signal(sequence: Sequence, tissue: Tissue, concentrationMmolPerL: number): number {
  const rate1 = tissue.r10PerS + tissue.r1 * concentrationMmolPerL
  const rate2 = tissue.r20PerS + tissue.r2 * concentrationMmolPerL
  const e1 = Math.exp(-seconds(sequence.trMs) * rate1)
  const decay = Math.exp(-seconds(sequence.teMs) * rate2)
  if (sequence.kind === 'spin-echo') return (1 - e1) * decay
  return Math.sin(sequence.flipDegrees * Math.PI / 180) * (1 - e1) / (1 - cosine(sequence) * e1) * decay
}

/**
 * Concentration of the brightest signal, in closed form. Setting the derivative to zero leaves, with c the cosine of the
 * flip angle (0 for a spin echo) and k = r1 TR / (r2 TE), the quadratic c E² - (1 + c + k (1 - c)) E + 1 = 0 for E = E1;
 * its smaller root gives R1. For a spin echo this is C = (ln(1 + k) / TR - R10) / r1.
 *
 * @returns mmol/L; 0 where any agent only darkens
 */
export function peakConcentration(sequence: Sequence, tissue: Tissue): number {
  const c = cosine(sequence)
  const k = tissue.r1 * sequence.trMs / (tissue.r2 * sequence.teMs)
  const b = 1 + c + k * (1 - c)
  const e1 = 2 / (b + Math.sqrt(b * b - 4 * c))
  return Math.max(0, (-Math.log(e1) / seconds(sequence.trMs) - tissue.r10PerS) / tissue.r1)
}
