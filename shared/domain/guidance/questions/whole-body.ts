import type { ClinicalQuestion } from '../types'

/** Starter questions: whole body; most common first. */
export const wholeBodyQuestions: ClinicalQuestion[] = [
  {
    id: 'cancer-predisposition-whole-body',
    region: 'whole body',
    exam: 'Whole-body MRI',
    question: 'Cancer predisposition (such as Li-Fraumeni): screening?',
    plainQuestion: 'Is there anything in my body that should be checked early?',
    volume: 1,
    usualBranch: 1,
    deciders: [
      {
        id: 'firstBrain',
        kind: 'yesno',
        ask: 'Is the first dedicated brain MRI included in the same visit?',
      },
    ],
    branches: [
      {
        when: { firstBrain: ['yes'] },
        contrast: 'iv-with-and-without',
        inShort: 'the first brain study needs enhancement and the body part does not',
        because: 'The first brain study uses contrast; the whole-body part does not.',
        plain: 'Contrast is used for the first brain pictures only.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'yearly whole-body screening rests on STIR and diffusion images',
        because: 'Whole-body screening uses STIR, Dixon and diffusion without contrast, since it is repeated every year. Local choice: whether contrast adds to the whole-body part is not settled.',
        plain: 'You will have this scan every year, so no contrast is used.',
      },
    ],
    sources: [
      {
        title: 'Whole-body MRI: technique, guidelines and key applications',
        body: 'ecancermedicalscience',
        year: 2021,
        status: 'from memory',
      },
    ],
    commonError: 'Yearly gadolinium in a young screening population.',
    alternatives: 'If contrast cannot be given: high-resolution brain MRI with diffusion and FLAIR.',
    searchWords: [
      'Li-Fraumeni', 'LFS', 'TP53', 'cancer syndrome', 'NF1', 'hereditary paraganglioma', 'SDHB', 'WB-MRI',
      'genetic cancer risk', 'Toronto protocol',
    ],
  },
  {
    id: 'lymphoma-whole-body',
    region: 'whole body',
    exam: 'Whole-body MRI with diffusion',
    question: 'Lymphoma: staging where PET/CT is not suitable?',
    plainQuestion: 'Where is my lymphoma?',
    volume: 1,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'none',
        inShort: 'diffusion shows nodes and marrow where PET/CT is not suitable',
        because: 'Diffusion shows nodal and marrow disease; PET/CT remains the standard for FDG-avid types.',
        plain: 'Plain whole-body pictures show the swollen glands.',
      },
    ],
    sources: [
      {
        title: 'Lugano classification: staging and response in lymphoma',
        body: 'Journal of Clinical Oncology',
        year: 2014,
        status: 'from memory',
      },
      {
        title: 'Whole-body MRI: technique, guidelines and key applications',
        body: 'ecancermedicalscience',
        year: 2021,
        status: 'from memory',
      },
    ],
    commonError: 'Adding contrast to whole-body diffusion, where it is seldom needed.',
    alternatives: 'PET/CT.',
    searchWords: [
      'lymphoma', 'Hodgkin', 'DLBCL', 'non-Hodgkin', 'NHL', 'staging', 'lymph nodes', 'pregnant lymphoma', 'WB-MRI',
    ],
  },
  {
    id: 'crmo-whole-body',
    region: 'whole body',
    exam: 'Whole-body MRI, STIR',
    question: 'Child or adult with suspected chronic multifocal bone inflammation?',
    plainQuestion: 'Where are my bones inflamed?',
    volume: 1,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'none',
        inShort: 'STIR images map every active bone, silent ones too',
        because: 'STIR maps active sites, many of them silent.',
        plain: 'MRI pictures without contrast show all the inflamed spots.',
      },
    ],
    sources: [
      {
        title: 'Common practice',
        body: 'trade practice, no single published source',
        year: null,
        status: 'common practice',
      },
    ],
    commonError: 'Adding contrast, or imaging only the painful site.',
    alternatives: null,
    searchWords: [
      'CRMO', 'CNO', 'SAPHO', 'chronic nonbacterial osteomyelitis', 'multifocal osteomyelitis', 'bone inflammation',
    ],
  },
]
