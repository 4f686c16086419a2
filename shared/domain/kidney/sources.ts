import type { Source } from '../source'

/** Where the statements about kidney function come from; each finding, caution and window names one of these. */
export const kidneySources = {
  ckdEpi2021: { title: 'New creatinine- and cystatin C-based equations to estimate GFR without race', body: 'Inker et al., N Engl J Med 385:1737', year: 2021, status: 'confirmed' },
  ckidU25: { title: 'Age- and sex-dependent CKiD U25 equations', body: 'Pierce et al., Kidney Int 99:948', year: 2021, status: 'confirmed' },
  kdigoAki: { title: 'Clinical Practice Guideline for Acute Kidney Injury', body: 'KDIGO', year: 2012, status: 'confirmed' },
  kdigoCkd: { title: 'Clinical Practice Guideline for the Evaluation and Management of CKD', body: 'KDIGO', year: 2024, status: 'from memory' },
  acrManual: { title: 'Manual on Contrast Media', body: 'American College of Radiology', year: null, status: 'from memory' },
  equationLimits: { title: 'GFR equations for adults: when they mislead', body: 'National Institute of Diabetes and Digestive and Kidney Diseases', year: null, status: 'confirmed' },
  reading: { title: 'How laboratory results are read', body: 'Department convention', year: null, status: 'local' },
} as const satisfies Record<string, Source>
