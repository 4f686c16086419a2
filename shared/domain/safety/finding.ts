import type { SafetyFinding } from './types'

type Required = 'id' | 'topic' | 'severity' | 'text' | 'plain' | 'source'

/** A finding with nothing added, barred or turned unless said. */
export function finding(parts: Pick<SafetyFinding, Required> & Partial<Omit<SafetyFinding, Required>>): SafetyFinding {
  return { addsNeeds: [], barsAgents: [], asksRadiologist: false, turns: null, ...parts }
}
