import { describe, expect, it } from 'vitest'
import { mapAllergies } from '#server/ehr/map-allergies'
import { mapConditions, mapDialysisSessions } from '#server/ehr/map-conditions'
import { mapExposures } from '#server/ehr/map-exposures'
import { mapPatient, patientWarnings } from '#server/ehr/map-patient'
import { mapPregnancy } from '#server/ehr/map-pregnancy'
import { mapHeight, mapWeight } from '#server/ehr/map-vitals'
import { administrationResource, allergyResource, conditionResource, procedureResource } from '#server/ehr/resources'
import { loincCode, observation } from './observations'

const at = { zone: 'America/Chicago', now: '2026-12-01T13:00:00.000Z' }
const icd = (code: string, text = code) => ({ coding: [{ system: 'http://hl7.org/fhir/sid/icd-10-cm', code }], text })
const condition = (code: unknown, change: Record<string, unknown> = {}) => conditionResource.parse({
  resourceType: 'Condition', id: 'c', clinicalStatus: { coding: [{ code: 'active' }] }, code, recordedDate: '2026-11-01', ...change,
})
const hintsFor = (...conditions: ReturnType<typeof condition>[]) => Object.fromEntries(mapConditions(conditions, at).hints.map(({ field, value }) => [field, value]))

describe('a patient', () => {
  const patient = (change: Record<string, unknown> = {}) => mapPatient({ resourceType: 'Patient', id: 'p1', birthDate: '1965-11-08', gender: 'female', ...change }, null)

  it('takes the official name and leaves out old names, numbers and addresses', () => {
    expect(patient({
      name: [{ use: 'old', family: 'Berg' }, { use: 'nickname', given: ['Mia'] }, { use: 'official', family: 'Lindqvist', given: ['Marta', 'Elin'] }],
      identifier: [{ use: 'old', value: '1' }, { value: '2' }],
      telecom: [{ system: 'email', use: 'old', value: 'old@example.org' }, { system: 'email', rank: 2, value: 'b@example.org' }, { system: 'email', rank: 1, value: 'mailto:a@example.org' }],
    })).toMatchObject({ displayName: 'Marta Elin Lindqvist', recordNumber: '2', email: 'a@example.org' })
  })

  it('guesses nothing that is not there', () => {
    expect(patient({ gender: 'x', birthDate: 'spring' })).toMatchObject({
      displayName: 'Name not recorded', sex: 'unknown', birthDate: null, email: null, phone: null, language: null, recordNumber: null, deceased: false, active: true,
    })
  })

  it('warns of death, a closed record and a replaced one', () => {
    const found = patient({ deceasedDateTime: '2026-10-01', active: false, link: [{ type: 'replaced-by', other: { reference: 'Patient/p2' } }], birthDate: '1965' })
    expect(found?.replacedBy).toBe('p2')
    expect(found && patientWarnings(found).map(({ id }) => id)).toEqual(['deceased', 'inactive', 'replaced', 'birth-date-partial'])
  })
})

describe('weight and height', () => {
  const measured = (code: string, value: number, unit: string, change: Record<string, unknown> = {}) =>
    observation({ code: loincCode(code), valueQuantity: { value, unit }, ...change })

  // 1 lb = 0.45359237 kg, 1 in = 2.54 cm exactly (international yard and pound).
  it.each([[74, 'kg', 74], [7100, 'g', 7.1], [198, 'lbs', 89.811], [198, '[lb_av]', 89.811]])('reads %d %s', (value, unit, kg) => {
    expect(mapWeight([measured('29463-7', value, unit)], at)?.kg).toBe(kg)
  })

  it.each([[133, 'cm', 133], [1.33, 'm', 133], [71, '[in_i]', 180.34]])('reads %d %s as a height', (value, unit, cm) => {
    expect(mapHeight([measured('8302-2', value, unit)], at)?.cm).toBe(cm)
  })

  it('takes the newest usable one and passes over mistakes, bounds, unknown units and the future', () => {
    expect(mapWeight([
      measured('29463-7', 70, 'kg', { id: 'used', effectiveDateTime: '2026-10-01' }),
      measured('29463-7', 69, 'kg', { effectiveDateTime: '2026-01-01' }),
      measured('29463-7', 700, 'kg'),
      measured('29463-7', 71, 'stone'),
      measured('29463-7', 72, 'kg', { status: 'entered-in-error' }),
      measured('29463-7', 73, 'kg', { effectiveDateTime: '2027-01-01' }),
      observation({ code: loincCode('29463-7'), valueQuantity: { value: 74, unit: 'kg', comparator: '>' } }),
    ], at)).toMatchObject({ kg: 70, observationId: 'used' })
  })
})

