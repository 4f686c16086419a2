import { createQuestionSearch } from '#shared/domain/guidance/search'
import { starterQuestions } from '#shared/domain/guidance/questions/index'
import { describe, expect, it } from 'vitest'

const questions = createQuestionSearch(starterQuestions)

/** What people type, and the question that must be among the first three. */
const typed: [string, string][] = [
  ['headache', 'headache-adult'],
  ['migrane', 'headache-adult'],
  ['HA r/o mass', 'headache-adult'],
  ['TIA', 'stroke-tia'],
  ['cva', 'stroke-tia'],
  ['slurred speech', 'stroke-tia'],
  ['MS follow up', 'ms-follow-up'],
  ['MS f/u', 'ms-follow-up'],
  ['multiple sclerosis', 'ms-follow-up'],
  ['r/o MS', 'ms-new-diagnosis'],
  ['brain mets', 'brain-metastases'],
  ['r/o mets', 'brain-metastases'],
  ['memory loss', 'dementia-memory-loss'],
  ['alzheimers', 'dementia-memory-loss'],
  ['first siezure', 'first-seizure-adult'],
  ['new onset seizure', 'first-seizure-adult'],
  ['concussion', 'head-injury-persistent-symptoms'],
  ['parkinsons', 'movement-disorder'],
  ['GBM', 'brain-tumor-known'],
  ['brain tumour', 'brain-tumor-known'],
  ['anuerysm', 'intracranial-aneurysm-mra'],
  ['menigioma', 'meningioma-follow-up'],
  ['NPH', 'hydrocephalus-shunt-nph'],
  ['bells palsy', 'facial-nerve-palsy'],
  ['MRV sinus thrombosis', 'cerebral-venous-thrombosis'],
  ['prolactinoma', 'pituitary-hormone-excess'],
  ['acoustic neuroma', 'asymmetric-hearing-loss'],
  ['acoustic', 'asymmetric-hearing-loss'],
  ['hearing loss one ear', 'asymmetric-hearing-loss'],
  ['dizzyness', 'vertigo-dizziness'],
  ['optic neuritis', 'optic-neuritis'],
  ['TMJ', 'tmj-dysfunction'],
  ['lump in neck', 'neck-mass-cancer'],
  ['LBP', 'low-back-pain-sciatica'],
  ['back pain', 'low-back-pain-sciatica'],
  ['siatica', 'low-back-pain-sciatica'],
  ['slipped disk', 'low-back-pain-sciatica'],
  ['post-op lumbar scar vs disc', 'lumbar-after-surgery'],
  ['saddle anesthesia', 'cauda-equina'],
  ['epidural abscess', 'spine-infection'],
  ['pinched nerve neck', 'neck-pain-arm-radiculopathy'],
  ['cervical radiculopathy', 'neck-pain-arm-radiculopathy'],
  ['cord compression', 'spinal-metastases-cord-compression'],
  ['compression fx', 'vertebral-fracture-benign-malignant'],
  ['SI joints', 'sacroiliitis'],
  ['BRCA screening', 'breast-high-risk-screening'],
  ['silicone implant', 'breast-implant-rupture'],
  ['myocarditis', 'cardiomyopathy-myocarditis'],
  ['aortic aneurysm', 'thoracic-aorta-follow-up'],
  ['liver lesion', 'liver-lesion-characterize'],
  ['HCC', 'hcc-cirrhosis'],
  ['gallstones', 'mrcp-bile-duct-stones'],
  ['choledocholithiasis', 'mrcp-bile-duct-stones'],
  ['IPMN', 'pancreatic-cyst'],
  ['renal mass', 'renal-mass-indeterminate'],
  ['adrenal nodule', 'adrenal-incidentaloma'],
  ['crohn\'s', 'crohn-enterography'],
  ['rectal ca staging', 'rectal-cancer-staging'],
  ['elevated PSA', 'prostate-cancer-detection'],
  ['fibroids', 'uterine-fibroids'],
  ['lump on ovary', 'adnexal-mass'],
  ['pregnant RLQ pain', 'appendicitis-pregnancy'],
  ['rotator cuff', 'shoulder-rotator-cuff'],
  ['rotater cuff tear', 'shoulder-rotator-cuff'],
  ['labral tear shoulder', 'shoulder-instability-labrum'],
  ['hip labrum', 'hip-labrum-impingement'],
  ['scafoid fracture', 'wrist-occult-fracture'],
  ['TFCC', 'wrist-ligament-tfcc'],
  ['AVN hip', 'hip-osteonecrosis'],
  ['ACL', 'knee-internal-derangement'],
  ['torn menicus', 'knee-internal-derangement'],
  ['twisted ankle', 'ankle-sprain-tendon'],
  ['shin splints', 'stress-fracture'],
  ['diabetic foot r/o osteo', 'diabetic-foot-osteomyelitis'],
  ['plantar fasciitis', 'achilles-plantar-fascia'],
  ['lipoma', 'soft-tissue-mass'],
  ['septic joint', 'osteomyelitis-septic-joint'],
  ['multiple myeloma', 'myeloma-whole-body'],
  ['kid headache', 'child-headache'],
  ['peds seizure', 'child-seizure-delay'],
  ['JIA', 'child-juvenile-arthritis'],
  ['tethered cord', 'child-tethered-cord-scoliosis'],
  ['limping child', 'child-limp-osteomyelitis'],
  ['MRI brain with contrast only', 'brain-contrast-completion'],
  ['add contrast to recent brain', 'brain-contrast-completion'],
]

