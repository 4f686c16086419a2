import type { NeedKind } from '../../../shared/domain/assessment/needs'
import type { RequestForm } from '../../../shared/domain/request/form'
import type { ScreeningAnswers } from '../../../shared/domain/safety/types'

interface Common {
  /** Record number in the fake hospital record. */
  recordNumber: string
  /** The demo user who asks. */
  by: string
  form: Pick<RequestForm, 'region' | 'questionId' | 'answers' | 'priority' | 'history'> & Partial<RequestForm>
  screening: Partial<ScreeningAnswers>
  sentHoursAgo: number
}

/** A demonstration request and how far it gets. Everybody in it is invented. */
export type DemoRequest =
  | (Common & { until: 'draft' })
  | (Common & { until: 'sent' })
  | (Common & { until: 'queried', reader: string, query: string })
  | (Common & { until: 'answered', reader: string, query: string, answer: string })
  | (Common & { until: 'declined', reader: string, reason: string, helpInstead: string })
  | (Common & Signed & { until: 'approved' })
  | (Common & Signed & { until: 'booked', booker: string, scanner: number, inDays: number, hourUtc: number, minutes: number, marked: { kind: NeedKind, state: 'arranged' | 'met' }[] })

interface Signed {
  reader: string
  note?: string
  /** The radiologist's word with its reason, where a finding asks for one. */
  word?: string
}

const brandt = 'Dr Tomas Brandt'
const marsh = 'Dr Helen Marsh'
const farouk = 'Leila Farouk'

/** Everything asked about safety answered with no. */
const nothing: Partial<ScreeningAnswers> = {
  kidneyDisease: 'no', kidneyRiskFactor: 'no', dialysis: 'none', acuteIllness: 'no', liverDisease: 'no', earlierReaction: 'no', asthma: 'no',
  pregnancy: 'no', breastfeeding: 'no', nephrogenicSystemicFibrosis: 'no', implants: 'no',
}
const confirmed = { screeningConfirmed: true, detailsByEmail: true, contactNumber: '555 0199' } as const

