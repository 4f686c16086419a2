import pino from 'pino'

/**
 * Operational log: JSON on standard output. Only what is handed over by name is written; nothing in it may name a patient,
 * quote a message or repeat a token, so callers pass ids, route patterns, states and counts.
 */
export const log = pino({
  level: process.env.NUXT_LOG_LEVEL ?? 'info',
  base: null,
  timestamp: pino.stdTimeFunctions.isoTime,
  formatters: { level: label => ({ level: label }) },
})

/** Errors whose words are the engine's own and quote no data. */
const plainErrors = new Set(['TypeError', 'ReferenceError', 'SyntaxError'])

/**
 * What the log may know of an error. Messages of the database and of parsers quote the values they stumbled over, so only
 * kinds, codes and places are kept, down the chain of causes.
 */
export function describeError(error: unknown): { kind: string, code?: string, words?: string, at: string[] }[] {
  const chain = []
  for (let current = error; current instanceof Error && chain.length < 4; current = current.cause) {
    chain.push({
      kind: current.name,
      ...('code' in current && typeof current.code === 'string' ? { code: current.code } : {}),
      ...(plainErrors.has(current.name) ? { words: current.message } : {}),
      at: (current.stack ?? '').split('\n').filter(line => /^\s+at /.test(line)).slice(0, 8).map(line => line.trim()),
    })
  }
  return chain
}
