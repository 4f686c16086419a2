import { describe, expect, it } from 'vitest'
import { starterQuestions } from '#shared/domain/guidance/questions/index'
import { plainScanName } from '#shared/domain/letter/scan-name'

const nameOf = (id: string) => {
  const question = starterQuestions.find(candidate => candidate.id === id)
  return question && plainScanName({ region: question.region, name: question.exam })
}

describe('the scan in plain words', () => {
  it.each([
    ['spine-infection', 'spine scan'],
    ['low-back-pain-sciatica', 'lower back scan'],
    ['syrinx', 'spine scan'],
    ['chiari-malformation', 'brain and spine scan'],
    ['appendicitis-pregnancy', 'belly scan'],
    ['vertigo-dizziness', 'brain scan'],
    ['stress-fracture', 'MRI scan'],
    ['crohn-enterography', 'bowel scan'],
    ['shoulder-instability-labrum', 'shoulder scan'],
    ['first-seizure-adult', 'brain scan'],
  ])('of %s is "%s"', (id, name) => {
    expect(nameOf(id)).toBe(name)
  })

  it('follows the region where no name is stored, and names no region of a department\'s own', () => {
    expect(plainScanName({ region: 'spine, lumbar', name: null })).toBe('lower back scan')
    expect(plainScanName({ region: 'skull base', name: 'MRI skull base' })).toBe('MRI scan')
  })
})
