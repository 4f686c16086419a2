/**
 * One table as CSV after RFC 4180: CRLF line ends, quotes doubled, a cell quoted where it holds a comma, quote or line end.
 * Spreadsheets run a cell that begins like a formula: such text gets a leading apostrophe, so that it stays text
 * (OWASP, CSV injection). Numbers are written as they are.
 */
export function toCsv(header: readonly string[], rows: readonly (readonly CsvCell[])[]): string {
  return [header, ...rows].map(row => row.map(csvCell).join(',')).join('\r\n') + '\r\n'
}

/** What one cell may hold; null is an empty cell. */
export type CsvCell = string | number | null

function csvCell(value: CsvCell): string {
  if (value === null) return ''
  if (typeof value === 'number') return Number.isFinite(value) ? String(value) : ''
  const text = /^[=+\-@\t\r\n]/.test(value) ? `'${value}` : value
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text
}
