// Loads the patients' bundles and moves their dates, so that what was recent when they were written is recent now.
import { readdirSync, readFileSync } from 'node:fs'
import { fileURLToPath } from 'node:url'

const folder = fileURLToPath(new URL('../patients/', import.meta.url))
const dayMs = 24 * 3_600_000
const fullDate = /^(\d{4}-\d{2}-\d{2})(T.*)?$/

/**
 * Every resource of every bundle, by type and id.
 * @param {number} nowMs the moment that the bundles' `timestamp` is moved to, by whole days
 * @returns {Map<string, Map<string, object>>} resources by type, then id
 */
export function loadStore(nowMs) {
  const types = new Map()
  for (const name of readdirSync(folder).filter(file => file.endsWith('.json')).sort()) {
    const bundle = JSON.parse(readFileSync(`${folder}${name}`, 'utf8'))
    const days = Math.floor((nowMs - Date.parse(bundle.timestamp)) / dayMs)
    const birthDateMoves = bundle.meta?.tag?.some(({ code }) => code === 'birth-date-moves') ?? false
    for (const { resource } of bundle.entry) put(types, moved(resource, days, birthDateMoves))
  }
  return types
}

export function put(types, resource) {
  if (!types.has(resource.resourceType)) types.set(resource.resourceType, new Map())
  types.get(resource.resourceType).set(resource.id, resource)
}

/** A date or time moved by whole days; its time of day and offset stay. Years and months without a day stay as they are. */
export function moveDate(text, days) {
  const [, date, rest = ''] = fullDate.exec(text) ?? []
  return date === undefined ? text : `${new Date(Date.parse(`${date}T00:00:00Z`) + days * dayMs).toISOString().slice(0, 10)}${rest}`
}

function moved(value, days, birthDateMoves, key = '') {
  if (Array.isArray(value)) return value.map(item => moved(item, days, birthDateMoves, key))
  if (value !== null && typeof value === 'object') {
    return Object.fromEntries(Object.entries(value).map(([name, inner]) => [name, moved(inner, days, birthDateMoves, name)]))
  }
  if (typeof value !== 'string' || (key === 'birthDate' && !birthDateMoves)) return value
  return moveDate(value, days)
}
