import type { ClinicalQuestion } from '../types'

/** Starter questions: liver; most common first. */
export const liverQuestions: ClinicalQuestion[] = [
  {
    id: 'liver-lesion-characterize',
    region: 'liver',
    exam: 'MRI liver, multiphase',
    question: 'Liver lesion found on ultrasound or CT: what is it?',
    plainQuestion: 'What is the spot on my liver?',
    volume: 4,
    usualBranch: 1,
    deciders: [
      {
        id: 'fnhAdenoma',
        kind: 'yesno',
        ask: 'Is the question focal nodular hyperplasia against adenoma (young adult, healthy liver)?',
      },
    ],
    branches: [
      {
        when: { fnhAdenoma: ['yes'] },
        contrast: 'iv-hepatobiliary',
        inShort: 'a liver agent stays in focal nodular hyperplasia and leaves most adenomas',
        because: 'Hyperplasia keeps a liver-specific agent in the late phase while most adenomas do not.',
        plain: 'A liver contrast is used. Some harmless spots hold it and others do not.',
      },
      {
        when: {},
        contrast: 'iv-with-and-without',
        inShort: 'the timing of enhancement names the liver lesion',
        because: 'Hemangioma, metastasis and hepatocellular carcinoma are named by arterial, portal and delayed enhancement; non-contrast images settle only simple cysts and fat.',
        plain: 'Contrast is watched as it flows through the spot. The pattern tells what it is.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Liver Lesion, Initial Characterization',
        body: 'American College of Radiology',
        year: 2020,
        status: 'confirmed',
      },
      {
        title: 'ESGAR consensus statement on liver MRI and liver-specific contrast agents',
        body: 'ESGAR',
        year: 2016,
        status: 'from memory',
      },
    ],
    commonError: 'Non-contrast liver MRI to characterize a solid lesion.',
    alternatives: 'Contrast ultrasound; T2 and diffusion without contrast settle cysts and typical hemangioma.',
    searchWords: [
      'liver mass', 'hepatic lesion', 'hepatic mass', 'hemangioma', 'FNH', 'adenoma', 'liver spot', 'liver nodule',
      'indeterminate liver lesion', 'liver cyst', 'Eovist', 'incidental liver lesion',
    ],
  },
  {
    id: 'hcc-cirrhosis',
    region: 'liver',
    exam: 'MRI liver, multiphase',
    question: 'Cirrhosis or chronic hepatitis B: nodule, or response after treatment?',
    plainQuestion: 'What is the spot in my liver, or has treatment worked?',
    volume: 3,
    usualBranch: 0,
    deciders: [
      {
        id: 'aim',
        kind: 'choice',
        ask: 'What is the aim?',
        options: [
          { id: 'diagnose', label: 'Diagnose a nodule or raised AFP' },
          { id: 'treated', label: 'Check a treated tumor' },
          { id: 'surveillance', label: 'Routine surveillance, ultrasound inadequate' },
        ],
      },
    ],
    branches: [
      {
        when: { aim: ['diagnose', 'treated'] },
        contrast: 'iv-with-and-without',
        inShort: 'early enhancement proves liver cancer and shows what treatment left behind',
        because: 'Diagnosis without biopsy rests on arterial enhancement with washout and a capsule; viability after ablation is residual enhancement.',
        plain: 'Contrast shows how blood moves through the spot. The pattern can give an answer without a biopsy.',
      },
      {
        when: {},
        contrast: 'discuss',
        inShort: 'short surveillance MRI exists with and without a liver agent',
        because: 'Surveillance is by ultrasound; where it fails, abbreviated MRI exists with or without a liver-specific agent and departments differ.',
        plain: 'Your team will choose between a short scan with or without contrast.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Liver Lesion, Initial Characterization',
        body: 'American College of Radiology',
        year: 2020,
        status: 'confirmed',
      },
      {
        title: 'LI-RADS CT/MRI core document (imaging technique)',
        body: 'American College of Radiology',
        year: 2018,
        status: 'from memory',
      },
    ],
    commonError: 'Non-contrast MRI to diagnose a nodule in cirrhosis.',
    alternatives: 'Multiphase CT; contrast ultrasound.',
    searchWords: [
      'HCC', 'hepatocellular carcinoma', 'hepatoma', 'cirrhosis', 'LI-RADS', 'LIRADS', 'AFP', 'hepatitis B', 'HBV',
      'hep C', 'HCV', 'TACE', 'ablation', 'Y90', 'liver cancer', 'cirosis', 'liver transplant list',
    ],
  },
  {
    id: 'liver-metastases-presurgical',
    region: 'liver',
    exam: 'MRI liver, hepatobiliary',
    question: 'Liver metastases: how many before surgery or ablation?',
    plainQuestion: 'How many spots are on my liver before my operation?',
    volume: 2,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'iv-hepatobiliary',
        inShort: 'metastases stand out where liver tissue takes up the agent',
        because: 'Metastases do not take up a liver-specific agent and stand out in the 20-minute phase; with diffusion this is the most sensitive combination.',
        plain: 'A liver contrast makes healthy liver bright, so even tiny spots show.',
      },
    ],
    sources: [
      {
        title: 'ESGAR consensus statement on liver MRI and liver-specific contrast agents',
        body: 'ESGAR',
        year: 2016,
        status: 'confirmed',
      },
    ],
    commonError: 'Repeating CT when the surgical plan depends on small lesions.',
    alternatives: 'Diffusion-weighted non-contrast MRI; contrast ultrasound during surgery.',
    searchWords: [
      'liver mets', 'hepatic metastases', 'colorectal mets', 'CRLM', 'metastasis', 'liver resection', 'Eovist',
      'Primovist', 'gadoxetate', 'ablation planning',
    ],
  },
  {
    id: 'liver-fat-iron-stiffness',
    region: 'liver',
    exam: 'MRI liver, fat, iron and elastography',
    question: 'How much fat, iron or scarring is in the liver?',
    plainQuestion: 'How much fat or scarring is in my liver?',
    volume: 2,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'none',
        inShort: 'fat, iron and stiffness are measured without any enhancement',
        because: 'Fat fraction, R2* and stiffness are measured from physics, not enhancement.',
        plain: 'The scanner measures fat, iron and stiffness without contrast.',
      },
    ],
    sources: [
      {
        title: 'Quantification of liver fat content with CT and MRI: state of the art',
        body: 'Radiology',
        year: 2021,
        status: 'confirmed',
      },
      {
        title: 'Common practice',
        body: 'trade practice, no single published source',
        year: null,
        status: 'common practice',
      },
    ],
    commonError: 'Adding contrast to a measurement study.',
    alternatives: null,
    searchWords: [
      'fatty liver', 'NAFLD', 'MASLD', 'NASH', 'MASH', 'steatosis', 'MRE', 'elastography', 'PDFF', 'hemochromatosis',
      'fibrosis', 'iron overload', 'liver stiffness', 'ferritin',
    ],
  },
]
