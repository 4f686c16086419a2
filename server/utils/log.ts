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
