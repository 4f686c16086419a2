import { z } from 'zod'
import { needKinds, needStates } from '../domain/assessment/needs'
import { contrastOutcomes, decidableOutcomes } from '../domain/contrast/outcome'
import { agentIds } from '../domain/contrast/types'
import { observationStatuses } from '../domain/kidney/types'
import { differsCauses } from '../domain/request/differs'
import { priorities } from '../domain/request/priority'
import { instant, mailAddress, optionalText, pageQuery, requiredText } from './common'

const yesNoUnknown = z.enum(['yes', 'no', 'unknown'])

export const screeningSchema = z.strictObject({
  kidneyDisease: yesNoUnknown.nullable(),
  kidneyRiskFactor: yesNoUnknown.nullable(),
  dialysis: z.enum(['none', 'hemodialysis', 'peritoneal', 'unknown']).nullable(),
  nextDialysisAt: instant.nullable(),
  acuteIllness: yesNoUnknown.nullable(),
  liverDisease: yesNoUnknown.nullable(),
  earlierReaction: yesNoUnknown.nullable(),
  reactionAgent: z.enum([...agentIds, 'unknown']).nullable(),
  reactionKind: z.enum(['allergic-like', 'physiologic', 'unknown']).nullable(),
  reactionSeverity: z.enum(['mild', 'moderate', 'severe', 'unknown']).nullable(),
  asthma: yesNoUnknown.nullable(),
  pregnancy: z.enum(['yes', 'no', 'possible', 'unknown', 'not-applicable']).nullable(),
  breastfeeding: z.enum(['yes', 'no', 'unknown', 'not-applicable']).nullable(),
  nephrogenicSystemicFibrosis: yesNoUnknown.nullable(),
  implants: yesNoUnknown.nullable(),
  implantDetail: optionalText(500),
  specialNeeds: z.array(z.enum(['interpreter', 'wheelchair', 'claustrophobia', 'sedation', 'cannot-consent', 'hard-iv-access'])).max(6),
})

/** A value typed in by a clinician, as it was printed on the outside report. */
export const typedReadingSchema = z.strictObject({
  id: z.string().regex(/^typed-[\w-]{8,60}$/),
  analyte: z.enum(['creatinine', 'cystatin-c']),
  source: z.literal('typed'),
  sourceLabel: requiredText(120, 'Say which laboratory or hospital it comes from.'),
  value: z.number().positive('Give a number above zero.').max(100_000, 'That is too large to be a creatinine.'),
  comparator: z.enum(['<', '<=', '>=', '>']).nullable(),
  unit: requiredText(20, 'Choose the unit printed on the report.'),
  collectedAt: instant,
  collectedText: optionalText(60).nullable(),
  precision: z.enum(['instant', 'day']),
  issuedAt: z.null(),
  status: z.enum(observationStatuses).extract(['final']),
  refusal: z.null(),
})

/** The form as saved while typing: everything may still be missing, nothing may be malformed. */
export const requestFormSchema = z.strictObject({
  region: z.string().max(60).nullable(),
  questionId: z.string().max(80).nullable(),
  answers: z.record(z.string().max(60), z.string().max(60)),
  priority: z.enum(priorities),
  setting: z.enum(['outpatient', 'inpatient', 'emergency']),
  history: z.string().max(4000, 'At most 4000 characters.'),
  wish: z.strictObject({ contrast: z.enum(contrastOutcomes), reason: z.string().max(1000) }).nullable(),
  weightKg: z.number().min(0.3, 'Give the weight in kilograms.').max(400, 'Give the weight in kilograms.').nullable(),
  heightCm: z.number().min(20, 'Give the height in centimeters.').max(260, 'Give the height in centimeters.').nullable(),
  screening: screeningSchema,
  typedReadings: z.array(typedReadingSchema).max(10),
  screeningConfirmed: z.boolean(),
  contactNumber: z.string().max(60),
  detailsByEmail: z.boolean().nullable(),
  patientEmail: z.union([z.literal('').transform(() => null), mailAddress]).nullable(),
})

export const patientSearchSchema = z.strictObject({
  name: optionalText(100).optional(),
  recordNumber: optionalText(60).optional(),
  birthDate: z.iso.date({ error: 'Give the date of birth as year, month and day.' }).optional(),
}).refine(value => (value.name?.length ?? 0) >= 2 || Boolean(value.recordNumber) || Boolean(value.birthDate), {
  path: ['name'],
  message: 'Type at least two letters of the name, or a record number, or a date of birth.',
})

