import { evaluateKidney } from '#shared/domain/kidney/evaluate'
import { chooseCreatinine } from '#shared/domain/kidney/creatinine'
import type { GfrEstimate, KidneyFunction } from '#shared/domain/kidney/types'
import type { KidneyScreening } from '#shared/domain/kidney/validity'
import { starterPolicy } from '#shared/domain/policy/defaults'
import type { RecordPart, RecordPartName, RecordPatient, RecordReading, ScreeningHint } from '#shared/domain/record/types'

/** One creatinine as it was found, and what became of it. */
export interface SeenCreatinine {
  observationId: string
  value: number | null
  comparator: string | null
  unit: string | null
  /** UTC; null where unknown. */
  collectedAt: string | null
  /** As sent. */
  collectedText: string | null
  precision: 'instant' | 'day' | 'unknown'
  status: string
  used: boolean
  /** Why it is not the one used; null for the one used. */
  passedOver: string | null
}

export interface ReportedEgfr {
  /** What a screen shows. */
  display: string
  value: number
  unit: 'mL/min/1.73 m2'
  bound: GfrEstimate['bound']
  equation: string
  equationLabel: string
  ageYears: number
  stage: string
}

/** What `ehr:read` prints for one patient. */
export interface KidneyReport {
  answer: 'complete' | 'incomplete' | 'unreachable' | 'not-found' | 'ambiguous'
  complete: boolean
  readAt: string
  /** Zone that plain dates were read in. */
  zone: string
  since: string | null
  patient: RecordPatient | null
  /** Where several fit: a person chooses, by Patient/id. */
  candidates: RecordPatient[]
  used: {
    observationId: string
    mgPerDl: number
    umolPerL: number
    comparator: string | null
    collectedAt: string
    ageDays: number
    value: number | null
    unit: string | null
  } | null
  egfr: ReportedEgfr | null
  /** A second equation, shown beside the main one. */
  beside: ReportedEgfr | null
  /** Where sex is not known: both. */
  egfrRange: { low: ReportedEgfr, high: ReportedEgfr } | null
  status: KidneyFunction['status']
  headline: string
  flags: { id: string, text: string }[]
  creatinine: SeenCreatinine[]
  cystatinC: SeenCreatinine[]
  laboratoryEgfr: RecordReading['laboratoryEgfr']
  height: RecordReading['height']
  weight: RecordReading['weight']
  parts: Record<RecordPartName, RecordPart> | null
}

export interface ReportTerms { zone: string, since: string | null }

/** A report with no reading behind it: the patient was not found, is not the only one, or the server did not answer. */
export function emptyReport(answer: KidneyReport['answer'], headline: string, { zone, since }: ReportTerms, readAt: string, candidates: RecordPatient[] = []): KidneyReport {
  return {
    answer, complete: false, readAt, zone, since, patient: null, candidates, used: null, egfr: null, beside: null, egfrRange: null,
    status: answer === 'unreachable' ? 'could-not-look' : 'not-looked', headline, flags: [], creatinine: [], cystatinC: [],
    laboratoryEgfr: [], height: null, weight: null, parts: null,
  }
}

/** Everything one reading says about the kidneys, for a hospital that checks its connection. */
export function kidneyReport(reading: RecordReading, terms: ReportTerms): KidneyReport {
  if (reading.parts.patient.state === 'none') return emptyReport('not-found', 'The hospital record has no such patient', terms, reading.readAt)
  const kidney = evaluateKidney({
    now: reading.readAt,
    plannedAt: null,
    patient: {
      birthDate: reading.patient?.birthDate ?? '',
      sex: reading.patient?.sex ?? 'unknown',
      heightCm: reading.height?.cm ?? null,
      heightAt: reading.height?.at ?? null,
    },
    readings: reading.readings,
    record: { state: reading.state },
    screening: screeningOf(reading.hints),
    setting: 'outpatient',
    policy: { ...starterPolicy, department: { ...starterPolicy.department, timeZone: terms.zone } },
  })
  const chosen = kidney.creatinine
  return {
    answer: reading.state,
    complete: reading.state === 'complete',
    readAt: reading.readAt,
    zone: terms.zone,
    since: terms.since,
    patient: reading.patient,
    candidates: [],
    used: chosen && {
      observationId: chosen.reading.id,
      mgPerDl: chosen.mgPerDl,
      umolPerL: chosen.umolPerL,
      comparator: chosen.comparator,
      collectedAt: chosen.collectedAt,
      ageDays: chosen.ageDays,
      value: chosen.reading.value,
      unit: chosen.reading.unit,
    },
    egfr: kidney.egfr && reported(kidney.egfr),
    beside: kidney.beside && reported(kidney.beside),
    egfrRange: kidney.range && { low: reported(kidney.range.low), high: reported(kidney.range.high) },
    status: kidney.status,
    headline: kidney.headline,
    flags: flagsOf(reading, kidney),
    creatinine: seen(reading, kidney, 'creatinine'),
    cystatinC: seen(reading, kidney, 'cystatin-c'),
    laboratoryEgfr: reading.laboratoryEgfr,
    height: reading.height,
    weight: reading.weight,
    parts: reading.parts,
  }
}

