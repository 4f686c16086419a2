import { describe, expect, it } from 'vitest'
import { starterPolicy } from '#shared/domain/policy/defaults'
import { emptyScreening, missingScreening, pregnancyAsked } from '#shared/domain/safety/screening'
import { quietScreening } from './situation'

const now = '2026-12-01T15:00:00Z'
const woman = { birthDate: '1992-05-20', sex: 'female' as const }
const man = { birthDate: '1980-03-02', sex: 'male' as const }
const at = (outcome: Parameters<typeof missingScreening>[1]['outcome'], patient: typeof woman | typeof man) => ({ outcome, patient, policy: starterPolicy, now })

describe('pregnancy is asked', () => {
  it.each([
    ['a woman of 34', woman, true],
    ['a man', man, false],
    ['a person of unrecorded sex', { birthDate: '1992-05-20', sex: 'unknown' as const }, true],
    ['a girl on her 11th birthday', { birthDate: '2015-12-01', sex: 'female' as const }, true],
    ['a girl the day before', { birthDate: '2015-12-02', sex: 'female' as const }, false],
    ['a woman of 55 to the day before her next birthday', { birthDate: '1970-12-02', sex: 'female' as const }, true],
    ['a woman on her 56th birthday', { birthDate: '1970-12-01', sex: 'female' as const }, false],
    ['a woman known to be born in 1970', { birthDate: '1970', sex: 'female' as const }, true],
    ['a woman without a readable birth date', { birthDate: '', sex: 'female' as const }, true],
  ])('%s', (_who, patient, asked) => {
    expect(pregnancyAsked(patient, starterPolicy, now)).toBe(asked)
  })
})

describe('safety questions still open before sending', () => {
  it('asks a man for everything but pregnancy when contrast goes into a vein', () => {
    expect(missingScreening(emptyScreening, at('iv-with-and-without', man))).toEqual([
      'kidneyDisease', 'kidneyRiskFactor', 'dialysis', 'acuteIllness', 'liverDisease', 'earlierReaction', 'asthma', 'nephrogenicSystemicFibrosis', 'implants',
    ])
  })

  it('asks only pregnancy and implants for a scan without contrast', () => {
    expect(missingScreening(emptyScreening, at('none', woman))).toEqual(['pregnancy', 'implants'])
  })

  it('asks nothing about kidneys for a joint', () => {
    expect(missingScreening(emptyScreening, at('intra-articular', man))).toEqual(['earlierReaction', 'asthma', 'implants'])
  })

  it('asks for the details of a reaction only when there was one', () => {
    expect(missingScreening({ ...quietScreening, earlierReaction: 'yes' }, at('iv-with-and-without', man))).toEqual(['reactionAgent', 'reactionKind', 'reactionSeverity'])
    expect(missingScreening({ ...quietScreening, earlierReaction: 'unknown' }, at('iv-with-and-without', man))).toEqual([])
  })

  it('takes "not applicable" for no answer where pregnancy applies', () => {
    expect(missingScreening(quietScreening, at('iv-with-and-without', woman))).toEqual(['pregnancy'])
    expect(missingScreening(quietScreening, at('iv-with-and-without', man))).toEqual([])
  })
})
