import { sql } from 'drizzle-orm'
import {
  bigint, boolean, check, doublePrecision, index, integer, jsonb, pgEnum, pgSequence, pgTable, smallint, text, timestamp,
  uniqueIndex, uuid,
} from 'drizzle-orm/pg-core'
import type { AnyPgColumn } from 'drizzle-orm/pg-core'
import type { Assessment, AssessmentInputs } from '../../../shared/domain/assessment/types'
import { needKinds, needStates } from '../../../shared/domain/assessment/needs'
import { contrastOutcomes, decidableOutcomes } from '../../../shared/domain/contrast/outcome'
import { agentIds } from '../../../shared/domain/contrast/types'
import type { Letter } from '../../../shared/domain/letter/types'
import { letterKinds, letterStates } from '../../../shared/domain/letter/kinds'
import type { RecordReading } from '../../../shared/domain/record/types'
import { differsCauses } from '../../../shared/domain/request/differs'
import type { RequestForm } from '../../../shared/domain/request/form'
import { requestStates, sides } from '../../../shared/domain/request/lifecycle'
import { messageKinds } from '../../../shared/domain/request/messages'
import { priorities } from '../../../shared/domain/request/priority'
import { guidanceVersions, policyVersions, scanners } from './rules'
import { practices, users } from './people'

const at = (name: string) => timestamp(name, { withTimezone: true, mode: 'date' })

export const requestStateEnum = pgEnum('request_state', requestStates)
export const priorityEnum = pgEnum('priority', priorities)
export const sideEnum = pgEnum('side', sides)
export const outcomeEnum = pgEnum('contrast_outcome', contrastOutcomes)
export const agentEnum = pgEnum('agent', agentIds)
export const needKindEnum = pgEnum('need_kind', needKinds)
export const needStateEnum = pgEnum('need_state', needStates)
export const messageKindEnum = pgEnum('message_kind', messageKinds)
export const decisionKindEnum = pgEnum('decision_kind', ['approved', 'declined'])
export const differsCauseEnum = pgEnum('differs_cause', differsCauses)
export const letterKindEnum = pgEnum('letter_kind', letterKinds)
export const letterStateEnum = pgEnum('letter_state', letterStates)
export const assessmentCauseEnum = pgEnum('assessment_cause', ['send', 'answer', 'decision', 'booking', 'reopen'])

/** A person in the hospital record, as last read, with what the department itself keeps about them. */
export const patients = pgTable('patients', {
  id: uuid('id').primaryKey().defaultRandom(),
  /** Logical id on the hospital's FHIR server. */
  ehrId: text('ehr_id').notNull(),
  recordNumber: text('record_number').notNull(),
  familyName: text('family_name').notNull(),
  givenName: text('given_name').notNull(),
  displayName: text('display_name').notNull(),
  /** As recorded: YYYY-MM-DD, or shorter where the record knows no more. */
  birthDate: text('birth_date').notNull(),
  sex: text('sex').notNull(),
  email: text('email'),
  phone: text('phone'),
  language: text('language').notNull().default('en'),
  /** Agreement to details by e-mail: null never asked. Who asked and when stand beside it. */
  detailsByEmail: boolean('details_by_email'),
  consentAskedById: uuid('consent_asked_by_id').references(() => users.id),
  consentAskedAt: at('consent_asked_at'),
  readAt: at('read_at').notNull(),
  createdAt: at('created_at').notNull().defaultNow(),
}, table => [
  uniqueIndex('patients_ehr_id_key').on(table.ehrId),
  index('patients_record_number_idx').on(table.recordNumber),
  index('patients_name_idx').using('gin', sql`lower(${table.displayName}) gin_trgm_ops`),
  check('patients_birth_date_check', sql`${table.birthDate} ~ '^[0-9]{4}(-[0-9]{2}(-[0-9]{2})?)?$'`),
  check('patients_sex_check', sql`${table.sex} in ('female', 'male', 'other', 'unknown')`),
  check('patients_consent_check', sql`(${table.detailsByEmail} is null) = (${table.consentAskedAt} is null)`),
])

/** Numbers requests within the department: WF-26-004318. */
export const requestNumber = pgSequence('request_number', { startWith: 1, cache: 1 })

