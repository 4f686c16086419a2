import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { assess, assessDecision } from '#shared/domain/assessment/assess'
import { decidableOutcomes, isIntravenous } from '#shared/domain/contrast/outcome'
import { arbitraryInputs } from './arbitrary-inputs'
import { rules } from './request-inputs'

const groupOne = new Set<string>(['gadopentetate', 'gadodiamide', 'gadoversetamide'])
/** Every agent on the shelf, so that the gates alone keep group I away. */
const fullShelf = { ...rules, policy: { ...rules.policy, stockedAgents: { ...rules.policy.stockedAgents, value: rules.agents.map(agent => agent.id) } } }

describe('for any inputs an assessment', () => {
  it('is made without throwing, and the same twice', { timeout: 60_000 }, () => {
    fc.assert(fc.property(arbitraryInputs, (inputs) => {
      const first = assess(inputs, rules)
      expect(assess(structuredClone(inputs), rules)).toEqual(first)
      expect(first.sentence).not.toBe('')
      expect(first.unless.length).toBeLessThanOrEqual(5)
    }), { numRuns: 300 })
  })

  it('leaves its inputs as they were and survives being stored as JSON', { timeout: 60_000 }, () => {
    fc.assert(fc.property(arbitraryInputs, (inputs) => {
      const before = structuredClone(inputs)
      const made = assess(inputs, rules)
      expect(inputs).toEqual(before)
      expect(JSON.parse(JSON.stringify(made))).toEqual(made)
    }), { numRuns: 100 })
  })

  it('never suggests an agent that a finding bars', { timeout: 60_000 }, () => {
    fc.assert(fc.property(arbitraryInputs, (inputs) => {
      const { agents, findings, suggestion } = assess(inputs, fullShelf)
      const barred = new Set<string>(findings.flatMap(found => found.barsAgents))
      if (agents?.best) expect(barred.has(agents.best)).toBe(false)
      if (suggestion === 'none' || suggestion === null) expect(agents).toBeNull()
    }), { numRuns: 300 })
  })

  it('bars group I by vein below an eGFR of 30, with unsteady kidneys, on dialysis and without a current value', { timeout: 60_000 }, () => {
    fc.assert(fc.property(arbitraryInputs, (inputs) => {
      const { agents, kidney } = assess(inputs, fullShelf)
      if (agents === null || !isIntravenous(agents.outcome)) return
      const atRisk = kidney.gateEgfr === null || kidney.gateEgfr < 30 || kidney.injury.steady === false || kidney.status === 'dialysis'
        || kidney.currency === 'too-old' || kidney.currency === 'missing'
      if (atRisk) expect(agents.ranked.some(entry => entry.eligible && groupOne.has(entry.agent))).toBe(false)
    }), { numRuns: 300 })
  })

  it('asks for a radiologist wherever it holds or stops', { timeout: 60_000 }, () => {
    fc.assert(fc.property(arbitraryInputs, (inputs) => {
      const { findings, asksRadiologist, needs } = assess(inputs, rules)
      if (findings.some(found => found.severity === 'hold' || found.severity === 'stop')) expect(asksRadiologist).toBe(true)
      if (asksRadiologist) expect(needs.map(need => need.kind)).toContain('radiologist-word')
    }), { numRuns: 300 })
  })

  it('shows no eGFR on dialysis', { timeout: 60_000 }, () => {
    fc.assert(fc.property(arbitraryInputs, (inputs) => {
      const onDialysis = { ...inputs, screening: { ...inputs.screening, dialysis: 'hemodialysis' as const } }
      expect(assess(onDialysis, rules).kidney.egfr).toBeNull()
    }), { numRuns: 100 })
  })

  it('yields needs for whatever a radiologist decides', { timeout: 60_000 }, () => {
    fc.assert(fc.property(arbitraryInputs, fc.constantFrom(...decidableOutcomes), (inputs, contrast) => {
      const kinds = assessDecision(inputs, rules, { contrast, agent: null }).needs.map(need => need.kind)
      expect(kinds.includes('iv-start')).toBe(isIntravenous(contrast))
      expect(kinds).not.toContain('radiologist-word')
    }), { numRuns: 200 })
  })
})
