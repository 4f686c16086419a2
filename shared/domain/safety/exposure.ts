import { DateTime } from 'luxon'
import type { SafetyContext } from './context'
import type { GadoliniumExposure, SafetyFinding } from './types'
import { countsAsBelow } from '../kidney/evaluate'
import { isAcute } from '../kidney/injury'
import { parseInstant } from '../kidney/instant'
import { mayBeIntravenous, mayUseContrast } from './context'
import { finding } from './finding'
import { safetySources } from './sources'

/** Earlier gadolinium: the interval since the last dose, and the doses so far as context without a limit. */
export function findExposure(context: SafetyContext): SafetyFinding[] {
  if (!mayUseContrast(context)) return []
  return [...findInterval(context), ...findEarlierDoses(context)]
}

/**
 * Earlier doses, each once: the department's own entry and the hospital record's of one agent on one day are the same dose.
 * The department's own comes first, since it knows the amount.
 */
export function distinctDoses(exposures: readonly GadoliniumExposure[], zone: string): GadoliniumExposure[] {
  return distinctWithDays(exposures, zone).map(({ dose }) => dose)
}

function distinctWithDays(exposures: readonly GadoliniumExposure[], zone: string): { dose: GadoliniumExposure, day: string }[] {
  const trust = ['ledger', 'record', 'typed'] as const
  const sorted = [...exposures].sort((a, b) => trust.indexOf(a.source) - trust.indexOf(b.source)).map(dose => ({ dose, day: dayOf(dose, zone) }))
  const kept: typeof sorted = []
  for (const { dose, day } of sorted) {
    const twin = kept.find(other => other.dose.source !== dose.source && other.day === day
      && (other.dose.agent === dose.agent || other.dose.agent === null || dose.agent === null))
    if (!twin) kept.push({ dose, day })
  }
  return kept
}

function dayOf({ givenAt }: GadoliniumExposure, zone: string): string {
  if (!givenAt.includes('T')) return givenAt
  return DateTime.fromISO(givenAt, { zone }).toISODate() ?? givenAt
}

/** "Oct 23, 2022" of a day, "Oct 2022" of a month; a year, or what is no date, as it is. */
function dayWords(day: string): string {
  const format = day.length === 10 ? 'LLL d, yyyy' : day.length === 7 ? 'LLL yyyy' : null
  const at = DateTime.fromISO(day, { zone: 'utc' }).setLocale('en-US')
  return format !== null && at.isValid ? at.toFormat(format) : day
}

/** The latest moment a dose can have been given: a date alone may mean its last minute, so the interval is never overstated. */
function latestInstant(exposure: GadoliniumExposure, zone: string): DateTime | null {
  const instant = parseInstant(exposure.givenAt)
  // Most are full instants, and to read those in the zone of the department costs more than all the rest.
  if (instant !== null) return DateTime.fromMillis(instant, { zone: 'utc' })
  const start = DateTime.fromISO(exposure.givenAt, { zone })
  if (!start.isValid) return null
  return exposure.givenAt.includes('T') ? start : start.endOf('day')
}

function findInterval(context: SafetyContext): SafetyFinding[] {
  const { policy, kidney } = context
  if (!mayBeIntravenous(context)) return []
  const zone = policy.department.timeZone
  const at = DateTime.fromISO(context.at, { zone: 'utc' })
  const last = context.exposures
    // A month or year alone says nothing about hours.
    .filter(exposure => /^\d{4}-\d{2}-\d{2}/.test(exposure.givenAt))
    .flatMap((exposure) => {
      const instant = latestInstant(exposure, zone)
      return instant !== null && (instant <= at || instant.setZone(zone).startOf('day') <= at) ? [{ exposure, instant }] : []
    })
    .reduce<{ exposure: GadoliniumExposure, instant: DateTime } | null>((newest, one) => newest === null || one.instant > newest.instant ? one : newest, null)
  if (last === null) return []
  const hours = Math.max(0, at.diff(last.instant, 'hours').hours)
  // An unsteady creatinine counts as an eGFR below 30, and dialysis that is not ruled out counts as dialysis.
  const low = countsAsBelow(kidney, 30) || context.screening.dialysis === 'unknown'
  const middle = kidney.gateEgfr === null || kidney.gateEgfr <= 60
  const rule = low ? policy.repeatIntervalHours.value.below30 : middle ? policy.repeatIntervalHours.value.from30To60 : policy.repeatIntervalHours.value.above60
  if (hours >= rule.optimal) return []
  const band = low ? lowBand(context) : middle ? (kidney.gateEgfr === null ? 'an eGFR that is not known' : 'an eGFR of 30 to 60') : 'an eGFR above 60'
  const ago = `The last gadolinium dose was given ${agoWords(last.exposure, Math.floor(hours), context)}`
  const source = policy.repeatIntervalHours.source
  if (hours < rule.least) {
    return [finding({
      id: 'exposure-interval-under-least', topic: 'exposure', severity: 'hold',
      text: `${ago}. With ${band}, ${rule.optimal} hours are advised and ${rule.least} the least when urgent: a radiologist's word and a reason are needed.`,
      plain: 'You had contrast very recently. A doctor decides if more can be given now.',
      addsNeeds: ['radiologist-word'], asksRadiologist: true, source,
    })]
  }
  return [finding({
    id: 'exposure-interval-under-optimal', topic: 'exposure', severity: 'caution',
    text: `${ago}. With ${band}, ${rule.optimal} hours are advised, ${rule.least} the least when urgent.`,
    plain: 'You had contrast recently. We may wait a little before we give more.',
    source,
  })]
}

