import { describe, expect, it } from 'vitest'
import { assessInjury } from '#shared/domain/kidney/injury'
import { creatinineWindow, judgeCurrency } from '#shared/domain/kidney/recency'
import type { WindowInput } from '#shared/domain/kidney/recency'
import type { KidneyScreening } from '#shared/domain/kidney/validity'
import { starterPolicy } from '#shared/domain/policy/defaults'
import { quiet } from './sample'

const dayMs = 86_400_000
const stable = assessInjury({
  series: [{ atMs: 0, umolPerL: 80, comparator: null }, { atMs: 60 * dayMs, umolPerL: 82, comparator: null }],
  ageYears: 50, heightCm: null, dialysis: 'none',
})
const injured = assessInjury({
  series: [{ atMs: 0, umolPerL: 80, comparator: null }, { atMs: dayMs, umolPerL: 160, comparator: null }],
  ageYears: 50, heightCm: null, dialysis: 'none',
})

const set = (days: number | null) => ({ ...starterPolicy, creatinineWindowDays: { ...starterPolicy.creatinineWindowDays, value: { noRiskFactor: days, riskFactorStable: 42, egfr30To59: 14, egfrBelow30: 7, acute: 2 } } })

function windowOf({ screening, ...rest }: Partial<Omit<WindowInput, 'screening'>> & { screening?: Partial<KidneyScreening> } = {}) {
  return creatinineWindow({
    policy: set(null), screening: { ...quiet, ...screening }, setting: 'outpatient', stat: false, injury: stable, gateEgfr: 90, ageYears: 50, underOne: false, ...rest,
  })
}

describe('the longest accepted age of a creatinine', () => {
  it.each<[string, number | null, Parameters<typeof windowOf>[0]]>([
    ['no risk factor, none asked for by policy', null, {}],
    ['no risk factor, policy asks for one', 180, { policy: set(180) }],
    ['a risk factor', 42, { screening: { kidneyRiskFactor: 'yes' } }],
    ['kidney disease', 42, { screening: { kidneyDisease: 'yes' } }],
    ['a risk not ruled out', 42, { screening: { kidneyDisease: 'unknown' } }],
    ['dialysis not ruled out', 42, { screening: { dialysis: 'unknown' } }],
    ['questions not answered yet', 42, { screening: { liverDisease: null } }],
    ['over the age that counts as a risk', 42, { ageYears: 61 }],
    ['just at that age', null, { ageYears: 60 }],
    ['an infant', null, { ageYears: 0, underOne: true, gateEgfr: null, screening: { kidneyDisease: 'yes' } }],
    ['an infant in hospital', null, { ageYears: 0, underOne: true, gateEgfr: null, setting: 'inpatient' }],
    ['a child of one year', null, { ageYears: 1 }],
    ['an age that cannot be read', 42, { ageYears: null }],
    ['eGFR 59.9', 14, { gateEgfr: 59.9 }],
    ['eGFR 30', 14, { gateEgfr: 30 }],
    ['eGFR 29.9', 7, { gateEgfr: 29.9, screening: { kidneyDisease: 'yes' } }],
    ['inpatient', 2, { setting: 'inpatient', gateEgfr: 29 }],
    ['emergency', 2, { setting: 'emergency' }],
    ['stat', 2, { stat: true }],
    ['acute illness', 2, { screening: { acuteIllness: 'yes' } }],
    ['acute illness not ruled out', 2, { screening: { acuteIllness: 'unknown' } }],
    ['acute kidney injury', 2, { injury: injured }],
    ['dialysis, whatever else', null, { screening: { dialysis: 'peritoneal', acuteIllness: 'yes' }, setting: 'inpatient' }],
  ])('%s: %s', (_situation, days, changes) => {
    expect(windowOf(changes).days).toBe(days)
  })

  it('comes with its reason in words', () => {
    expect(windowOf({ ageYears: 70 }).reason).toBe('Age over 60: creatinine at most 42 days old at the exam')
    expect(windowOf({ ageYears: 0, underOne: true }).reason).toMatch(/^Under 1 year of age: no equation uses a creatinine; .*pediatric team$/)
    expect(windowOf().reason).toBe('No kidney risk factor: policy asks for no creatinine')
  })
})

describe('whether a creatinine is recent enough', () => {
  const window = { days: 14, reason: '' }
  it('counts the last moment', () => {
    expect(judgeCurrency(0, 14 * dayMs, window)).toBe('current')
    expect(judgeCurrency(0, 14 * dayMs + 1, window)).toBe('too-old')
  })

  it('tells missing from not needed', () => {
    expect(judgeCurrency(null, 0, window)).toBe('missing')
    expect(judgeCurrency(null, 0, { days: null, reason: '' })).toBe('not-needed')
  })
})
