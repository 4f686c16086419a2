import { readFileSync } from 'node:fs'
import { fileURLToPath } from 'node:url'

/** One record of a table, by column name. Asking for a column that is not there fails, so that a misspelling cannot pass. */
export interface CsvRow {
  /** Counted in records, the header being 1. */
  line: number
  text: (column: string) => string
  /** Null where the cell is empty; NaN where it holds something else. */
  number: (column: string) => number | null
  /** A column that a table may do without; empty then. */
  optional: (column: string) => string
}

/** Cells of each record; quoted cells may hold commas, line ends and doubled quotes (RFC 4180). */
export function parseCsv(content: string): string[][] {
  const records: string[][] = []
  let record: string[] = []
  let cell = ''
  let quoted = false
  const characters = [...content.replace(/^\uFEFF/, '')]
  for (let index = 0; index < characters.length; index += 1) {
    const character = characters[index]
    if (quoted) {
      if (character === '"' && characters[index + 1] === '"') {
        cell += '"'
        index += 1
      }
      else if (character === '"') quoted = false
      else cell += character
    }
    else if (character === '"') quoted = true
    else if (character === ',' || character === '\n') {
      record.push(cell)
      cell = ''
      if (character === '\n') {
        records.push(record)
        record = []
      }
    }
    else if (character !== '\r') cell += character
  }
  if (cell !== '' || record.length > 0) records.push([...record, cell])
  return records
}

/**
 * Rows of a table. Blank lines are left out.
 *
 * @param name for the words of an error
 * @throws where a line has another number of cells than the header
 */
export function parseTable(name: string, content: string): CsvRow[] {
  const [header = [], ...records] = parseCsv(content)
  return records.flatMap((record, index) => {
    if (record.every(cell => cell.trim() === '')) return []
    if (record.length !== header.length) throw new Error(`${name}, record ${index + 2}: ${record.length} cells, ${header.length} expected`)
    const find = (column: string) => record[header.findIndex(title => title.trim() === column)]
    const text = (column: string): string => {
      const cell = find(column)
      if (cell === undefined) throw new MissingColumn(name, column)
      return cell
    }
    return [{
      line: index + 2, text,
      number: column => (text(column).trim() === '' ? null : Number(text(column))),
      optional: column => find(column)?.trim() ?? '',
    }]
  })
}

/** A table that lacks a column its check reads: nothing can be said of any of its rows. */
export class MissingColumn extends Error {
  constructor(table: string, column: string) {
    super(`${table} has no column ${column}`)
    this.name = 'MissingColumn'
  }
}

/** Reads a table of tests/checks/tables by its file name. */
export function readTable(name: string): CsvRow[] {
  return parseTable(name, readFileSync(fileURLToPath(new URL(`../checks/tables/${name}`, import.meta.url)), 'utf8'))
}
