import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest'
import { createEhrClient } from '#server/ehr/client'
import { searchPatients, type PatientQuery } from '#server/ehr/search-patients'
import { startFhirFake, type FhirFake } from '../../support/fhir-fake'

const quick = { tries: 2 }

let fake: FhirFake
beforeAll(async () => {
  fake = await startFhirFake()
})
afterEach(() => fake.reset())
afterAll(() => fake.stop())

const search = (query: PatientQuery, raw: Record<string, unknown> = {}) => searchPatients(createEhrClient(fake.settings(quick, raw)), query)
const names = async (query: PatientQuery) => (await search(query)).patients.map(({ displayName }) => displayName)

describe('a patient search', () => {
  it('finds one person by record number, under the configured system and without one', async () => {
    expect(await search({ recordNumber: '40-2217' })).toMatchObject({ outcome: 'one', complete: true, patients: [{ ehrId: 'marta-lindqvist' }] })
    const configured = { recordNumberSystem: 'https://northshore.example/fhir/record-number' }
    expect(await search({ recordNumber: '40-2217' }, configured)).toMatchObject({ outcome: 'one' })
    expect(await search({ recordNumber: '40-2217' }, { recordNumberSystem: 'https://elsewhere.example/number' })).toMatchObject({ outcome: 'none' })
  })

  it.each([
    ['lindqvist', 'Marta Lindqvist'],
    ['Lucia Fern', 'Lucía Fernández'],
    ['lindqvist, marta', 'Marta Lindqvist'],
    ['王', '秀英 王'],
    ['Xiuying', '秀英 王'],
    ['O\'Neill', 'نور الحدّاد'],
    ['königsmarck', 'Maximiliane Hildegard Auguste Freifrau von Königsmarck-Hohenstauffenberg zu Altenburg-Sachsenhausen'],
  ])('finds "%s"', async (name, found) => {
    expect(await names({ name })).toEqual([found])
  })

  it('finds by family name and date of birth, and not with another date', async () => {
    expect(await names({ family: 'Lindqvist', birthDate: '1965-11-08' })).toEqual(['Marta Lindqvist'])
    expect(await names({ family: 'Lindqvist', birthDate: '1965-11-09' })).toEqual([])
  })

  it('never picks among several, and says which record was replaced', async () => {
    const { outcome, patients } = await search({ name: 'Novak' })
    expect(outcome).toBe('several')
    expect(patients).toEqual(expect.arrayContaining([
      expect.objectContaining({ ehrId: 'peter-novak', active: true, replacedBy: null, recordNumber: '40-2544' }),
      expect.objectContaining({ ehrId: 'peter-novak-old', active: false, replacedBy: 'peter-novak' }),
    ]))
  })

  it('says who has died', async () => {
    expect((await search({ name: 'Agnes Hale' })).patients).toMatchObject([{ deceased: true }])
  })

  it('checks every row again where the server ignores what was asked', async () => {
    await fake.control({ quirks: { ignoreFilters: true } })
    expect(await names({ name: 'lindqvist' })).toEqual(['Marta Lindqvist'])
    expect(await names({ recordNumber: '40-2231' })).toEqual(['Paul Adeyemi'])
  })

  it('keeps names and numbers out of addresses, and falls back where the server knows no other way', async () => {
    await search({ recordNumber: '40-2217' })
    const first = (await fake.log()).filter(({ url }) => url.startsWith('/Patient'))
    expect(first.map(({ method, url }) => `${method} ${url}`)).toEqual(['POST /Patient/_search'])
    await fake.control({ fault: '404', pattern: '_search' })
    expect(await search({ recordNumber: '40-2217' })).toMatchObject({ outcome: 'one' })
  })

  it('asks again by address where a server reads no body of a search and so finds nobody', async () => {
    await fake.control({ quirks: { ignorePostBody: true } })
    expect(await search({ recordNumber: '40-2217' })).toMatchObject({ outcome: 'one', complete: true })
  })

  it('is not certain of "none" where pages are missing', async () => {
    await fake.control({ quirks: { ignoreFilters: true, smallPages: 3 } })
    await fake.control({ fault: '500', pattern: '_page=' })
    expect(await search({ name: 'nobody at all' })).toMatchObject({ outcome: 'none', complete: false })
  })

  it('fails in words without a name where the server does not answer', async () => {
    await fake.control({ fault: '500' })
    await expect(search({ name: 'lindqvist' })).rejects.toMatchObject({ name: 'EhrUnavailable', problem: 'unreachable', message: expect.not.stringContaining('lindqvist') })
  })

  it('asks for something to look for', async () => {
    await expect(search({ name: '  ' })).rejects.toThrow(RangeError)
  })

  it('finds everybody born on a day', async () => {
    const answer = await search({ birthDate: '1965-11-08' })
    expect(answer.patients.map(patient => patient.displayName)).toContain('Marta Lindqvist')
    expect(answer.patients.every(patient => patient.birthDate === '1965-11-08')).toBe(true)
  })
})
