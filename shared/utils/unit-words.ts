/** A lab unit as it is printed: UCUM codes write the micro sign as a plain u. */
export function unitWords(unit: string): string {
  return unit.replace(/^u(?=mol)/, 'µ')
}