export const requests = pgTable('requests', {
  id: uuid('id').primaryKey().defaultRandom(),
  /** Given at sending, never reused; null on drafts. */
  reference: text('reference'),
  state: requestStateEnum('state').notNull().default('draft'),
  version: integer('version').notNull().default(1),
  practiceId: uuid('practice_id').notNull().references(() => practices.id),
  patientId: uuid('patient_id').notNull().references(() => patients.id),
  preparedById: uuid('prepared_by_id').notNull().references(() => users.id),
  signedById: uuid('signed_by_id').references(() => users.id),
  form: jsonb('form').$type<RequestForm>().notNull(),
  /** The hospital record as last read for this request; ages of values count from their collection, never from here. */
  record: jsonb('record').$type<RecordReading>(),
  recordReadAt: at('record_read_at'),
  /** Copied from the form at sending, for lists. */
  questionId: text('question_id'),
  region: text('region'),
  examName: text('exam_name'),
  priority: priorityEnum('priority').notNull().default('routine'),
  priorityRank: smallint('priority_rank').notNull().default(3),
  /** The newest assessment's sentence and outcome, a cache for lists. */
  sentence: text('sentence'),
  outcome: outcomeEnum('outcome'),
  gateEgfr: doublePrecision('gate_egfr'),
  kidneyLine: text('kidney_line'),
  currentAssessmentId: uuid('current_assessment_id').references((): AnyPgColumn => assessments.id),
  currentDecisionId: uuid('current_decision_id').references((): AnyPgColumn => decisions.id),
  /** Which side owes the next answer; null: nobody. */
  awaiting: sideEnum('awaiting'),
  /** An answer arrived that nobody has acted on. */
  replyWaiting: boolean('reply_waiting').notNull().default(false),
  copiedFromId: uuid('copied_from_id').references((): AnyPgColumn => requests.id),
  sentAt: at('sent_at'),
  dueAt: at('due_at'),
  decidedAt: at('decided_at'),
  scannerId: uuid('scanner_id').references(() => scanners.id),
  slotStartsAt: at('slot_starts_at'),
  slotEndsAt: at('slot_ends_at'),
  closedAt: at('closed_at'),
  createdAt: at('created_at').notNull().defaultNow(),
  updatedAt: at('updated_at').notNull().defaultNow(),
}, table => [
  uniqueIndex('requests_reference_key').on(table.reference),
  /** The radiologists' queue: most pressing first. */
  index('requests_review_idx').on(table.priorityRank, table.dueAt, table.id)
    .where(sql`${table.state} in ('sent', 'queried', 'reopened')`),
  /** A practice's own list, newest first. Nulls first, as `order by … desc` means: the other order would be sorted anew for each page. */
  index('requests_practice_idx').on(table.practiceId, table.updatedAt.desc().nullsFirst(), table.id.desc().nullsFirst())
    .where(sql`${table.state} <> 'discarded'`),
  /** The department's own list, newest first. */
  index('requests_changed_idx').on(table.updatedAt.desc().nullsFirst(), table.id.desc().nullsFirst())
    .where(sql`${table.state} <> 'draft' and ${table.state} <> 'discarded'`),
  /** What waits for a practice's answer: the badge of its people. */
  index('requests_awaiting_idx').on(table.practiceId).where(sql`${table.awaiting} = 'ordering'`),
  /** The booking desk: by slot, unbooked first. */
  index('requests_preparation_idx').on(table.slotStartsAt, table.id)
    .where(sql`${table.state} in ('approved', 'booked', 'reopened', 'queried')`),
  /** Exams that are over and wait for their letter. */
  index('requests_done_idx').on(table.slotStartsAt, table.id).where(sql`${table.state} = 'done'`),
  index('requests_patient_idx').on(table.patientId, table.createdAt.desc()),
  check('requests_reference_check', sql`(${table.state} in ('draft', 'discarded')) or (${table.reference} is not null and ${table.signedById} is not null and ${table.sentAt} is not null)`),
  check('requests_slot_check', sql`(${table.slotStartsAt} is null) = (${table.slotEndsAt} is null) and (${table.slotEndsAt} is null or ${table.slotEndsAt} > ${table.slotStartsAt})`),
  check('requests_booked_check', sql`${table.state} <> 'booked' or (${table.slotStartsAt} is not null and ${table.scannerId} is not null and ${table.currentDecisionId} is not null)`),
  check('requests_decided_check', sql`${table.state} not in ('approved', 'booked', 'done', 'declined') or ${table.currentDecisionId} is not null`),
  check('requests_version_check', sql`${table.version} > 0`),
])

