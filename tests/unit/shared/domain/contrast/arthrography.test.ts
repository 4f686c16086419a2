import { describe, expect, it } from 'vitest'
import { checkJointMixture, dilutionFold, dilutionStockMl } from '#shared/domain/contrast/arthrography'

const gadoterate = { name: 'gadoterate', concentrationMmolPerMl: 0.5 }
const gadobutrol = { name: 'gadobutrol', concentrationMmolPerMl: 1 }

describe('a mixture for a joint', () => {
  it('is as intended with 0.1 mL of a 0.5 mol/L agent in 20 mL', () => {
    expect(checkJointMixture({ agent: gadoterate, stockMl: 0.1, finalVolumeMl: 20, targetMmolPerL: 2.5 })).toMatchObject({
      verdict: 'as-intended', concentrationMmolPerL: 2.5, neededStockMl: 0.1,
    })
  })

  it('is caught where the same volume is taken of a 1 mol/L agent', () => {
    const mixture = checkJointMixture({ agent: gadobutrol, stockMl: 0.1, finalVolumeMl: 20, targetMmolPerL: 2.5 })
    expect(mixture).toMatchObject({ verdict: 'strength-mistaken', concentrationMmolPerL: 5, neededStockMl: 0.05 })
    expect(mixture.text).toBe(
      'This is the volume for an agent of 0.5 mol/L; gadobutrol has 1 mol/L and would give 5.00 mmol/L. 0.050 mL of gadobutrol (1 mol/L) in 20 mL gives 2.5 mmol/L',
    )
  })

  it('is caught the other way round as well', () => {
    expect(checkJointMixture({ agent: gadoterate, stockMl: 0.05, finalVolumeMl: 20, targetMmolPerL: 2.5 })).toMatchObject({
      verdict: 'strength-mistaken', concentrationMmolPerL: 1.25, neededStockMl: 0.1,
    })
  })

  it('is too strong or too weak otherwise', () => {
    expect(checkJointMixture({ agent: gadoterate, stockMl: 1, finalVolumeMl: 20, targetMmolPerL: 2.5 }).verdict).toBe('too-strong')
    expect(checkJointMixture({ agent: gadoterate, stockMl: 0.01, finalVolumeMl: 20, targetMmolPerL: 2.5 }).verdict).toBe('too-weak')
  })

  it('needs half the volume of an agent twice as strong, diluted twice as far', () => {
    const mix = { targetMmolPerL: 2, finalVolumeMl: 12 }
    expect(dilutionStockMl({ ...mix, stockMmolPerMl: 1 }) * 2).toBeCloseTo(dilutionStockMl({ ...mix, stockMmolPerMl: 0.5 }), 12)
    expect(dilutionFold({ targetMmolPerL: 2, stockMmolPerMl: 1 })).toBe(2 * dilutionFold({ targetMmolPerL: 2, stockMmolPerMl: 0.5 }))
  })
})
