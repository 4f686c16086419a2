import { describe, expect, it } from 'vitest'
import { specimensOf } from '#server/ehr/specimen'
import { loincCode, readingOf, readingsOf, settingsFor } from './observations'

describe('a serum creatinine', () => {
  it('is taken as sent, its time in UTC', () => {
    expect(readingOf()).toEqual({
      id: 'o1', analyte: 'creatinine', source: 'record', sourceLabel: 'Hospital record', value: 0.94, comparator: null, unit: 'mg/dL',
      collectedAt: '2026-11-12T13:00:00.000Z', collectedText: '2026-11-12T13:00:00Z', precision: 'instant', issuedAt: null, status: 'final', refusal: null,
    })
  })

  // HL7 CPG value set ckd-valueset-creatinine and eCQM value set serum-creatinine.
  it.each(['2160-0', '14682-9', '77140-2', '38483-4', '21232-4', '59826-8'])('is known by LOINC %s', (code) => {
    expect(readingOf({ code: loincCode(code) })?.refusal).toBeNull()
  })

  it('is known by any of several codings, and by LOINC under its object identifier', () => {
    expect(readingOf({ code: { coding: [{ system: 'urn:lab', code: 'X' }, { system: 'http://loinc.org', code: '2160-0' }] } })?.refusal).toBeNull()
    expect(readingOf({ code: { coding: [{ system: 'urn:oid:2.16.840.1.113883.6.1', code: '2160-0' }] } })?.refusal).toBeNull()
  })

  it('under a local code counts only where the site lists the code', () => {
    const local = { code: { coding: [{ system: 'urn:lab', code: 'CREA' }], text: 'Creatinine, serum' } }
    expect(readingOf(local)?.refusal).toContain('urn:lab|CREA is not on this department\'s list')
    expect(readingOf(local, { settings: settingsFor({ creatinineCodes: 'urn:lab|CREA' }) })?.refusal).toBeNull()
  })

  it('is not another result', () => {
    expect(readingsOf({ code: loincCode('2951-2', 'Sodium') })).toEqual([])
    expect(readingsOf({ code: { coding: [{ system: 'urn:lab', code: 'G' }], text: 'eGFR by creatinine' } })).toEqual([])
  })
})

describe('what is not from blood', () => {
  it.each([
    ['a urine code', { code: loincCode('2161-8') }],
    ['a urine code beside a serum code', { code: { coding: [...loincCode('2160-0').coding, ...loincCode('14683-7').coding] } }],
    ['a name that says urine', { code: { ...loincCode('2160-0'), text: 'Creatinine, random urine' } }],
    ['a ratio', { code: loincCode('9318-7') }],
    ['a clearance', { code: loincCode('2164-2') }],
    ['a specimen inside', { contained: [{ resourceType: 'Specimen', id: 's', type: { text: 'Urine, midstream' } }], specimen: { reference: '#s' } }],
    ['a specimen by name', { specimen: { display: 'Pleural fluid' } }],
  ])('is refused for %s', (_, change) => {
    expect(readingOf(change)?.refusal).toMatch(/^Not (a creatinine in|from) blood/)
  })

  it('is refused for a specimen that was fetched', () => {
    const specimens = specimensOf([{ resourceType: 'Specimen', id: 's9', type: { coding: [{ system: 'http://snomed.info/sct', code: '122575003', display: 'Urine specimen' }] } }])
    expect(readingOf({ specimen: { reference: 'Specimen/s9' } }, { specimens })?.refusal).toBe('Not from blood: Urine specimen')
  })

  it('leaves no trace without a value, so that it cannot stand for a corrected blood sample', () => {
    expect(readingsOf({ code: loincCode('2161-8'), valueQuantity: undefined, status: 'corrected' })).toEqual([])
  })

  it('is not seen in a serum specimen or a name that mentions dialysis', () => {
    const specimens = specimensOf([{ resourceType: 'Specimen', id: 's1', type: { text: 'Serum' } }])
    expect(readingOf({ specimen: { reference: 'Specimen/s1' } }, { specimens })?.refusal).toBeNull()
    expect(readingOf({ code: loincCode('2160-0', 'Creatinine in Serum or Plasma --post dialysis') })?.refusal).toBeNull()
  })
})