/** Why the longest interval applies, after "With". */
function lowBand({ kidney, screening }: SafetyContext): string {
  if (kidney.status === 'dialysis') return 'dialysis'
  if (screening.dialysis === 'unknown') return 'dialysis not ruled out'
  return isAcute(kidney.injury) ? 'an unsteady creatinine, which counts as an eGFR below 30' : 'an eGFR below 30'
}

/** "10 hours ago", "11 hours before the planned exam"; of a dose known by its day only no more hours are claimed than are sure. */
function agoWords({ givenAt }: GadoliniumExposure, hours: number, { planned }: SafetyContext): string {
  const count = hours === 1 ? '1 hour' : `${hours} hours`
  const until = planned ? `${count} before the planned exam` : `${count} ago`
  if (givenAt.includes('T')) return until
  return hours === 0 ? `on ${dayWords(givenAt)}, the hour not known` : `on ${dayWords(givenAt)}, at least ${until}`
}

function findEarlierDoses(context: SafetyContext): SafetyFinding[] {
  const { agents } = context
  const zone = context.policy.department.timeZone
  const distinct = distinctWithDays(context.exposures, zone)
  const exposures = distinct.map(({ dose }) => dose)
  if (exposures.length === 0) return []
  const known = exposures.filter(exposure => exposure.amountMmol !== null)
  const total = known.reduce((sum, exposure) => sum + (exposure.amountMmol ?? 0), 0)
  const dates = distinct.map(({ day }) => day).sort()
  const doses = exposures.length === 1 ? '1 earlier gadolinium dose' : `${exposures.length} earlier gadolinium doses`
  const amount = known.length === 0 ? (exposures.length === 1 ? 'amount not recorded' : 'amounts not recorded') : known.length === exposures.length
    ? `${total.toFixed(1)} mmol${exposures.length === 1 ? '' : ' in all'}`
    : `${total.toFixed(1)} mmol in the ${known.length} with an amount`
  const [first, last] = [dates[0] ?? '', dates.at(-1) ?? '']
  const span = first === last ? `${first.length < 10 ? 'in' : 'on'} ${dayWords(first)}` : `from ${dayWords(first)} to ${dayWords(last)}`
  const linear = exposures.filter(exposure => agents.find(agent => agent.id === exposure.agent)?.structure === 'linear')
  const findings = [finding({
    id: 'exposure-earlier-doses', topic: 'exposure', severity: 'info',
    text: `${doses} ${span}, ${amount}. No limit is published; a needed scan is not to be avoided on account of it.`,
    plain: 'You had contrast before. That is no reason to leave it out when it is needed.',
    source: safetySources.fdaRetention,
  })]
  if (linear.length > 0) {
    findings.push(finding({
      id: 'exposure-earlier-linear', topic: 'exposure', severity: 'info',
      text: `${exposures.length === 1 ? 'It was' : linear.length === 1 ? 'One of them was' : `${linear.length} of them were`} with a linear agent, which leaves more gadolinium behind: a macrocyclic agent is the better choice.`,
      plain: 'We choose the type of contrast that leaves the least behind.',
      source: safetySources.fdaRetention,
    }))
  }
  return findings
}
