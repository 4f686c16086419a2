import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest'
import { checkConnection } from '#server/ehr/check-connection'
import { createEhrClient } from '#server/ehr/client'
import { readRecord } from '#server/ehr/read-record'
import { searchPatients } from '#server/ehr/search-patients'
import { startFhirFake, type FhirFake } from '../../support/fhir-fake'

const quick = { tries: 1 }
const now = '2026-12-01T13:00:00.000Z'
const options = { since: null, zone: 'UTC', now }

describe('the breaker', () => {
  let fake: FhirFake
  beforeAll(async () => {
    fake = await startFhirFake()
  })
  afterEach(() => fake.reset())
  afterAll(() => fake.stop())

  it('opens after five failures, lets nothing through, tries once after its pause and closes by itself', async () => {
    let clock = Date.parse(now)
    const client = createEhrClient(fake.settings(quick), { now: () => clock })
    const ask = () => searchPatients(client, { recordNumber: '40-2217' })
    await fake.control({ fault: '500' })
    for (let call = 0; call < 50; call += 1) await expect(ask()).rejects.toThrow()
    expect((await fake.log()).length).toBe(5)
    expect(client.breaker()).toEqual({ state: 'open', failures: 5, retryAt: '2026-12-01T13:00:30.000Z' })

    clock += 30_000
    expect(client.breaker().state).toBe('half-open')
    await expect(ask()).rejects.toThrow()
    await expect(ask()).rejects.toThrow()
    expect((await fake.log()).length).toBe(6)

    await fake.reset()
    clock += 30_000
    expect(await ask()).toMatchObject({ outcome: 'one' })
    expect(client.breaker()).toEqual({ state: 'closed', failures: 0, retryAt: null })
  })

  it('is not moved by a question the server refuses or a patient it does not know', async () => {
    const client = createEhrClient(fake.settings(quick))
    for (let call = 0; call < 3; call += 1) await readRecord(client, 'nobody', options)
    expect(client.breaker()).toMatchObject({ state: 'closed', failures: 0 })
  })

  it('is not moved by callers who lose interest', async () => {
    const client = createEhrClient(fake.settings(quick))
    await fake.control({ fault: 'hang' })
    for (let call = 0; call < 8; call += 1) {
      await expect(searchPatients(client, { name: 'li' }, { signal: AbortSignal.abort() })).rejects.toThrow()
    }
    expect(client.breaker()).toMatchObject({ state: 'closed', failures: 0 })
  })

  it('lets a whole reading through again once the server is back', async () => {
    let clock = Date.parse(now)
    const client = createEhrClient(fake.settings(quick), { now: () => clock })
    await fake.control({ fault: '500' })
    expect((await readRecord(client, 'marta-lindqvist', options)).state).toBe('unreachable')
    expect(client.breaker().state).toBe('open')
    await fake.reset()
    clock += 30_000
    expect((await readRecord(client, 'marta-lindqvist', options)).state).toBe('complete')
  })
})

describe('the connection check', () => {
  let fake: FhirFake
  beforeAll(async () => {
    fake = await startFhirFake()
  })
  afterEach(() => fake.reset())
  afterAll(() => fake.stop())

  it('says what the server is', async () => {
    expect(await checkConnection(createEhrClient(fake.settings(quick)), { now })).toMatchObject({
      state: 'ok', words: 'Connected', fhirVersion: '4.0.1', software: 'Fake hospital record 1', missing: [], breaker: { state: 'closed' },
    })
  })

  it('says that it is not reachable, or not connected at all', async () => {
    await fake.control({ fault: 'unreachable' })
    expect(await checkConnection(createEhrClient(fake.settings(quick)), { now })).toMatchObject({ state: 'unreachable', words: 'The hospital record cannot be reached' })
    expect(await checkConnection(null, { now })).toMatchObject({ state: 'not-configured', breaker: null })
  })
})

describe.each(['ES384', 'RS384'] as const)('backend services with %s', (algorithm) => {
  let fake: FhirFake
  beforeAll(async () => {
    fake = await startFhirFake({ auth: 'backend-services', algorithm, now: Date.parse(now) })
  })
  afterEach(() => fake.reset())
  afterAll(() => fake.stop())

  const tokenCalls = async () => (await fake.log()).filter(({ url }) => url === '/token').length

  it('signs in once for a whole reading', async () => {
    const reading = await readRecord(createEhrClient(fake.settings(quick)), 'marta-lindqvist', options)
    expect(reading.state).toBe('complete')
    expect(await tokenCalls()).toBe(1)
  })

  it('signs in anew, once, when the token runs out between two pages', async () => {
    const client = createEhrClient(fake.settings(quick))
    await fake.control({ quirks: { smallPages: 9 } })
    await fake.control({ fault: 'expiredToken', pattern: '_page=', count: 1, skip: 1 })
    const reading = await readRecord(client, 'beatrice-lang', options)
    expect(reading.parts.laboratory).toMatchObject({ state: 'found', complete: true })
    expect(reading.readings).toHaveLength(65)
    expect(await tokenCalls()).toBe(2)
  })

  it('is not connected, and says so, where every token is refused', async () => {
    await fake.control({ fault: '401', pattern: 'Patient|Observation|Condition|Allergy|Medication|Procedure|metadata' })
    const client = createEhrClient(fake.settings(quick))
    const reading = await readRecord(client, 'marta-lindqvist', options)
    expect(reading.state).toBe('unreachable')
    expect(reading.parts.patient.problem).toBe('not-connected')
    expect(client.breaker().state).toBe('open')
  })

  it('is not connected with a key the server does not know', async () => {
    const stranger = await startFhirFake({ auth: 'backend-services', algorithm })
    const reading = await readRecord(createEhrClient({ ...stranger.settings(quick), baseUrl: fake.baseUrl }), 'marta-lindqvist', options)
    await stranger.stop()
    expect(reading).toMatchObject({ state: 'unreachable', parts: { patient: { problem: 'not-connected' } } })
  })

  it('shows neither token nor key in what it reports', async () => {
    await fake.control({ fault: '500', pattern: 'Observation' })
    const reading = await readRecord(createEhrClient(fake.settings(quick)), 'marta-lindqvist', options)
    const tokens = (await fake.log()).flatMap(({ headers }) => typeof headers.authorization === 'string' ? [headers.authorization.slice(7)] : [])
    expect(tokens.length).toBeGreaterThan(0)
    expect(tokens.filter(token => JSON.stringify(reading).includes(token))).toEqual([])
  })

  it('says "refused", not "none", of parts the scope leaves out', async () => {
    const narrow = fake.settings(quick, { scope: 'system/Patient.rs system/Observation.rs' })
    const reading = await readRecord(createEhrClient(narrow), 'marta-lindqvist', options)
    expect(reading.state).toBe('incomplete')
    expect(reading.parts.conditions).toMatchObject({ state: 'could-not-look', problem: 'refused' })
    expect(reading.readings[0]?.value).toBe(0.94)
  })
})