describe('a value', () => {
  it.each([
    ['text', { valueQuantity: undefined, valueString: 'see comment' }, 'The value is text, not a number: "see comment"'],
    ['a number in a string', { valueQuantity: { value: '0.94', unit: 'mg/dL' } }, 'The value is not sent as a number'],
    ['nothing', { valueQuantity: undefined }, 'No usable value'],
    ['nothing yet', { valueQuantity: undefined, status: 'registered' }, 'Ordered, no result yet'],
    ['a reason why there is none', { valueQuantity: undefined, dataAbsentReason: { coding: [{ code: 'not-performed' }] } }, 'No value: not performed'],
    ['a hidden one', { valueQuantity: undefined, dataAbsentReason: { coding: [{ code: 'masked' }] } }, 'The record holds a value but does not show it to this system'],
    ['a value and a reason at once', { dataAbsentReason: { coding: [{ code: 'error' }] } }, 'Sent both with a value and with a reason why there is none'],
    ['a sign it does not know', { valueQuantity: { value: 1, unit: 'mg/dL', comparator: 'ad' } }, 'Carries a comparison sign this system does not know'],
  ])('is refused for %s', (_, change, refusal) => {
    expect(readingOf(change)).toMatchObject({ value: null, refusal })
  })

  it('keeps its comparison sign', () => {
    expect(readingOf({ valueQuantity: { value: 0.2, comparator: '<', unit: 'mg/dL' } })).toMatchObject({ value: 0.2, comparator: '<', refusal: null })
  })

  it('takes the UCUM code before the unit shown, and the unit shown before any other code', () => {
    expect(readingOf({ valueQuantity: { value: 83, unit: 'µmol/L', system: 'http://unitsofmeasure.org', code: 'umol/L' } })?.unit).toBe('umol/L')
    expect(readingOf({ valueQuantity: { value: 83, unit: 'µmol/L', system: 'urn:units', code: '17' } })?.unit).toBe('µmol/L')
    expect(readingOf({ valueQuantity: { value: 0.94 } })).toMatchObject({ value: 0.94, unit: null })
  })

  it('is refused where unit and code contradict each other', () => {
    expect(readingOf({ valueQuantity: { value: 83, unit: 'umol/L', system: 'http://unitsofmeasure.org', code: 'mg/dL' } })?.refusal).toContain('do not agree')
  })

  it('is refused under a modifier that changes its meaning', () => {
    expect(readingOf({ modifierExtension: [{ url: 'urn:x', valueBoolean: true }] })?.refusal).toContain('changes its meaning')
  })
})

describe('when it was collected', () => {
  it('is a whole day, from its start in the department\'s zone, where only a date was sent', () => {
    expect(readingOf({ effectiveDateTime: '2026-11-12' })).toMatchObject({ collectedAt: '2026-11-12T06:00:00.000Z', precision: 'day', collectedText: '2026-11-12' })
  })

  it('is unknown for a month, and never taken from the release time', () => {
    expect(readingOf({ effectiveDateTime: '2026-11' })).toMatchObject({ collectedAt: null, precision: 'unknown', collectedText: '2026-11' })
    expect(readingOf({ effectiveDateTime: undefined, issued: '2026-11-12T15:00:00Z' })).toMatchObject({ collectedAt: null, issuedAt: '2026-11-12T15:00:00.000Z' })
  })

  it('is the older end of a period', () => {
    expect(readingOf({ effectiveDateTime: undefined, effectivePeriod: { start: '2026-11-01T06:00:00Z', end: '2026-11-02T06:00:00Z' } })?.collectedAt).toBe('2026-11-01T06:00:00.000Z')
  })

  it('is the specimen\'s own time where the result has none', () => {
    const contained = [{ resourceType: 'Specimen', id: 's', type: { text: 'Serum' }, collection: { collectedDateTime: '2026-11-03T08:00:00Z' } }]
    expect(readingOf({ effectiveDateTime: undefined, contained, specimen: { reference: '#s' } })?.collectedAt).toBe('2026-11-03T08:00:00.000Z')
  })

  it('before the date asked for is a reason, by the department\'s calendar', () => {
    expect(readingOf({ effectiveDateTime: '2026-11-12T05:59:00Z' }, { since: '2026-11-12' })?.refusal).toContain('Collected before 2026-11-12')
    expect(readingOf({ effectiveDateTime: '2026-11-12T06:00:00Z' }, { since: '2026-11-12' })?.refusal).toBeNull()
  })
})

describe('a panel', () => {
  it('gives its creatinine part, with the part\'s code in the id', () => {
    const component = [
      { code: loincCode('2951-2'), valueQuantity: { value: 139, unit: 'mmol/L' } },
      { code: loincCode('2160-0'), valueQuantity: { value: 1.08, unit: 'mg/dL' } },
    ]
    expect(readingsOf({ code: loincCode('24323-8'), valueQuantity: undefined, component }).map(({ id, value }) => [id, value])).toEqual([['o1#2160-0', 1.08]])
  })

  it('gives cystatin C as such', () => {
    expect(readingOf({ code: loincCode('33863-2'), valueQuantity: { value: 0.95, unit: 'mg/L' } })).toMatchObject({ analyte: 'cystatin-c', value: 0.95 })
  })
})
