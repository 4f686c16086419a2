import { createServer, type Server } from 'node:http'
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest'
import { createEhrClient } from '#server/ehr/client'
import { readRecord } from '#server/ehr/read-record'
import type { EhrLimits } from '#server/ehr/settings'
import { startFhirFake, type FhirFake } from '../../support/fhir-fake'

const now = '2026-12-01T13:00:00.000Z'
/** Two tries keep failures short; time limits stay wide, so that a busy machine changes nothing. */
const quick: Partial<EhrLimits> = { tries: 2 }
const impatient: Partial<EhrLimits> = { requestMs: 300, callMs: 300, readingMs: 2_000, tries: 1 }
const options = { since: null, zone: 'America/Chicago', now }

let fake: FhirFake
beforeAll(async () => {
  fake = await startFhirFake({ now: Date.parse(now) })
})
afterEach(() => fake.reset())
afterAll(() => fake.stop())

const read = (id: string, limits: Partial<EhrLimits> = quick, raw: Record<string, unknown> = {}, more: Partial<Parameters<typeof readRecord>[2]> = {}) =>
  readRecord(createEhrClient(fake.settings(limits, raw)), id, { ...options, ...more })
const longIds = async () => (await read('beatrice-lang', {})).readings.map(({ id }) => id)

describe('a record on a well-behaved server', () => {
  it('brings the person, the results, weight, conditions and the earlier gadolinium dose', async () => {
    const reading = await read('marta-lindqvist')
    expect(reading.state).toBe('complete')
    expect(reading.patient).toMatchObject({
      recordNumber: '40-2217', displayName: 'Marta Lindqvist', birthDate: '1965-11-08', sex: 'female', email: 'marta.lindqvist@example.org', language: 'en',
    })
    expect(reading.readings[0]).toMatchObject({ value: 0.94, unit: 'mg/dL', collectedAt: '2026-11-12T13:00:00.000Z', sourceLabel: 'Northshore Hospital laboratory' })
    expect(reading.weight?.kg).toBe(74)
    expect(reading.conditions).toEqual(['Left breast cancer, treated 2021'])
    expect(reading.exposures).toMatchObject([{ agent: 'gadobutrol', amountMmol: 7.4 }])
    expect(reading.laboratoryEgfr).toMatchObject([{ value: 69, formula: 'CKD-EPI 2021' }])
    expect(reading.noKnownAllergy).toBe(true)
  })

  it('suggests hemodialysis from sessions and problem list', async () => {
    const { hints } = await read('paul-adeyemi')
    expect(hints.find(({ field }) => field === 'dialysis')).toMatchObject({ value: 'hemodialysis' })
  })

  it('suggests the severe reaction and its agent', async () => {
    const { hints, allergies } = await read('claire-dubois')
    expect(hints).toEqual(expect.arrayContaining([
      expect.objectContaining({ field: 'reactionAgent', value: 'gadobutrol' }),
      expect.objectContaining({ field: 'reactionSeverity', value: 'severe' }),
      expect.objectContaining({ field: 'reactionKind', value: 'allergic-like' }),
    ]))
    expect(allergies[0]).toContain('severe, Anaphylaxis')
  })

  it('asks a person about "contrast dye" and never takes it for gadolinium', async () => {
    const { hints, warnings } = await read('walter-simmons')
    expect(hints.find(({ field }) => field === 'earlierReaction')).toMatchObject({ value: 'unknown' })
    expect(hints.some(({ field }) => field === 'reactionAgent')).toBe(false)
    expect(warnings.map(({ id }) => id)).toContain('reaction-to-confirm')
  })

  it('counts every dose that was given, from medicines and procedures, and none that was not', async () => {
    const { exposures } = await read('yusuf-karim')
    expect(exposures.map(({ agent }) => agent)).toEqual([
      'gadobutrol', 'gadobutrol', 'gadoterate', 'gadoteridol', null, 'gadoterate', 'gadopentetate', 'gadopentetate',
    ])
  })

  it('never offers a urine, cancelled or mistaken value as usable', async () => {
    const { readings } = await read('owen-pritchard')
    const usable = readings.filter(({ refusal, status, value }) => refusal === null && value !== null && ['final', 'amended', 'corrected'].includes(status))
    expect(usable.map(({ id }) => id).sort()).toEqual(['owen-pritchard-future', 'owen-pritchard-unknown-time', 'owen-pritchard-usable'])
  })

  it('finds a creatinine inside a panel, and a panel member once its local code is configured', async () => {
    const plain = await read('samuel-adjei')
    expect(plain.readings.find(({ id }) => id === 'samuel-adjei-panel#2160-0')).toMatchObject({ value: 1.08, refusal: null })
    expect(plain.readings.find(({ id }) => id === 'samuel-adjei-member')?.refusal).toContain('not recognized')
    const configured = await read('samuel-adjei', quick, { creatinineCodes: 'https://northshore.example/fhir/laboratory-code|CREA' })
    expect(configured.readings.find(({ id }) => id === 'samuel-adjei-member')).toMatchObject({ value: 1.04, refusal: null })
  })

  it('says that there is no such patient, which is not an outage and not "no creatinine"', async () => {
    const reading = await read('nobody')
    expect(reading.parts.patient).toMatchObject({ state: 'none', problem: 'not-found' })
    expect(reading.parts.laboratory.state).toBe('could-not-look')
    expect(reading.state).toBe('incomplete')
  })

  it('does not use results where the date of birth differs', async () => {
    const reading = await read('marta-lindqvist', quick, {}, { expectedBirthDate: '1965-08-11' })
    expect(reading.state).toBe('incomplete')
    expect(reading.readings.every(({ refusal }) => refusal !== null)).toBe(true)
    expect(reading.warnings[0]?.id).toBe('birth-date-differs')
  })

  it('leaves out what was collected before the date asked for, and says so', async () => {
    const { readings } = await read('marta-lindqvist', quick, {}, { since: '2026-07-14' })
    expect(readings.map(({ value, refusal }) => [value, refusal])).toEqual([
      [0.94, null], [0.91, null],
    ])
  })
})