describe('pregnancy', () => {
  const status = (code: string, on: string) => observation({ code: loincCode('82810-3'), valueQuantity: undefined, valueCodeableConcept: loincCode(code), effectiveDateTime: on })

  it.each([
    ['LA15173-0', '2026-11-20', 'yes'], ['LA15173-0', '2026-01-02', 'unknown'], ['LA26683-5', '2026-11-28', 'no'], ['LA4489-6', '2026-11-28', 'unknown'],
  ])('status %s of %s suggests %s', (code, on, value) => {
    expect(mapPregnancy([status(code, on)], at)).toMatchObject({ field: 'pregnancy', value })
  })

  it('is not ruled out by an old "not pregnant"', () => {
    expect(mapPregnancy([status('LA26683-5', '2026-10-01')], at)).toBeNull()
  })

  it('is possible after a positive test', () => {
    expect(mapPregnancy([observation({ code: loincCode('2106-3'), valueQuantity: undefined, valueString: 'Positive' })], at)).toMatchObject({ value: 'possible' })
  })

  it('on the problem list for longer than 300 days asks instead of telling', () => {
    expect(hintsFor(condition(icd('Z34.02'), { recordedDate: '2026-09-01' })).pregnancy).toBe('yes')
    expect(hintsFor(condition(icd('Z34.02'), { recordedDate: '2025-09-01' })).pregnancy).toBe('unknown')
  })
})

describe('the problem list', () => {
  it.each([
    ['N18.31', { kidneyDisease: 'yes' }], ['N18.6', { kidneyDisease: 'yes', dialysis: 'unknown' }], ['Z99.2', { dialysis: 'unknown', kidneyDisease: 'yes' }],
    ['Z94.0', { kidneyRiskFactor: 'yes' }], ['E11.9', { kidneyRiskFactor: 'yes' }], ['I10', { kidneyRiskFactor: 'yes' }], ['J45.909', { asthma: 'yes' }],
    ['K74.60', { liverDisease: 'yes' }], ['Z95.0', { implants: 'yes' }],
  ])('%s suggests %j', (code, expected) => {
    expect(hintsFor(condition(icd(code, 'x')))).toEqual(expected)
  })

  it('reads words where there is no code, and not their denial', () => {
    expect(hintsFor(condition({ text: 'ESRD on hemodialysis Tue, Thu, Sat' })).dialysis).toBe('hemodialysis')
    expect(hintsFor(condition({ text: 'Family history of diabetes mellitus' }))).toEqual({})
    expect(hintsFor(condition({ text: 'Pulmonary hypertension' }))).toEqual({})
  })

  it('counts an acute illness while it is recent, and asks about an old one', () => {
    expect(hintsFor(condition(icd('N17.9', 'Acute kidney failure'), { recordedDate: '2026-11-28' }))).toEqual({ acuteIllness: 'yes' })
    expect(hintsFor(condition(icd('A41.9'), { recordedDate: '2026-10-01' }))).toEqual({ acuteIllness: 'unknown' })
  })

  it.each([
    ['resolved', { clinicalStatus: { coding: [{ code: 'resolved' }] } }],
    ['refuted', { verificationStatus: { coding: [{ code: 'refuted' }] } }],
    ['entered in error', { clinicalStatus: undefined, verificationStatus: { coding: [{ code: 'entered-in-error' }] } }],
    ['ended', { clinicalStatus: undefined, abatementDateTime: '2026-01-01' }],
  ])('leaves out what is %s', (_, change) => {
    expect(mapConditions([condition(icd('N18.4'), change)], at)).toEqual({ lines: [], hints: [] })
  })

  it('takes a dialysis session of the last weeks as going on', () => {
    const session = (on: string) => procedureResource.parse({
      resourceType: 'Procedure', id: 'x', status: 'completed', performedDateTime: on, code: { coding: [{ system: 'http://snomed.info/sct', code: '302497006' }] },
    })
    expect(mapDialysisSessions([session('2026-11-28T13:00:00Z')], at)).toMatchObject([{ field: 'dialysis', value: 'hemodialysis' }])
    expect(mapDialysisSessions([session('2025-11-28T13:00:00Z')], at)).toEqual([])
  })
})

