import { describe, expect, it } from 'vitest'
import { examMinutes } from '#shared/domain/booking/exam-minutes'
import { starterPolicy } from '#shared/domain/policy/defaults'

const { base, ivStart, joint, liver } = starterPolicy.examMinutes.value

describe('examMinutes', () => {
  it('is the base length without contrast', () => {
    expect(examMinutes('none', [], starterPolicy)).toBe(base)
  })
  it('adds the IV start where one is needed', () => {
    expect(examMinutes('iv-with-and-without', ['iv-start'], starterPolicy)).toBe(base + ivStart)
  })
  it('adds the joint injection and the liver agent\'s late pictures', () => {
    expect(examMinutes('intra-articular', [], starterPolicy)).toBe(base + joint)
    expect(examMinutes('iv-hepatobiliary', ['iv-start'], starterPolicy)).toBe(base + ivStart + liver)
  })
  it('adds the time of observation where the patient must stay', () => {
    expect(examMinutes('iv-with-and-without', ['iv-start', 'observation'], starterPolicy)).toBe(base + ivStart + starterPolicy.observationMinutes.value)
  })
})