describe('pages', () => {
  it.each([
    ['small pages', { smallPages: 2 }],
    ['an ignored order', { ignoreSort: true, smallPages: 7 }],
    ['relative links', { relativeNext: true, smallPages: 9 }],
    ['empty pages on the way', { emptyPages: true, smallPages: 9 }],
    ['a row sent twice because rows were added meanwhile', { repeatRows: true, smallPages: 9 }],
    ['no total', { noTotal: true, smallPages: 9 }],
    ['a page that expires once', { expirePages: 1, smallPages: 20 }],
    ['a server that ignores what it does not know', { lenient: true, smallPages: 9 }],
    ['unknown extensions', { unknownExtensions: true }],
  ])('are read to their end with %s', async (_, quirks) => {
    const expected = await longIds()
    await fake.control({ quirks })
    const reading = await read('beatrice-lang', quick)
    expect(reading.parts.laboratory).toMatchObject({ state: 'found', complete: true })
    expect(reading.readings.map(({ id }) => id)).toEqual(expected)
  })

  it('come out newest first, the correction of the newest sample among them', async () => {
    await fake.control({ quirks: { ignoreSort: true } })
    const { readings } = await read('beatrice-lang')
    expect(readings[0]).toMatchObject({ id: 'beatrice-lang-corrected', value: 1.31, status: 'corrected' })
  })

  it('stop at a link that repeats, as incomplete', async () => {
    await fake.control({ quirks: { loopNext: true, smallPages: 9 } })
    const { state, parts } = await read('beatrice-lang')
    expect(state).toBe('incomplete')
    expect(parts.laboratory).toMatchObject({ state: 'found', complete: false, problem: 'cut-short' })
  })

  it('stop after the page limit, as incomplete', async () => {
    await fake.control({ quirks: { smallPages: 1 } })
    const reading = await read('beatrice-lang', { ...quick, maxPages: 10 })
    expect(reading.parts.laboratory).toMatchObject({ complete: false, problem: 'cut-short' })
    expect(reading.readings).toHaveLength(10)
  })

  it('never say "none" where the only page that came was empty and the next one failed', async () => {
    await fake.control({ quirks: { smallPages: 1, emptyPages: true } })
    await fake.control({ fault: '500', pattern: '_page=' })
    const reading = await read('beatrice-lang')
    expect(reading.parts.laboratory.complete).toBe(false)
    expect(reading.parts.laboratory.state).not.toBe('none')
  })

  it('are taken as incomplete where the server says so itself', async () => {
    await fake.control({ quirks: { incompleteEntry: true } })
    expect(await read('marta-lindqvist')).toMatchObject({ state: 'incomplete', parts: { laboratory: { state: 'found', problem: 'cut-short' } } })
  })

  it('are complete with a remark that only informs', async () => {
    await fake.control({ quirks: { outcomeEntry: true } })
    const reading = await read('marta-lindqvist')
    expect(reading.state).toBe('complete')
    expect(reading.warnings.map(({ id }) => id)).toContain('server-message')
  })
})