describe('the question search', () => {
  it.each(typed)('finds the question for "%s" among the first three', (text, id) => {
    expect(questions.search(text, { limit: 3 })).toContain(id)
  })

  it('reads shorthand, case and punctuation as the words they stand for', () => {
    const words = questions.search('brain metastases')
    for (const text of ['Brain METS', 'r/o brain mets', 'rule out brain metastasis', '  brain - mets?! ']) {
      expect(questions.search(text), text).toEqual(words)
    }
  })

  it('finds a question from the beginning of a word', () => {
    for (const text of ['sciat', 'menisc', 'parkin', 'carcino']) {
      expect(questions.search(text).length, text).toBeGreaterThan(0)
    }
    expect(questions.search('sciat', { limit: 3 })).toContain('low-back-pain-sciatica')
  })

  it('does not stretch an abbreviation to another of the same length', () => {
    expect(questions.search('ACL')).not.toContain('intracranial-aneurysm-mra')
    expect(questions.search('PSC')).not.toContain('spinal-metastases-cord-compression')
  })

  it('puts the question that knows an abbreviation before those with a word that begins like it', () => {
    expect(questions.search('DI')[0]).toBe('hypopituitarism-avp-deficiency')
    expect(questions.search('MI')[0]).toBe('ischemia-viability')
    expect(questions.search('AS')[0]).toBe('sacroiliitis')
  })

  it('keeps the questions of one region where a region is chosen', () => {
    const found = questions.search('fracture', { region: 'hip' })
    expect(found[0]).toBe('hip-occult-fracture')
    const regionOf = new Map(starterQuestions.map(question => [question.id, question.region]))
    expect(new Set(found.map(id => regionOf.get(id)))).toEqual(new Set(['hip']))
  })

  it('lists every question, most common first, while nothing telling is typed', () => {
    const volumeOf = new Map<string, number>(starterQuestions.map(question => [question.id, question.volume]))
    for (const text of ['', '   ', 'MRI with and without contrast', 'r/o']) {
      const found = questions.search(text)
      expect(found).toHaveLength(starterQuestions.length)
      const volumes = found.map(id => volumeOf.get(id) ?? 0)
      expect(volumes).toEqual([...volumes].sort((a, b) => b - a))
    }
  })

  it('finds nothing for words no question knows', () => {
    expect(questions.search('qqqqqqqq')).toEqual([])
  })

  it('names each question once and no more than asked for', () => {
    const found = questions.search('pain', { limit: 10 })
    expect(found).toHaveLength(10)
    expect(new Set(found).size).toBe(10)
  })

  it('finds every question by its own words', () => {
    for (const question of starterQuestions) {
      expect(questions.search(question.question, { limit: 3 }), question.question).toContain(question.id)
      expect(questions.search(question.plainQuestion, { limit: 5 }), question.plainQuestion).toContain(question.id)
    }
  })

  it('finds every question by each of its search words', () => {
    const missed = starterQuestions.flatMap(question => question.searchWords
      .filter(word => !questions.search(word).includes(question.id))
      .map(word => `${question.id}: ${word}`))
    expect(missed).toEqual([])
  })
})