/** Only added. Inputs, result and the versions of everything it rests on, so that it can be replayed. */
export const assessments = pgTable('assessments', {
  id: uuid('id').primaryKey().defaultRandom(),
  requestId: uuid('request_id').notNull().references((): AnyPgColumn => requests.id),
  cause: assessmentCauseEnum('cause').notNull(),
  inputs: jsonb('inputs').$type<AssessmentInputs>().notNull(),
  result: jsonb('result').$type<Assessment>().notNull(),
  engineVersion: text('engine_version').notNull(),
  guidanceVersionId: uuid('guidance_version_id').notNull().references(() => guidanceVersions.id),
  policyVersionId: uuid('policy_version_id').notNull().references(() => policyVersions.id),
  createdById: uuid('created_by_id').references(() => users.id),
  createdAt: at('created_at').notNull().defaultNow(),
}, table => [index('assessments_request_idx').on(table.requestId, table.createdAt.desc())])

/** Only added. A reversal is a new row or a cleared pointer on the request, never an update. */
export const decisions = pgTable('decisions', {
  id: uuid('id').primaryKey().defaultRandom(),
  requestId: uuid('request_id').notNull().references((): AnyPgColumn => requests.id),
  kind: decisionKindEnum('kind').notNull(),
  contrast: outcomeEnum('contrast'),
  agent: agentEnum('agent'),
  doseMmolPerKg: doublePrecision('dose_mmol_per_kg'),
  weightKg: doublePrecision('weight_kg'),
  amountMmol: doublePrecision('amount_mmol'),
  volumeMl: doublePrecision('volume_ml'),
  note: text('note').notNull().default(''),
  /** Why it differs from the suggestion, or why a barred or held choice is taken. */
  differsReason: text('differs_reason'),
  /** Declined: why, and what would help instead. */
  declineReason: text('decline_reason'),
  helpInstead: text('help_instead'),
  assessmentId: uuid('assessment_id').notNull().references(() => assessments.id),
  signedById: uuid('signed_by_id').notNull().references(() => users.id),
  signedAt: at('signed_at').notNull(),
  supersedesId: uuid('supersedes_id').references((): AnyPgColumn => decisions.id),
}, table => [
  index('decisions_request_idx').on(table.requestId, table.signedAt.desc()),
  check('decisions_approved_check', sql`${table.kind} <> 'approved' or (${table.contrast} is not null and ${table.contrast} = any (array['${sql.raw(decidableOutcomes.join('\',\''))}']::contrast_outcome[]))`),
  check('decisions_declined_check', sql`${table.kind} <> 'declined' or length(${table.declineReason}) > 0`),
  check('decisions_agent_check', sql`${table.kind} <> 'approved' or (${table.contrast} = 'none') = (${table.agent} is null)`),
])

/** Only added: what people did about a need that the assessment derived. The newest row of a kind counts. */
export const needEvents = pgTable('need_events', {
  id: bigint('id', { mode: 'number' }).primaryKey().generatedAlwaysAsIdentity(),
  requestId: uuid('request_id').notNull().references((): AnyPgColumn => requests.id),
  kind: needKindEnum('kind').notNull(),
  state: needStateEnum('state').notNull(),
  note: text('note').notNull().default(''),
  byId: uuid('by_id').references(() => users.id),
  at: at('at').notNull().defaultNow(),
}, table => [
  index('need_events_request_idx').on(table.requestId, table.kind, table.id.desc()),
  check('need_events_waived_check', sql`${table.state} <> 'waived' or length(${table.note}) > 0`),
])

/** Only added. The thread between the two sides. */
export const messages = pgTable('messages', {
  id: uuid('id').primaryKey().defaultRandom(),
  requestId: uuid('request_id').notNull().references((): AnyPgColumn => requests.id),
  kind: messageKindEnum('kind').notNull(),
  side: sideEnum('side').notNull(),
  authorId: uuid('author_id').notNull().references(() => users.id),
  body: text('body').notNull(),
  /** Seen by imaging staff only. */
  internal: boolean('internal').notNull().default(false),
  createdAt: at('created_at').notNull().defaultNow(),
}, table => [
  index('messages_request_idx').on(table.requestId, table.createdAt),
  check('messages_body_check', sql`length(btrim(${table.body})) between 1 and 4000`),
])