describe('a link to another server', () => {
  const asked: string[] = []
  let foreign: Server
  let foreignUrl: string
  beforeAll(async () => {
    foreign = createServer((request, response) => {
      asked.push(request.url ?? '')
      response.end('{}')
    })
    await new Promise<void>(resolve => foreign.listen(0, '127.0.0.1', () => resolve()))
    const address = foreign.address()
    foreignUrl = `http://127.0.0.1:${typeof address === 'object' ? address?.port : ''}`
  })
  afterAll(() => new Promise(resolve => foreign.close(resolve)))

  it('is not followed, and the answer is incomplete', async () => {
    await fake.control({ quirks: { foreignNext: foreignUrl, smallPages: 9 } })
    const { parts, readings } = await read('beatrice-lang')
    expect(parts.laboratory).toMatchObject({ state: 'found', complete: false, problem: 'cut-short' })
    expect(readings).toHaveLength(9)
    expect(asked).toEqual([])
  })

  it('is not followed as a redirect either', async () => {
    await fake.control({ fault: 'redirect', location: foreignUrl })
    expect((await read('marta-lindqvist')).state).toBe('unreachable')
    expect(asked).toEqual([])
  })
})

describe('rows that do not belong', () => {
  it('drops another patient\'s row and does not call the answer complete', async () => {
    await fake.control({ quirks: { rowOfAnotherPatient: true } })
    const reading = await read('aiko-tanabe')
    expect(reading.state).toBe('incomplete')
    expect(reading.parts.laboratory.problem).toBe('other-patient')
    expect(reading.readings.every(({ id }) => id.startsWith('aiko-tanabe'))).toBe(true)
    expect(reading.warnings.map(({ id }) => id)).toContain('row-of-another-patient')
  })

  it('refuses a number that is sent as text', async () => {
    await fake.control({ quirks: { numberAsString: true } })
    const { readings } = await read('marta-lindqvist')
    expect(readings[0]).toMatchObject({ value: null, refusal: 'The value is not sent as a number' })
  })

  it('keeps to creatinine where the server ignores the code asked for', async () => {
    await fake.control({ quirks: { ignoreFilters: true } })
    const { readings, weight } = await read('marta-lindqvist')
    expect(readings.map(({ value }) => value)).toEqual([0.94, 0.91, 0.95, 0.9, 0.93, 0.92])
    expect(weight?.kg).toBe(74)
  })
})

