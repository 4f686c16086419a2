import type { ClinicalQuestion } from '../types'

/** Starter questions: biliary; most common first. */
export const biliaryQuestions: ClinicalQuestion[] = [
  {
    id: 'mrcp-bile-duct-stones',
    region: 'biliary',
    exam: 'MRCP',
    question: 'Dilated duct, pain or abnormal liver tests: stone in the bile duct?',
    plainQuestion: 'Is a gallstone stuck in my bile duct?',
    volume: 4,
    usualBranch: 1,
    deciders: [
      {
        id: 'massStricture',
        kind: 'yesno',
        ask: 'Is a stricture, mass, primary sclerosing cholangitis, cholangitis with abscess, or painless jaundice suspected?',
      },
    ],
    branches: [
      {
        when: { massStricture: ['yes'] },
        contrast: 'iv-with-and-without',
        inShort: 'a narrowing or mass of the duct is judged by enhancement',
        because: 'Ductal wall enhancement, liver perfusion change and mass margins separate benign from malignant obstruction.',
        plain: 'Contrast shows the duct wall and any growth around it.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'bright bile outlines a stone unaided',
        because: 'Bile is its own bright contrast on heavily T2-weighted images; a stone is a dark gap in it.',
        plain: 'Bile shines on these pictures. A stone shows as a dark spot without contrast.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Right Upper Quadrant Pain',
        body: 'American College of Radiology',
        year: 2022,
        status: 'confirmed',
      },
      {
        title: 'ACR Appropriateness Criteria: Jaundice',
        body: 'American College of Radiology',
        year: 2012,
        status: 'confirmed',
      },
    ],
    commonError: '"MRCP with contrast" for simple stones.',
    alternatives: 'Endoscopic ultrasound.',
    searchWords: [
      'MRCP', 'CBD stone', 'choledocholithiasis', 'gallstone', 'gall stones', 'biliary colic', 'jaundice', 'LFTs',
      'elevated bilirubin', 'dilated CBD', 'common bile duct', 'RUQ pain', 'gallbladder',
    ],
  },
  {
    id: 'psc-follow-up',
    region: 'biliary',
    exam: 'MRI liver with MRCP',
    question: 'Primary sclerosing cholangitis: change or cancer?',
    plainQuestion: 'Have my bile ducts changed?',
    volume: 1,
    usualBranch: 0,
    deciders: [
      {
        id: 'newSymptoms',
        kind: 'yesno',
        ask: 'Is there a new dominant stricture, rising markers or clinical decline, or no baseline?',
      },
    ],
    branches: [
      {
        when: { newSymptoms: ['yes'] },
        contrast: 'iv-with-and-without',
        inShort: 'a new stricture or decline needs bile duct cancer ruled out',
        because: 'Cholangiocarcinoma and inflamed duct walls are found by enhancement.',
        plain: 'Contrast helps check the duct walls for changes that need treatment.',
      },
      {
        when: {},
        contrast: 'discuss',
        inShort: 'the yield for early cancer must be weighed against yearly contrast',
        because: 'Interval surveillance can use MRCP with or without contrast; the yield for early cancer must be weighed against yearly exposure.',
        plain: 'The radiologist and your doctor will decide if contrast is worth it this time.',
      },
    ],
    sources: [
      {
        title: 'Clinical practice guidelines on sclerosing cholangitis',
        body: 'EASL',
        year: 2022,
        status: 'from memory',
      },
    ],
    commonError: 'Adding contrast to every yearly check out of habit, or leaving it out when a new stricture is suspected.',
    alternatives: 'If contrast cannot be given: MRCP with diffusion; endoscopy with brushings.',
    searchWords: [
      'PSC', 'sclerosing cholangitis', 'cholangiocarcinoma', 'biliary stricture', 'dominant stricture', 'CA 19-9',
      'ulcerative colitis liver', 'IBD liver',
    ],
  },
  {
    id: 'bile-leak-after-surgery',
    region: 'biliary',
    exam: 'MRI liver, hepatobiliary',
    question: 'Bile leak or duct injury after surgery?',
    plainQuestion: 'Is there a bile leak after my surgery?',
    volume: 1,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'iv-hepatobiliary',
        inShort: 'the liver agent passes into bile and shows the leak itself',
        because: 'A liver-specific agent is excreted into bile and shows the leak itself, not just a collection.',
        plain: 'This contrast passes into bile. It shows where the leak is.',
      },
    ],
    sources: [
      {
        title: 'ESGAR consensus statement on liver MRI and liver-specific contrast agents',
        body: 'ESGAR',
        year: 2016,
        status: 'from memory',
      },
    ],
    commonError: 'Ordering the usual contrast agent, which hardly passes into bile and so does not show the leak.',
    alternatives: 'MRCP without contrast shows collections; nuclear medicine biliary scan.',
    searchWords: [
      'biloma', 'bile leak', 'cholecystectomy', 'post cholecystectomy', 'duct injury', 'hepatobiliary',
      'bile duct injury', 'gallbladder surgery',
    ],
  },
]