export const createRequestSchema = z.strictObject({
  ehrPatientId: z.string().regex(/^[A-Za-z0-9.-]{1,64}$/),
  practiceId: z.uuid('Choose the practice that asks.'),
  /** The clinician compared name, birth date and record number. */
  confirmed: z.literal(true, { error: 'Confirm that this is the right patient.' }),
  /** A declined or closed request to start from. */
  copyOf: z.uuid().nullable(),
})

export const saveRequestSchema = z.strictObject({ form: requestFormSchema })

/** Sending needs no body: what was saved under this version is sent. */
export const sendRequestSchema = z.strictObject({})

export const messageSchema = z.strictObject({
  kind: z.enum(['question', 'answer', 'note']),
  body: requiredText(4000, 'Write a message first.'),
  internal: z.boolean().default(false),
})

export const querySchema = z.strictObject({ body: requiredText(4000, 'Write what you need to know.') })

export const approvalSchema = z.strictObject({
  contrast: z.enum(decidableOutcomes, { error: 'Choose with or without contrast.' }),
  agent: z.enum(agentIds).nullable(),
  doseMmolPerKg: z.number().positive().max(0.3, 'No label goes beyond 0.3 mmol/kg.').nullable(),
  weightKg: z.number().min(0.3).max(400).nullable(),
  /** For a joint: volume of the diluted mixture, mL. */
  volumeMl: z.number().positive().max(100).nullable(),
  note: optionalText(1000),
  differsReason: optionalText(1000).nullable(),
  /** The radiologist's word, given by name, where a finding asks for one. */
  wordGiven: z.boolean(),
  /** Needs that the radiologist waives, each with a reason. */
  waivedNeeds: z.array(z.strictObject({ kind: z.enum(needKinds), reason: requiredText(500, 'Say why it may be left out.') })).max(needKinds.length),
})

export const declineSchema = z.strictObject({
  reason: requiredText(2000, 'Say why, in words the clinician can act on.'),
  helpInstead: optionalText(2000),
})

export const reasonSchema = z.strictObject({ reason: requiredText(1000, 'Give a reason.') })

export const bookingSchema = z.strictObject({
  scannerId: z.uuid('Choose a scanner.'),
  startsAt: instant,
  minutes: z.number().int().min(10, 'An exam takes at least 10 minutes.').max(240, 'At most 240 minutes.'),
})

export const unbookSchema = z.strictObject({
  cause: z.enum(['moved-by-us', 'patient-cancelled', 'did-not-come'], { error: 'Say what happened.' }),
  note: optionalText(500),
})

export const administrationSchema = z.strictObject({
  contrast: z.enum(decidableOutcomes),
  agent: z.enum(agentIds).nullable(),
  volumeMl: z.number().positive('Give the volume in mL.').max(100, 'At most 100 mL.').nullable(),
  lot: optionalText(60),
  givenAt: instant,
  differsCause: z.enum(differsCauses, { error: 'Choose why it differed.' }).nullable(),
  differsReason: optionalText(500),
  reaction: z.enum(['none', 'mild', 'moderate', 'severe']),
  reactionDetail: optionalText(1000),
  extravasation: z.boolean(),
}).refine(value => (value.contrast === 'none') === (value.agent === null), { path: ['agent'], message: 'Name the agent that was given.' })
  .refine(value => value.reaction === 'none' || value.reactionDetail.length > 0, { path: ['reactionDetail'], message: 'Describe the reaction and what was done.' })

export const needMarkSchema = z.strictObject({
  kind: z.enum(needKinds),
  state: z.enum(needStates),
  note: optionalText(500),
}).refine(value => value.state !== 'waived' || value.note.length > 0, { path: ['note'], message: 'Say why it may be left out.' })

export const consentSchema = z.strictObject({ detailsByEmail: z.boolean(), email: mailAddress.nullable() })

export const requestListQuery = pageQuery.extend({
  group: z.enum(['waiting', 'progress', 'drafts', 'past', 'all']).default('all'),
  search: z.string().trim().max(100).optional(),
})

export const reviewQuery = pageQuery.extend({
  filter: z.enum(['all', 'reply', 'reopened', 'contrast', 'low-kidney']).default('all'),
})

export const preparationQuery = pageQuery.extend({
  tab: z.enum(['not-booked', 'needs-something', 'lab-work', 'iv-start', 'held', 'ready', 'done']).default('needs-something'),
  search: z.string().trim().max(100).optional(),
})

export const requestKeyParams = z.strictObject({ id: z.union([z.uuid(), z.string().regex(/^WF-\d{2}-\d{6,}$/)]) })