export const demoRequests: readonly DemoRequest[] = [
  {
    until: 'sent', recordNumber: '40-2231', by: 'Dr Priya Raman', sentHoursAgo: 0.2,
    form: { region: 'spine, lumbar', questionId: 'spine-infection', answers: {}, priority: 'stat', setting: 'inpatient', ...confirmed, detailsByEmail: null, history: 'MRSA bacteremia from the dialysis catheter, new back pain since two days, tender over L3. No deficit yet.' },
    screening: { ...nothing, kidneyDisease: 'yes', kidneyRiskFactor: 'yes', dialysis: 'hemodialysis', acuteIllness: 'yes' },
  },
  {
    until: 'answered', recordNumber: '40-2260', by: 'Dr Jonas Weiss', sentHoursAgo: 5, reader: brandt,
    query: 'Is there an outside ultrasound report? Size and segment would help to plan the late pictures.',
    answer: 'Yes: 18 mm in segment VI, echogenic, found by chance. No chronic liver disease.',
    form: { region: 'liver', questionId: 'liver-lesion-characterize', answers: { fnhAdenoma: 'yes' }, priority: 'urgent', ...confirmed, history: 'Incidental 18 mm liver lesion on ultrasound. Takes oral contraceptives. No pain, liver values normal.' },
    screening: nothing,
  },
  {
    until: 'sent', recordNumber: '40-2274', by: 'Dr Ines Okafor', sentHoursAgo: 20,
    form: { region: 'knee', questionId: 'knee-internal-derangement', answers: {}, priority: 'routine', ...confirmed, history: 'Twisted the left knee at football three weeks ago, locking since. Effusion, McMurray positive medially.' },
    screening: nothing,
  },
  {
    until: 'sent', recordNumber: '40-2288', by: 'Dr Amara Diallo', sentHoursAgo: 22,
    form: { region: 'hip', questionId: 'hip-labrum-impingement', answers: { surgery: 'yes' }, priority: 'routine', ...confirmed, history: 'Right groin pain two years after hip arthroscopy with labral repair. Clicks on rotation. Suspected new tear.' },
    screening: nothing,
  },
  {
    until: 'sent', recordNumber: '40-2302', by: 'Dr Priya Raman', sentHoursAgo: 26,
    form: { region: 'spine, lumbar', questionId: 'low-back-pain-sciatica', answers: { redFlag: 'none', priorSurgery: 'no' }, priority: 'routine', ...confirmed, history: 'Low back pain for eight weeks with pain down the left leg to the foot, no weakness, no bladder trouble. Physiotherapy without effect.' },
    screening: { ...nothing, kidneyRiskFactor: 'yes' },
  },
  {
    until: 'queried', recordNumber: '40-2323', by: 'Dr Ines Okafor', sentHoursAgo: 8, reader: marsh,
    query: 'Which side is worse, and was there an audiogram? A plain high-resolution study may be enough.',
    form: { region: 'internal auditory canal', questionId: 'asymmetric-hearing-loss', answers: { complex: 'yes' }, priority: 'routine', ...confirmed, history: 'Hearing loss for a year, worse on one side, facial numbness since a month.' },
    screening: { ...nothing, kidneyRiskFactor: 'yes' },
  },
  {
    until: 'declined', recordNumber: '40-2318', by: 'Dr Ines Okafor', sentHoursAgo: 50, reader: brandt,
    reason: 'A typical migraine with a normal examination and a normal MRI eight months ago: another scan would not change treatment.',
    helpInstead: 'A headache diary and a review at the neurology clinic; ask again if the pattern changes.',
    form: { region: 'brain', questionId: 'headache-adult', answers: { tumorInfection: 'no', postural: 'no' }, priority: 'routine', ...confirmed, history: 'Known migraine, attacks twice a month, unchanged for years. Patient worried.' },
    screening: nothing,
  },
  {
    until: 'approved', recordNumber: '40-2479', by: 'Dr Jonas Weiss', sentHoursAgo: 30, reader: brandt,
    form: { region: 'brain', questionId: 'ms-follow-up', answers: { reason: 'attack', recentBaseline: 'no' }, priority: 'routine', ...confirmed, history: 'Relapsing multiple sclerosis, new numbness of the right arm for ten days. Last MRI two years ago.' },
    screening: nothing,
  },
  {
    until: 'approved', recordNumber: '40-2341', by: 'Dr Priya Raman', sentHoursAgo: 28, reader: marsh,
    word: 'Transplant team agrees: the abscess must be found or ruled out; macrocyclic agent, single dose.',
    form: { region: 'brain', questionId: 'brain-infection', answers: {}, priority: 'urgent', setting: 'inpatient', ...confirmed, history: 'Kidney transplant, fever and confusion for three days, lumbar puncture with raised cells.' },
    screening: { ...nothing, kidneyDisease: 'yes', kidneyRiskFactor: 'yes', acuteIllness: 'yes' },
  },
  {
    until: 'booked', recordNumber: '40-2295', by: 'Dr Jonas Weiss', sentHoursAgo: 72, reader: brandt, booker: farouk, scanner: 2, inDays: 1, hourUtc: 16.333, minutes: 40, marked: [{ kind: 'pregnancy-answer', state: 'met' }],
    word: 'Creatinine to be repeated before the exam; no risk factor known.',
    form: { region: 'pituitary', questionId: 'pituitary-hormone-excess', answers: {}, priority: 'routine', ...confirmed, history: 'Prolactin four times normal on two samples, no drugs that would explain it. Irregular periods.' },
    screening: nothing,
  },
  {
    until: 'booked', recordNumber: '40-2404', by: 'Dr Ines Okafor', sentHoursAgo: 96, reader: marsh, booker: farouk, scanner: 1, inDays: 2, hourUtc: 15, minutes: 30, marked: [],
    form: { region: 'spine, lumbar', questionId: 'low-back-pain-sciatica', answers: { redFlag: 'none', priorSurgery: 'no' }, priority: 'routine', ...confirmed, history: 'Sciatica on the right for ten weeks, considering injection.' },
    screening: nothing,
  },
  {
    until: 'booked', recordNumber: '40-2483', by: 'Dr Priya Raman', sentHoursAgo: 90, reader: brandt, booker: farouk, scanner: 1, inDays: 2, hourUtc: 17, minutes: 50, marked: [{ kind: 'iv-start', state: 'arranged' }],
    form: { region: 'brain', questionId: 'first-seizure-adult', answers: { tumorInfection: 'yes' }, priority: 'urgent', ...confirmed, history: 'First seizure, lung cancer treated in 2024.' },
    screening: nothing,
  },
  {
    until: 'draft', recordNumber: '40-2336', by: 'Sam Whitfield', sentHoursAgo: 0,
    form: { region: 'brain', questionId: 'dementia-memory-loss', answers: {}, priority: 'routine', history: 'Memory loss over a year, daughter worried. Prepared for Dr Okafor.' },
    screening: {},
  },
]
