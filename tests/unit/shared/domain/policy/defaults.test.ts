import { describe, expect, it } from 'vitest'
import { agentIds } from '#shared/domain/contrast/types'
import { starterPolicy } from '#shared/domain/policy/defaults'

describe('the starter policy', () => {
  it('names a source and a date for every setting', () => {
    for (const [name, setting] of Object.entries(starterPolicy)) {
      if (name === 'version' || name === 'department') continue
      expect(setting, name).toMatchObject({ source: { title: expect.stringMatching(/\S/) }, asOf: expect.stringMatching(/^\d{4}-\d{2}-\d{2}$/) })
    }
  })

  it('follows the ACR, with contrast held below an eGFR of 30', () => {
    expect(starterPolicy.kidneyPosition.value).toBe('acr')
    expect(starterPolicy.holdBelowEgfr.value).toBe(30)
  })

  it('puts every agent in a group and stocks none of group I', () => {
    expect(Object.keys(starterPolicy.acrGroups.value).sort()).toEqual([...agentIds].sort())
    for (const agent of starterPolicy.stockedAgents.value) expect(starterPolicy.acrGroups.value[agent]).toBe('II')
  })
})
