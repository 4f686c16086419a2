/**
 * Reads a typed decimal number. A comma counts as a decimal point only where it can be nothing else: "0,94" is 0.94,
 * while "1,200" could mean two things and is refused.
 *
 * @returns null for nothing typed, NaN for what is no plain number.
 */
export function readNumber(text: string): number | null {
  const trimmed = text.trim()
  if (trimmed === '') return null
  const plain = /^\d+,\d{1,2}$/.test(trimmed) ? trimmed.replace(',', '.') : trimmed
  return /^\d+(\.\d*)?$|^\.\d+$/.test(plain) ? Number(plain) : Number.NaN
}
