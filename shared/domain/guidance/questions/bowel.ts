import type { ClinicalQuestion } from '../types'

/** Starter questions: bowel; most common first. */
export const bowelQuestions: ClinicalQuestion[] = [
  {
    id: 'crohn-enterography',
    region: 'bowel',
    exam: 'MR enterography',
    question: 'Crohn disease: activity, stricture or complication?',
    plainQuestion: 'Is my Crohn disease active?',
    volume: 3,
    usualBranch: 1,
    deciders: [
      {
        id: 'repeat',
        kind: 'yesno',
        ask: 'Is it repeat monitoring of a known segment with no suspected abscess or fistula?',
      },
    ],
    branches: [
      {
        when: { repeat: ['yes'] },
        contrast: 'discuss',
        inShort: 'T2 and diffusion may be enough for repeat scans of a known segment',
        because: 'T2 and diffusion grade activity well in a known segment, so contrast may be left out in patients who will have many scans; departments differ.',
        plain: 'You may not need contrast for this check. The radiologist will decide.',
      },
      {
        when: {},
        contrast: 'iv-with-and-without',
        inShort: 'active wall, abscess and fistula show best by enhancement',
        because: 'Mural enhancement, abscess, fistula and stricture type are shown best with contrast at baseline and when a complication is suspected.',
        plain: 'Contrast shows which part of the bowel is inflamed and if there is pus.',
      },
    ],
    sources: [
      {
        title: 'Magnetic resonance enterography for the evaluation of the deep small intestine in Crohn disease (review)',
        body: 'Intestinal Research',
        year: 2016,
        status: 'confirmed',
      },
      {
        title: 'ECCO-ESGAR guideline for diagnostic assessment in inflammatory bowel disease',
        body: 'ECCO and ESGAR',
        year: 2019,
        status: 'from memory',
      },
      {
        title: 'Consensus recommendations on CT and MR enterography in small bowel Crohn disease',
        body: 'SAR, SPR and AGA',
        year: 2018,
        status: 'from memory',
      },
    ],
    commonError: 'Forgetting the oral fluid that distends the bowel.',
    alternatives: 'Intestinal ultrasound; diffusion MR enterography without contrast.',
    searchWords: [
      'Crohn', 'Crohns', 'chrons', 'IBD', 'MRE', 'MR enterography', 'enterography', 'small bowel',
      'terminal ileitis', 'stricture', 'inflammatory bowel disease',
    ],
  },
  {
    id: 'perianal-fistula',
    region: 'bowel',
    exam: 'MRI pelvis, fistula protocol',
    question: 'Perianal fistula or abscess: where does it run?',
    plainQuestion: 'Where does my fistula go?',
    volume: 2,
    usualBranch: 0,
    deciders: [
      {
        id: 'checkOnly',
        kind: 'yesno',
        ask: 'Is it a repeat check of a mapped tract with no suspected abscess?',
      },
    ],
    branches: [
      {
        when: { checkOnly: ['yes'] },
        contrast: 'none',
        inShort: 'a mapped tract is followed on T2 and diffusion images',
        because: 'Tract length and fluid are followed on fat-suppressed T2 and diffusion.',
        plain: 'MRI pictures without contrast can track a known tunnel.',
      },
      {
        when: {},
        contrast: 'iv-with-and-without',
        inShort: 'enhancement separates pus from healing tissue',
        because: 'Enhancement separates pus from granulation tissue and active tract from scar; T2 without contrast is a workable second best.',
        plain: 'Contrast shows pus that may need draining.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Anorectal Disease',
        body: 'American College of Radiology',
        year: 2021,
        status: 'confirmed',
      },
    ],
    commonError: 'Ordering a general pelvis MRI, which is not angled along the anal canal.',
    alternatives: 'T2 with diffusion; endoanal ultrasound.',
    searchWords: [
      'anal fistula', 'fistula in ano', 'perianal abscess', 'seton', 'perirectal abscess', 'Crohn fistula',
      'perianal', 'fissure',
    ],
  },
  {
    id: 'rectal-cancer-staging',
    region: 'bowel',
    exam: 'MRI rectum',
    question: 'Rectal cancer: staging or restaging?',
    plainQuestion: 'How far has my rectal cancer grown?',
    volume: 2,
    usualBranch: 1,
    deciders: [
      {
        id: 'recurrence',
        kind: 'yesno',
        ask: 'Is pelvic recurrence after surgery, or an anal cancer, the question?',
      },
    ],
    branches: [
      {
        when: { recurrence: ['yes'] },
        contrast: 'iv-with-and-without',
        inShort: 'enhancement helps tell recurrence from scar',
        because: 'Enhancement helps tell fibrosis from recurrence. Local choice: for anal cancer contrast is optional.',
        plain: 'Contrast helps tell scar from new growth.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'high-resolution T2 and diffusion images stage rectal cancer unaided',
        because: 'High-resolution T2 in three planes with diffusion is the staging study; expert consensus does not advise routine contrast. Local choice: some departments add contrast for mucinous tumors.',
        plain: 'Sharp plain MRI pictures show the layers of the bowel wall. Contrast does not improve them.',
      },
    ],
    sources: [
      {
        title: 'MRI for clinical management of rectal cancer: 2016 consensus meeting',
        body: 'ESGAR',
        year: 2018,
        status: 'confirmed',
      },
    ],
    commonError: 'Ordering rectal staging MRI with contrast.',
    alternatives: 'If contrast cannot be given: T2 with diffusion; PET/CT for recurrence.',
    searchWords: [
      'rectal cancer', 'rectal ca', 'rectum', 'CRM', 'mesorectal', 'TNT', 'watch and wait', 'rectal staging',
      'anal cancer', 'colorectal', 'EMVI', 'restaging',
    ],
  },
  {
    id: 'appendicitis-pregnancy',
    region: 'bowel',
    exam: 'MRI abdomen and pelvis',
    question: 'Pregnant with right lower abdominal pain: appendicitis?',
    plainQuestion: 'I am pregnant. Do I have appendicitis?',
    volume: 2,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'none',
        inShort: 'plain MRI finds appendicitis as well and gadolinium is avoided in pregnancy',
        because: 'Non-contrast MRI is as accurate as contrast MRI for appendicitis, and gadolinium is avoided in pregnancy.',
        plain: 'MRI can check your appendix without contrast. Your baby is not exposed to it.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Right Lower Quadrant Pain, Suspected Appendicitis',
        body: 'American College of Radiology',
        year: 2018,
        status: 'confirmed',
      },
      {
        title: 'MRI for appendicitis: meta-analysis (non-contrast as accurate as contrast)',
        body: 'American Journal of Roentgenology',
        year: 2016,
        status: 'confirmed',
      },
      {
        title: 'Association between MRI exposure during pregnancy and fetal and childhood outcomes',
        body: 'JAMA',
        year: 2016,
        status: 'confirmed',
      },
    ],
    commonError: 'Reaching for contrast or delaying surgery to discuss it.',
    alternatives: 'Ultrasound first; if MRI is not available in time, CT is preferable to a missed perforation.',
    searchWords: [
      'pregnant appendicitis', 'RLQ pain', 'appendix', 'appy', 'right lower quadrant', 'appendisitis',
      'pregnancy belly pain',
    ],
  },
]
