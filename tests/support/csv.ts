import { readFileSync } from 'node:fs'
import { fileURLToPath } from 'node:url'

/** One line of a table, by column name. Asking for a column that is not there fails, so that a misspelling cannot pass. */
export interface CsvRow {
  line: number
  text: (column: string) => string
  /** Null where the cell is empty; NaN where it holds something else. */
  number: (column: string) => number | null
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

/** Reads a table of tests/checks/tables by its file name. */
export function readTable(name: string): CsvRow[] {
  const path = fileURLToPath(new URL(`../checks/tables/${name}`, import.meta.url))
  const [header = [], ...records] = parseCsv(readFileSync(path, 'utf8'))
  return records.map((record, index) => {
    if (record.length !== header.length) throw new Error(`${name}, line ${index + 2}: ${record.length} cells, ${header.length} expected`)
    const text = (column: string): string => {
      const at = header.indexOf(column)
      const cell = record[at]
      if (cell === undefined) throw new Error(`${name} has no column ${column}`)
      return cell
    }
    return { line: index + 2, text, number: column => (text(column).trim() === '' ? null : Number(text(column))) }
  })
}
