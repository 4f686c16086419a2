import { describe, expect, it } from 'vitest'
import { starterAgents } from '#shared/domain/contrast/agents'
import { agentIds } from '#shared/domain/contrast/types'
import { readTable } from '../support/csv'
import { checkFor, checkRow, rowName, tableNames } from './rows/tables'

/** The medicine against tables from outside; each row's check names the table's published sources. */
describe.each(tableNames)('the table %s', (name) => {
  const check = checkFor(`${name}.csv`)

  it.each(readTable(`${name}.csv`).map(row => [rowName(row), row] as const))('is agreed with in row %s', (_name, row) => {
    expect(check).not.toBeNull()
    if (check !== null) expect(checkRow(check, row)).toEqual([])
  })
})

describe('the agents', () => {
  it('are those of the table, in its order', () => {
    const names = readTable('agents.csv').map(row => row.text('agent'))
    expect(names).toEqual([...agentIds])
    expect(starterAgents.map(agent => agent.id)).toEqual(names)
  })
})
