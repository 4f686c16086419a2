import { displayMgPerDl } from './creatinine'
import { isAcute } from './injury'
import type { KidneyFunction } from './types'

type HeadlineInput = Pick<KidneyFunction, 'status' | 'egfr' | 'range' | 'creatinine' | 'ageWords' | 'currency' | 'injury' | 'passedOver'> & {
  recordState: 'complete' | 'incomplete' | 'unreachable' | 'not-read'
  infant: boolean
}

/** A creatinine with its sign, for a sentence. */
export function creatinineWords(creatinine: { mgPerDl: number, comparator: string | null }): string {
  return `${creatinine.comparator ?? ''}${displayMgPerDl(creatinine.mgPerDl)} mg/dL`
}

function withoutCreatinine({ status, passedOver, recordState }: HeadlineInput): string {
  const found = passedOver.filter(({ reading }) => reading.analyte === 'creatinine' && reading.status !== 'entered-in-error').length
  const unusable = found === 0 ? '' : `; ${found === 1 ? '1 result' : `${found} results`} could not be used`
  if (status === 'not-looked') return `The record has not been read for a creatinine${unusable}`
  if (status === 'could-not-look') {
    return recordState === 'incomplete'
      ? `The record was only partly read, without a usable creatinine so far${unusable}`
      : `The record could not be read, so whether there is a creatinine is not known${unusable}`
  }
  if (found === 0) return 'No creatinine found in the record'
  return `No usable creatinine: ${found === 1 ? 'the result found' : `none of the ${found} results found`} can${found === 1 ? 'not' : ''} be used`
}

/**
 * One line about the kidneys. What makes a number unreliable is said before what is missing, and that before its age.
 */
export function kidneyHeadline(input: HeadlineInput): string {
  const { status, egfr, range, creatinine, injury, currency, infant } = input
  if (status === 'dialysis') return 'On dialysis: an eGFR means nothing and none is given'
  if (creatinine === null) return withoutCreatinine(input)
  const drawn = `creatinine ${creatinineWords(creatinine)}, ${input.ageWords ?? 'age not known'}`
  const doubt = isAcute(injury) ? `${doubtWords(injury.status)}. ` : ''
  const stale = currency === 'too-old' ? ', too old for the exam' : ''
  if (status === 'needs-height') return `${doubt}A height is needed for the eGFR of a child; ${drawn}${stale}`
  if (status === 'no-equation') {
    return infant ? `${doubt}No eGFR under 1 year of age; ${drawn}${stale}` : `${doubt}No eGFR: check the date of birth; ${drawn}${stale}`
  }
  if (range !== null) return `${doubt}eGFR ${range.low.display} to ${range.high.display}: the sex for the equation is not known; ${drawn}${stale}`
  if (egfr === null) return `${doubt}${drawn}${stale}`
  return `${doubt}eGFR ${egfr.display}${doubt === '' ? '' : ' cannot be relied on'}; ${drawn}${stale}`
}

function doubtWords(status: KidneyFunction['injury']['status']): string {
  if (status === 'aki') return 'Acute kidney injury'
  if (status === 'aki-presumed') return 'Acute kidney injury presumed'
  return status === 'recent-aki' ? 'Recent acute kidney injury' : 'Creatinine not steady'
}
