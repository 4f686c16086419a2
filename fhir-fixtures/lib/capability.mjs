import { parameters } from './match.mjs'

const types = {
  'identifier': 'token', 'family': 'string', 'given': 'string', 'name': 'string', 'birthdate': 'date', 'date': 'date', 'effective-time': 'date',
  '_lastUpdated': 'date', 'patient': 'reference', 'subject': 'reference',
}

/** What the server offers (R4 CapabilityStatement). */
export function capabilityStatement(base) {
  return {
    resourceType: 'CapabilityStatement',
    status: 'active',
    date: '2026-11-01',
    kind: 'instance',
    software: { name: 'Fake hospital record', version: '1' },
    implementation: { description: 'Invented patients for trying things out', url: base },
    fhirVersion: '4.0.1',
    format: ['json'],
    rest: [{
      mode: 'server',
      resource: Object.entries(parameters).map(([type, known]) => ({
        type,
        interaction: [{ code: 'read' }, { code: 'search-type' }],
        searchParam: Object.keys(known).filter(name => !name.includes(':')).map(name => ({ name, type: types[name] ?? 'token' })),
      })),
    }],
  }
}
