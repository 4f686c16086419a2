import type { ClinicalQuestion } from '../types'

/** Starter questions: obstetric; most common first. */
export const obstetricQuestions: ClinicalQuestion[] = [
  {
    id: 'placenta-accreta',
    region: 'obstetric',
    exam: 'MRI placenta',
    question: 'Suspected placenta accreta spectrum?',
    plainQuestion: 'Is my placenta growing too deep into my womb?',
    volume: 2,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'none',
        inShort: 'dark bands and bulging of the placenta show on T2 images',
        because: 'Dark T2 bands, bulging and loss of the interface are non-contrast signs; gadolinium is not part of the routine study.',
        plain: 'The signs show on plain MRI pictures. No contrast is used in pregnancy unless it is truly needed.',
      },
    ],
    sources: [
      {
        title: 'Joint consensus statement for MR imaging of placenta accreta spectrum disorders',
        body: 'SAR and ESUR',
        year: 2020,
        status: 'from memory',
      },
      {
        title: 'Association between MRI exposure during pregnancy and fetal and childhood outcomes',
        body: 'JAMA',
        year: 2016,
        status: 'confirmed',
      },
      {
        title: 'Committee Opinion 723: diagnostic imaging during pregnancy and lactation',
        body: 'ACOG',
        year: 2017,
        status: 'from memory',
      },
    ],
    commonError: 'Requesting contrast to see vessels in the placenta.',
    alternatives: null,
    searchWords: [
      'accreta', 'increta', 'percreta', 'PAS', 'placenta previa', 'previa', 'morbidly adherent placenta', 'placenta',
    ],
  },
  {
    id: 'fetal-anomaly',
    region: 'obstetric',
    exam: 'Fetal MRI',
    question: 'Fetal anomaly seen on ultrasound?',
    plainQuestion: 'Can MRI show more about my baby?',
    volume: 1,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'none',
        inShort: 'fast T2 images show the baby’s anatomy and gadolinium is avoided',
        because: 'Fast T2, T1 and diffusion images show fetal anatomy, and gadolinium is not used.',
        plain: 'Fast pictures show the baby. No contrast is used.',
      },
    ],
    sources: [
      {
        title: 'Practice Parameter for fetal MRI',
        body: 'ACR and SPR',
        year: 2020,
        status: 'from memory',
      },
      {
        title: 'Committee Opinion 723: diagnostic imaging during pregnancy and lactation',
        body: 'ACOG',
        year: 2017,
        status: 'from memory',
      },
    ],
    commonError: 'Ordering contrast, which is not used to image the fetus.',
    alternatives: null,
    searchWords: [
      'fetal MRI', 'fetus', 'fetal brain', 'ventriculomegaly fetal', 'congenital diaphragmatic hernia', 'CDH',
      'unborn baby', 'anomaly scan', 'spina bifida',
    ],
  },
  {
    id: 'abdominal-pain-pregnancy',
    region: 'obstetric',
    exam: 'MRI abdomen and pelvis',
    question: 'Abdominal pain in pregnancy (bile duct stone, torsion, bowel, fibroid)?',
    plainQuestion: 'I am pregnant with belly pain. What is the cause?',
    volume: 1,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'none',
        inShort: 'fluid-sensitive images answer these questions and gadolinium is avoided in pregnancy',
        because: 'Fluid-sensitive, diffusion and MRCP images answer these questions without contrast.',
        plain: 'MRI can look for the cause without contrast.',
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
        title: 'Association between MRI exposure during pregnancy and fetal and childhood outcomes',
        body: 'JAMA',
        year: 2016,
        status: 'confirmed',
      },
    ],
    commonError: 'Ordering contrast out of habit for abdominal pain, or delaying MRI because of the pregnancy.',
    alternatives: 'Ultrasound first.',
    searchWords: [
      'pregnant belly pain', 'pregnancy abdominal pain', 'ovarian torsion', 'pregnant gallstones',
      'fibroid degeneration', 'pregnant',
    ],
  },
]
