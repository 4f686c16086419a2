import type { Source } from '../source'
import type { Policy } from './types'

const asOf = '2026-01-01'

const local: Source = { title: 'Department setting', body: 'Northshore Imaging', year: 2026, status: 'local' }
const practice: Source = { title: 'Everyday practice in MRI departments', body: 'No single source', year: null, status: 'common practice' }
const acrManual: Source = {
  title: 'ACR Manual on Contrast Media', body: 'American College of Radiology', year: 2024, status: 'from memory',
}
const usLabels: Source = {
  title: 'US prescribing information, gadolinium-based contrast agents', body: 'US Food and Drug Administration', year: 2026, status: 'confirmed',
}

/**
 * The policy the seed loads for the invented department "Northshore Imaging".
 * Every setting is a starting value to be reviewed by the department; screens show its source and date beside it.
 */
export const starterPolicy: Policy = {
  version: '2026.1',
  department: {
    name: 'Northshore Imaging',
    timeZone: 'America/Chicago',
    phone: '555 0142',
    callHours: 'Monday to Friday, 8 in the morning to 5 in the afternoon',
    address: '200 Harbor Road, Northshore',
  },
  kidneyPosition: {
    value: 'acr',
    source: { ...acrManual, title: 'ACR Manual on Contrast Media: nephrogenic systemic fibrosis', status: 'confirmed' },
    asOf,
  },
  holdBelowEgfr: { value: 30, source: practice, asOf },
  creatinineWindowDays: {
    value: { noRiskFactor: null, riskFactorStable: 42, egfr30To59: 14, egfrBelow30: 7, acute: 2 },
    source: { ...local, title: 'Department setting, shaped by older ACR tables' },
    asOf,
  },
  ageRiskAboveYears: { value: 60, source: usLabels, asOf },
  pregnancyAskedAges: { value: { from: 11, to: 55 }, source: local, asOf },
  premedicationLeadHours: {
    value: { oral: 13, accelerated: 5 },
    source: { ...acrManual, title: 'ACR Manual on Contrast Media: premedication' },
    asOf,
  },
  dialysisWithinHours: { value: 24, source: local, asOf },
  weightLimitsKg: { value: { low: 2.5, high: 140 }, source: usLabels, asOf },
  observationMinutes: {
    value: 30,
    source: { title: 'Product information, gadobutrol', body: 'Health Products Regulatory Authority', year: null, status: 'confirmed' },
    asOf,
  },
  repeatIntervalHours: {
    value: {
      above60: { optimal: 12, least: 4 },
      from30To60: { optimal: 48, least: 16 },
      below30: { optimal: 168, least: 60 },
    },
    source: {
      title: 'ESUR Contrast Media Safety Committee: waiting times between doses, Eur Radiol 34:2512',
      body: 'European Society of Urogenital Radiology', year: 2024, status: 'from memory',
    },
    asOf,
  },
  stockedAgents: { value: ['gadobutrol', 'gadoterate', 'gadoxetate'], source: local, asOf },
  acrGroups: {
    value: {
      gadobutrol: 'II', gadoterate: 'II', gadoteridol: 'II', gadopiclenol: 'II', gadobenate: 'II', gadoxetate: 'II',
      gadopentetate: 'I', gadodiamide: 'I', gadoversetamide: 'I', gadofosveset: 'not listed',
    },
    source: { ...acrManual, title: 'ACR Manual on Contrast Media: agent groups, with the April 2024 changes' },
    asOf: '2024-04-01',
  },
  cannula: { value: { usualGauge: '22 G', powerGauge: '20 G' }, source: practice, asOf },
  decisionWithinMinutes: { value: { routine: 2880, urgent: 240, asap: 120, stat: 60 }, source: local, asOf },
  bookWithinDays: { value: 5, source: local, asOf },
  examMinutes: { value: { base: 30, ivStart: 10, joint: 30, liver: 20 }, source: practice, asOf },
  links: { value: { validDays: 30, birthDateTries: 5 }, source: local, asOf },
}
