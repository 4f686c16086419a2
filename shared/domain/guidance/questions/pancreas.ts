import type { ClinicalQuestion } from '../types'

/** Starter questions: pancreas; most common first. */
export const pancreasQuestions: ClinicalQuestion[] = [
  {
    id: 'pancreatic-cyst',
    region: 'pancreas',
    exam: 'MRI pancreas with MRCP',
    question: 'Pancreatic cyst: first look or follow-up?',
    plainQuestion: 'Can the cyst in my pancreas just be watched?',
    volume: 3,
    usualBranch: 1,
    deciders: [
      {
        id: 'stage',
        kind: 'choice',
        ask: 'Which applies?',
        options: [
          { id: 'first', label: 'First characterization' },
          { id: 'stable', label: 'Follow-up, stable so far, no worrying feature' },
          { id: 'worry', label: 'New symptom, growth, wide duct or nodule' },
        ],
      },
    ],
    branches: [
      {
        when: { stage: ['first', 'worry'] },
        contrast: 'iv-with-and-without',
        inShort: 'the first look and any change need nodules and solid parts judged',
        because: 'Enhancing nodules and solid parts mark risk, so the first and any changed study should be complete.',
        plain: 'Contrast shows if there is solid tissue in the cyst.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'cyst size and duct width show on MRCP and diffusion images',
        because: 'Size and duct width on MRCP with diffusion drive follow-up; unenhanced short protocols have performed well. Some guidance still lists contrast for follow-up, so local policy should say which applies.',
        plain: 'The cyst is bright on plain MRI pictures. Its size can be tracked without contrast.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Pancreatic Cyst',
        body: 'American College of Radiology',
        year: 2020,
        status: 'confirmed',
      },
      {
        title: 'Cost-effective diagnostic algorithm for IPMN (review of unenhanced abbreviated MRI)',
        body: 'review article, online encyclopedia copy',
        year: null,
        status: 'confirmed',
      },
    ],
    commonError: 'Yearly contrast for a small stable cyst without asking.',
    alternatives: 'If contrast cannot be given: MRCP with diffusion; endoscopic ultrasound.',
    searchWords: [
      'IPMN', 'pancreas cyst', 'side branch IPMN', 'BD-IPMN', 'pancreatic cystic lesion', 'mucinous cyst', 'MCN',
      'pancreatic lesion', 'cystic pancreas',
    ],
  },
  {
    id: 'pancreatic-mass',
    region: 'pancreas',
    exam: 'MRI pancreas',
    question: 'Pancreatic mass or unexplained duct cutoff?',
    plainQuestion: 'Do I have a growth in my pancreas?',
    volume: 2,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'iv-with-and-without',
        inShort: 'a pancreatic tumor shows by enhancing less or more than the gland',
        because: 'Adenocarcinoma enhances less and neuroendocrine tumor more than the gland; timing matters.',
        plain: 'Contrast makes a growth stand out from normal pancreas.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Jaundice',
        body: 'American College of Radiology',
        year: 2012,
        status: 'confirmed',
      },
    ],
    commonError: 'Ordering MRCP alone, which shows the ducts but not the mass.',
    alternatives: 'Endoscopic ultrasound; pancreas-protocol CT; diffusion MRI without contrast.',
    searchWords: [
      'pancreatic cancer', 'pancreas tumor', 'PDAC', 'neuroendocrine', 'PNET', 'insulinoma', 'duct cutoff',
      'double duct sign', 'pancreatic ca', 'painless jaundice',
    ],
  },
  {
    id: 'pancreatitis',
    region: 'pancreas',
    exam: 'MRI pancreas with MRCP',
    question: 'Acute or chronic pancreatitis: cause or complication?',
    plainQuestion: 'What is causing my pancreatitis, and are there problems from it?',
    volume: 2,
    usualBranch: 0,
    deciders: [
      {
        id: 'aim',
        kind: 'choice',
        ask: 'What is the aim?',
        options: [
          { id: 'cause', label: 'Cause: stone, duct variant, chronic duct change' },
          { id: 'complication', label: 'Necrosis, vessel problem, or possible hidden cancer' },
        ],
      },
    ],
    branches: [
      {
        when: { aim: ['cause'] },
        contrast: 'none',
        inShort: 'stones and duct changes show on MRCP unaided',
        because: 'Stones, duct anatomy and chronic duct change are seen on MRCP, with secretin if offered. A first unexplained attack after about age 40 raises hidden cancer: choose the other answer.',
        plain: 'The ducts show well without contrast.',
      },
      {
        when: {},
        contrast: 'iv-with-and-without',
        inShort: 'dead tissue, vessel damage and hidden cancer need a contrast phase',
        because: 'Non-enhancing pancreas defines necrosis, and vessels and masses need a contrast phase.',
        plain: 'Contrast shows parts of the pancreas that have lost blood supply.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Acute Pancreatitis',
        body: 'American College of Radiology',
        year: 2019,
        status: 'confirmed',
      },
    ],
    commonError: 'Adding contrast when only stones or duct anatomy are in question.',
    alternatives: 'T2 and diffusion without contrast show collections and debris well.',
    searchWords: [
      'pancreatitis', 'acute pancreatitis', 'chronic pancreatitis', 'necrosis', 'pseudocyst', 'pancreas divisum',
      'lipase', 'secretin', 'walled-off necrosis', 'pancreatitus',
    ],
  },
]