/** What was really given. Only added; a correction names the row it replaces. */
export const administrations = pgTable('administrations', {
  id: uuid('id').primaryKey().defaultRandom(),
  requestId: uuid('request_id').notNull().references((): AnyPgColumn => requests.id),
  patientId: uuid('patient_id').notNull().references(() => patients.id),
  given: boolean('given').notNull(),
  contrast: outcomeEnum('contrast').notNull(),
  agent: agentEnum('agent'),
  volumeMl: doublePrecision('volume_ml'),
  amountMmol: doublePrecision('amount_mmol'),
  lot: text('lot').notNull().default(''),
  givenAt: at('given_at').notNull(),
  /** Why it differed from the decision: for staff in words, for the patient by its cause. Empty and null where it did not. */
  differsReason: text('differs_reason').notNull().default(''),
  differsCause: differsCauseEnum('differs_cause'),
  reaction: text('reaction').notNull().default('none'),
  reactionDetail: text('reaction_detail').notNull().default(''),
  extravasation: boolean('extravasation').notNull().default(false),
  recordedById: uuid('recorded_by_id').notNull().references(() => users.id),
  recordedAt: at('recorded_at').notNull().defaultNow(),
  correctsId: uuid('corrects_id').references((): AnyPgColumn => administrations.id),
}, table => [
  index('administrations_patient_idx').on(table.patientId, table.givenAt.desc()),
  index('administrations_request_idx').on(table.requestId),
  uniqueIndex('administrations_corrects_key').on(table.correctsId),
  check('administrations_agent_check', sql`${table.given} = (${table.agent} is not null)`),
  check('administrations_reaction_check', sql`${table.reaction} in ('none', 'mild', 'moderate', 'severe')`),
  check('administrations_volume_check', sql`${table.volumeMl} is null or (${table.volumeMl} > 0 and ${table.volumeMl} <= 100)`),
])

/** A letter to the patient: its words are fixed when queued; how far it got is kept beside them. */
export const letters = pgTable('letters', {
  id: uuid('id').primaryKey().defaultRandom(),
  requestId: uuid('request_id').notNull().references((): AnyPgColumn => requests.id),
  patientId: uuid('patient_id').notNull().references(() => patients.id),
  kind: letterKindEnum('kind').notNull(),
  content: jsonb('content').$type<Letter>().notNull(),
  /** Whether the e-mail holds the explanation itself (agreed) or only a neutral message. */
  detailed: boolean('detailed').notNull(),
  /** Null: no e-mail address; handed over on paper. */
  toAddress: text('to_address'),
  state: letterStateEnum('state').notNull(),
  attempts: integer('attempts').notNull().default(0),
  lastError: text('last_error'),
  messageId: text('message_id'),
  queuedAt: at('queued_at').notNull().defaultNow(),
  deliveredAt: at('delivered_at'),
  createdById: uuid('created_by_id').references(() => users.id),
}, table => [
  index('letters_request_idx').on(table.requestId, table.queuedAt.desc()),
  index('letters_failed_idx').on(table.queuedAt.desc().nullsFirst(), table.id.desc().nullsFirst()).where(sql`${table.state} = 'failed'`),
])

/** Links in delivered letters. Only the hash of a token is kept: a copy of the database opens no page. */
export const letterLinks = pgTable('letter_links', {
  /** SHA-256 of the token, hex. */
  tokenHash: text('token_hash').primaryKey(),
  letterId: uuid('letter_id').notNull().references(() => letters.id),
  createdAt: at('created_at').notNull().defaultNow(),
  expiresAt: at('expires_at').notNull(),
  wrongTries: integer('wrong_tries').notNull().default(0),
  revokedAt: at('revoked_at'),
  openedAt: at('opened_at'),
}, table => [index('letter_links_letter_idx').on(table.letterId)])

/** Short-lived right to read one explanation, given after the date of birth was right. */
export const explanationVisits = pgTable('explanation_visits', {
  /** SHA-256 of the cookie's value, hex. */
  idHash: text('id_hash').primaryKey(),
  tokenHash: text('token_hash').notNull().references(() => letterLinks.tokenHash),
  expiresAt: at('expires_at').notNull(),
  createdAt: at('created_at').notNull().defaultNow(),
})
