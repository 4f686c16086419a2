import { describe, expect, it } from 'vitest'
import { describeAgent, findAgent, starterAgents } from '#shared/domain/contrast/agents'

describe('finding an agent in a record', () => {
  it.each([
    ['Gadoterate meglumine 0.5 mmol/mL injection', 'gadoterate'], ['GADOBUTROL 1 mmol/ml', 'gadobutrol'], ['Gd DTPA', 'gadopentetate'],
    ['Gd-DTPA-BMA 0.5 M', 'gadodiamide'], ['gd-dtpa-bmea', 'gadoversetamide'], ['Gd-EOB-DTPA (liver)', 'gadoxetate'],
    ['gadoxetate (gadoxetic acid)', 'gadoxetate'], ['Gadoteric\u00A0acid', 'gadoterate'],
  ])('reads %s as %s', (text, id) => {
    expect(findAgent(text)?.id).toBe(id)
  })

  it.each(['', 'gadolinium contrast', 'IV contrast', 'iohexol', 'gadobutroline', 'gadobutrol or gadoterate'])('finds none in %j', (text) => {
    expect(findAgent(text)).toBeNull()
  })
})

describe('an agent in words', () => {
  const [gadobutrol] = starterAgents
  const gadofosveset = starterAgents.at(-1)
  it('has its kind and group', () => {
    expect(gadobutrol && describeAgent(gadobutrol)).toBe('macrocyclic, non-ionic, group II')
    expect(gadofosveset && describeAgent(gadofosveset)).toBe('linear, ionic, no ACR group')
  })

  it('takes the group from the department where it names one', () => {
    expect(gadobutrol && describeAgent(gadobutrol, 'III')).toBe('macrocyclic, non-ionic, group III')
  })
})