function reported(estimate: GfrEstimate): ReportedEgfr {
  const { display, value, bound, equation, equationLabel, ageYears, stage } = estimate
  return { display, value, unit: 'mL/min/1.73 m2', bound, equation, equationLabel, ageYears, stage }
}

/** What the record suggests stands in for answers nobody was asked; the flags name it. */
function screeningOf(hints: readonly ScreeningHint[]): KidneyScreening {
  const screening: KidneyScreening = {
    kidneyDisease: null, kidneyRiskFactor: null, dialysis: null, acuteIllness: null, liverDisease: null, pregnancy: null,
  }
  for (const hint of hints) {
    if (hint.field === 'dialysis') screening.dialysis = hint.value
    if (hint.field === 'kidneyDisease') screening.kidneyDisease = hint.value
    if (hint.field === 'kidneyRiskFactor') screening.kidneyRiskFactor = hint.value
    if (hint.field === 'acuteIllness') screening.acuteIllness = hint.value
    if (hint.field === 'liverDisease') screening.liverDisease = hint.value
    if (hint.field === 'pregnancy') screening.pregnancy = hint.value
  }
  return screening
}

const kidneyHints = ['dialysis', 'kidneyDisease', 'kidneyRiskFactor', 'acuteIllness', 'pregnancy']

function flagsOf(reading: RecordReading, kidney: KidneyFunction): KidneyReport['flags'] {
  const injury = ['aki', 'aki-presumed', 'recent-aki'].includes(kidney.injury.status) ? [{ id: kidney.injury.status, text: kidney.injury.text }] : []
  return [
    ...reading.warnings,
    ...injury,
    ...kidney.cautions.map(({ id, text }) => ({ id, text })),
    ...reading.hints.filter(({ field }) => kidneyHints.includes(field)).map(({ field, because }) => ({ id: `record-${field}`, text: because })),
    ...(chooseCreatinine(reading.readings, reading.readAt).tenfoldJump
      ? [{ id: 'tenfold-jump', text: 'Neighboring creatinine results differ more than tenfold; a unit may be wrong' }]
      : []),
  ]
}

function seen(reading: RecordReading, kidney: KidneyFunction, analyte: 'creatinine' | 'cystatin-c'): SeenCreatinine[] {
  const chosen = kidney.creatinine?.reading
  return reading.readings.filter(entry => entry.analyte === analyte).map((entry) => {
    const used = analyte === 'creatinine' ? entry === chosen : kidney.egfr?.equation === 'ckd-epi-2021-cr-cys' && !reasonFor(entry)
    return {
      observationId: entry.id,
      value: entry.value,
      comparator: entry.comparator,
      unit: entry.unit,
      collectedAt: entry.collectedAt,
      collectedText: entry.collectedText,
      precision: entry.precision,
      status: entry.status,
      used,
      passedOver: used ? null : reasonFor(entry) ?? (analyte === 'creatinine' ? 'Older than the one used' : 'Not used for this estimate'),
    }
  })

  function reasonFor(entry: RecordReading['readings'][number]): string | null {
    return kidney.passedOver.find(passed => passed.reading === entry)?.reason
      ?? kidney.passedOver.find(passed => passed.reading.id === entry.id && passed.reading.status === entry.status)?.reason
      ?? null
  }
}