describe('a server in trouble', () => {
  it.each([
    ['500', { fault: '500' }, 'unreachable'],
    ['503', { fault: '503' }, 'busy'],
    ['no connection', { fault: 'unreachable' }, 'unreachable'],
    ['a web page', { fault: 'html200' }, 'unreadable'],
    ['JSON that breaks off', { fault: 'truncatedJson' }, 'unreadable'],
    ['JSON that is wrong', { fault: 'malformedJson' }, 'unreadable'],
    ['an empty body', { fault: 'emptyBody' }, 'unreadable'],
    ['401 without a sign-in to renew', { fault: '401' }, 'not-connected'],
    ['a wait longer than the whole reading', { fault: 'retryAfterSeconds', seconds: 90 }, 'busy'],
  ])('with %s is unreachable, never "none found"', async (_, fault, problem) => {
    await fake.control(fault)
    const reading = await read('marta-lindqvist')
    expect(reading.state).toBe('unreachable')
    // The breaker may open between two parts; each part says either what happened or that nothing was tried.
    expect(Object.values(reading.parts).map(part => part.state)).toEqual(Array(8).fill('could-not-look'))
    expect(Object.values(reading.parts).map(part => part.problem)).toContain(problem)
    expect(JSON.stringify(reading.parts)).not.toContain('marta')
  })

  it('that never answers is given up on', async () => {
    await fake.control({ fault: 'hang' })
    const reading = await read('marta-lindqvist', impatient)
    expect(reading.state).toBe('unreachable')
    expect(reading.parts.patient).toMatchObject({ state: 'could-not-look', problem: 'unreachable', words: 'The hospital record did not answer in time' })
  })

  it('that sends more than can be taken in is unreachable', async () => {
    await fake.control({ fault: 'huge' })
    const reading = await read('marta-lindqvist', { tries: 1, maxBytes: 64 * 1024 })
    expect(reading.state).toBe('unreachable')
    expect(reading.parts.patient).toMatchObject({ problem: 'unreadable', words: 'The hospital record sent more than can be taken in at once' })
  })

  it('survives nesting a hundred thousand deep', async () => {
    await fake.control({ fault: 'deep' })
    const reading = await read('marta-lindqvist')
    expect(reading.readings).toEqual([])
    expect(reading.state).not.toBe('complete')
  })

  it.each([
    ['a fault of its own', { fault: '500', count: 1 }],
    ['JSON that breaks off', { fault: 'truncatedJson', count: 1 }],
    ['a dropped connection', { fault: 'unreachable', count: 1 }],
    ['a wait in seconds', { fault: 'retryAfterSeconds', seconds: 1, count: 1 }],
    ['a wait until a date', { fault: 'retryAfterDate', seconds: 1, count: 1 }],
    ['a slow answer', { fault: 'delay', delayMs: 150 }],
  ])('that recovers from %s is read in full', async (_, fault) => {
    await fake.control({ pattern: 'Observation', ...fault })
    expect((await read('marta-lindqvist')).state).toBe('complete')
  })

  it('leaves the rest usable where one part fails', async () => {
    await fake.control({ fault: '500', pattern: 'AllergyIntolerance' })
    const reading = await read('marta-lindqvist')
    expect(reading.state).toBe('incomplete')
    expect(reading.parts.allergies).toMatchObject({ state: 'could-not-look', problem: 'unreachable' })
    expect(reading.noKnownAllergy).toBe(false)
    expect(reading.readings[0]?.value).toBe(0.94)
  })

  it('is not blamed for what it does not offer, and "not offered" is not "none"', async () => {
    await fake.control({ fault: '404', pattern: 'MedicationAdministration|metadata' })
    const reading = await read('marta-lindqvist')
    expect(reading.state).toBe('complete')
    expect(reading.parts.exposures).toMatchObject({ state: 'could-not-look', problem: 'not-offered' })
    expect(reading.warnings.map(({ id }) => id)).toContain('not-offered')
  })

  it('that fails a part it says it offers is not complete', async () => {
    await fake.control({ fault: '404', pattern: 'MedicationAdministration' })
    expect(await read('marta-lindqvist')).toMatchObject({ state: 'incomplete', parts: { exposures: { state: 'could-not-look', problem: 'refused' } } })
  })

  it('that refuses access to results is not complete', async () => {
    await fake.control({ fault: '403', pattern: 'Observation' })
    expect(await read('marta-lindqvist')).toMatchObject({ state: 'incomplete', parts: { laboratory: { state: 'could-not-look', problem: 'refused' } } })
  })

  it('that refuses the full question is asked a simpler one', async () => {
    await fake.control({ fault: '400', pattern: '_sort' })
    expect((await read('marta-lindqvist')).readings[0]?.value).toBe(0.94)
  })

  it('that cannot fetch the members of a panel is not complete', async () => {
    await fake.control({ fault: '500', pattern: 'Observation/samuel' })
    await fake.control({ fault: '400', pattern: 'code:text' })
    expect((await read('samuel-adjei')).parts.laboratory).toMatchObject({ state: 'found', complete: false, words: 'Parts of a panel could not be fetched' })
  })

  it('without a capability statement still tells an unknown patient from a wrong address', async () => {
    await fake.control({ fault: '404', pattern: 'metadata' })
    expect((await read('nobody')).parts.patient).toMatchObject({ state: 'none', problem: 'not-found' })
  })

  it('at the wrong address says nothing about the patient', async () => {
    await fake.control({ fault: 'notFhir' })
    expect(await read('marta-lindqvist')).toMatchObject({ state: 'unreachable', parts: { patient: { state: 'could-not-look' } } })
  })

  it('stops when the caller loses interest', async () => {
    await fake.control({ fault: 'hang' })
    const caller = new AbortController()
    const pending = read('marta-lindqvist', quick, {}, { signal: caller.signal })
    caller.abort()
    await expect(pending).rejects.toThrow()
  })
})
