import { describe, expect, it } from 'vitest'
import type { RankedAgent } from '#shared/domain/contrast/types'
import { weighDecision } from '#shared/domain/request/decision'
import { finding } from '#shared/domain/safety/finding'

const source = { title: 'Invented', body: 'Northshore Imaging', year: 2026, status: 'local' } as const
const gadobutrol: RankedAgent = {
  agent: 'gadobutrol', name: 'Gadobutrol', descriptor: 'macrocyclic, non-ionic, group II', concentrationMmolPerMl: 1, eligible: true, reasons: [],
  dose: { doseMmolPerKg: 0.1, weightKg: 74, amountMmol: 7.4, volumeMl: 7.4, volumeDisplay: '7.4', amountDisplay: '7.4', checks: [] },
}
const gadodiamide: RankedAgent = { ...gadobutrol, agent: 'gadodiamide', name: 'Gadodiamide', eligible: false, reasons: ['Group I: not with an eGFR below 30.'] }
const hold = finding({ id: 'kidney-below-30', topic: 'kidney', severity: 'hold', text: 'eGFR 24.', plain: '', source, asksRadiologist: true })
const clear = { findings: [], agents: { outcome: 'iv-with-and-without', ranked: [gadobutrol, gadodiamide], best: 'gadobutrol' }, asksRadiologist: false } as const
const calm = { ...clear, findings: [], agents: { ...clear.agents, ranked: [...clear.agents.ranked] } }
const held = { ...calm, findings: [hold], asksRadiologist: true }
const both = { contrast: 'iv-with-and-without', agent: 'gadobutrol', doseMmolPerKg: 0.1 } as const
const none = { contrast: 'none', agent: null, doseMmolPerKg: null } as const

describe('weighing a decision', () => {
  it('asks for nothing where the suggestion is signed as it stands', () => {
    expect(weighDecision('iv-with-and-without', calm, both))
      .toEqual({ differs: [], against: [], agentBarred: [], reasonNeeded: false, wordNeeded: false, confirmNeeded: false })
  })

  it('asks for a reason and names both sides where another contrast is chosen', () => {
    const weight = weighDecision('iv-with-and-without', calm, none)
    expect(weight.differs).toEqual(['Suggested is without and with contrast, chosen without contrast.'])
    expect(weight).toMatchObject({ reasonNeeded: true, confirmNeeded: false })
  })

  it('asks for a reason where the dose leaves the suggested one', () => {
    expect(weighDecision('iv-with-and-without', calm, { ...both, doseMmolPerKg: 0.05 }).differs)
      .toEqual(['The suggested dose is 0.1 mmol/kg, chosen 0.05 mmol/kg.'])
  })

  it('shows every reason against an agent that is left out and asks once more', () => {
    const weight = weighDecision('iv-with-and-without', calm, { ...both, agent: 'gadodiamide' })
    expect(weight.agentBarred).toEqual(['Group I: not with an eGFR below 30.'])
    expect(weight).toMatchObject({ reasonNeeded: true, confirmNeeded: true })
  })

  it('asks for the radiologist\'s word where a finding holds contrast', () => {
    const weight = weighDecision('iv-with-and-without', held, both)
    expect(weight.against.map(item => item.id)).toEqual(['kidney-below-30'])
    expect(weight).toMatchObject({ reasonNeeded: true, wordNeeded: true, confirmNeeded: true })
  })

  it('lets a held patient be scanned without contrast, with a reason but without a word', () => {
    expect(weighDecision('iv-with-and-without', held, none)).toMatchObject({ against: [], wordNeeded: false, reasonNeeded: true })
  })

  it('takes any choice as an answer where guidance left it to the radiologist, with a word where contrast is used', () => {
    expect(weighDecision('discuss', calm, none)).toMatchObject({ differs: [], reasonNeeded: false, wordNeeded: false })
    expect(weighDecision('discuss', calm, both)).toMatchObject({ differs: [], reasonNeeded: false, wordNeeded: true })
  })
})
