import type { Source } from '../source'

/** The publications that safety findings rest on, each with how far it was checked. */
export const safetySources = {
  acrNkf: {
    title: 'Use of intravenous gadolinium-based contrast media in patients with kidney disease, Radiology 298:28',
    body: 'American College of Radiology and National Kidney Foundation', year: 2021, status: 'confirmed',
  },
  acrManual: { title: 'ACR Manual on Contrast Media', body: 'American College of Radiology', year: 2024, status: 'from memory' },
  acrReactions: {
    title: 'ACR Manual on Contrast Media: reactions and premedication', body: 'American College of Radiology', year: 2024, status: 'from memory',
  },
  usLabels: {
    title: 'US prescribing information, gadolinium-based contrast agents', body: 'US Food and Drug Administration', year: 2026, status: 'confirmed',
  },
  fdaRetention: {
    title: 'Class warning on gadolinium retention and Medication Guides', body: 'US Food and Drug Administration', year: 2018, status: 'confirmed',
  },
  acogPregnancy: {
    title: 'Committee Opinion 723: diagnostic imaging during pregnancy and lactation',
    body: 'American College of Obstetricians and Gynecologists', year: 2017, status: 'confirmed',
  },
  acrLactation: {
    title: 'ACR Manual on Contrast Media: breastfeeding', body: 'American College of Radiology', year: 2024, status: 'confirmed',
  },
  esurIntervals: {
    title: 'Waiting times between contrast doses, Eur Radiol 34:2512', body: 'European Society of Urogenital Radiology', year: 2024, status: 'from memory',
  },
  kdigoInjury: {
    title: 'Clinical Practice Guideline for Acute Kidney Injury', body: 'KDIGO', year: 2012, status: 'confirmed',
  },
  dialysisTiming: {
    title: 'Gadolinium in kidney disease: timing of dialysis', body: 'Cleveland Clinic Journal of Medicine, after the ACR', year: null, status: 'confirmed',
  },
  practice: { title: 'Everyday practice in MRI departments', body: 'No single source', year: null, status: 'common practice' },
  joints: { title: 'MR arthrography: total gadolinium in a joint', body: 'No single source', year: null, status: 'common practice' },
} as const satisfies Record<string, Source>