describe('the allergy list', () => {
  const allergy = (change: Record<string, unknown>) => allergyResource.parse({ resourceType: 'AllergyIntolerance', id: 'a', ...change })
  const gadobutrol = { coding: [{ system: 'http://www.whocc.no/atc', code: 'V08CA09', display: 'gadobutrol' }] }
  const hints = (...rows: ReturnType<typeof allergy>[]) => Object.fromEntries(mapAllergies(rows, 'UTC').hints.map(({ field, value }) => [field, value]))

  it('suggests the reaction, its agent, kind and severity', () => {
    expect(hints(allergy({ code: gadobutrol, reaction: [{ manifestation: [{ text: 'Hives' }], severity: 'moderate' }] })))
      .toEqual({ earlierReaction: 'yes', reactionAgent: 'gadobutrol', reactionKind: 'allergic-like', reactionSeverity: 'moderate' })
  })

  it('takes the worse of two, and a group entry for any agent', () => {
    const group = allergy({ code: { text: 'Gadolinium-containing contrast agent' }, reaction: [{ manifestation: [{ text: 'Nausea' }], severity: 'severe' }] })
    expect(hints(allergy({ code: gadobutrol, reaction: [{ severity: 'mild' }] }), group)).toMatchObject({ reactionAgent: 'unknown', reactionSeverity: 'severe', reactionKind: 'physiologic' })
  })

  it('is not moved by iodine or by what was refuted', () => {
    expect(hints(allergy({ code: { text: 'Iohexol (iodinated contrast)' } }))).toEqual({})
    expect(hints(allergy({ code: gadobutrol, verificationStatus: { coding: [{ code: 'refuted' }] } }))).toEqual({})
  })

  it('says "no known allergy" only where the record says it outright and nothing else', () => {
    const none = allergy({ code: { coding: [{ system: 'http://snomed.info/sct', code: '716186003' }] } })
    expect(mapAllergies([none], 'UTC').noKnownAllergy).toBe(true)
    expect(mapAllergies([], 'UTC').noKnownAllergy).toBe(false)
    expect(mapAllergies([none, allergy({ code: { text: 'Penicillin' } })], 'UTC').noKnownAllergy).toBe(false)
  })
})

describe('earlier gadolinium', () => {
  const given = (change: Record<string, unknown>) => administrationResource.parse({
    resourceType: 'MedicationAdministration', id: 'm', status: 'completed', effectiveDateTime: '2021-05-20T15:30:00Z', medicationCodeableConcept: { text: 'Gadobutrol 1 mmol/mL' }, ...change,
  })
  const exposures = (...rows: ReturnType<typeof given>[]) => mapExposures(rows, [], new Map(), at)

  it('takes the amount only in mmol: a volume says nothing without its strength', () => {
    expect(exposures(given({ dosage: { dose: { value: 7.4, unit: 'mmol' } } })).exposures).toMatchObject([{ agent: 'gadobutrol', amountMmol: 7.4 }])
    expect(exposures(given({ dosage: { dose: { value: 7.4, unit: 'mL' } } })).exposures).toMatchObject([{ amountMmol: null }])
  })

  it.each(['not-done', 'entered-in-error', 'in-progress', undefined])('does not count a dose that is %s', (status) => {
    expect(exposures(given({ status })).exposures).toEqual([])
  })

  it('reckons with the shortest time where only a month is known, and tells of a dose without any date', () => {
    expect(exposures(given({ effectiveDateTime: '2026-11' })).exposures[0]?.givenAt).toBe('2026-12-01T05:59:59.999Z')
    expect(exposures(given({ effectiveDateTime: '2026' })).exposures[0]?.givenAt).toBe(at.now)
    expect(exposures(given({ effectiveDateTime: undefined }))).toEqual({ exposures: [], undated: 1 })
  })

  it('counts a procedure and the medicine given in it once', () => {
    const procedure = procedureResource.parse({
      resourceType: 'Procedure', id: 'x', status: 'completed', performedDateTime: '2021-05-20T15:00:00Z', code: { text: 'MRI brain' }, usedCode: [{ text: 'Gadobutrol' }],
    })
    expect(mapExposures([given({})], [procedure], new Map(), at).exposures).toHaveLength(1)
    expect(mapExposures([], [procedure], new Map(), at).exposures).toMatchObject([{ id: 'Procedure/x', agent: 'gadobutrol' }])
  })

  it('is not every contrast agent or medicine', () => {
    expect(exposures(given({ medicationCodeableConcept: { text: 'Iohexol 350' } })).exposures).toEqual([])
  })
})
