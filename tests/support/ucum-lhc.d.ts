/** The part of the National Library of Medicine's unit library that the checks use; it ships without types. */
declare module '@lhncbc/ucum-lhc' {
  interface Conversion { status: 'succeeded' | 'failed' | 'error', toVal: number | null, msg: string[] }
  interface Validation { status: 'valid' | 'invalid' | 'error' }
  export class UcumLhcUtils {
    static getInstance(): UcumLhcUtils
    convertUnitTo(from: string, value: number, to: string, options?: { molecularWeight?: number }): Conversion
    validateUnitString(unit: string): Validation
  }
}
