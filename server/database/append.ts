import { jsonb, pgTable, text, uuid } from 'drizzle-orm/pg-core'
import { needKindEnum, needStateEnum } from './schema/requests'

/**
 * The append-only tables as the application may write them: it is granted these columns and neither `id` nor `at`, and drizzle
 * names every column it knows in an insert. Kept out of `schema/`, which the migrations are made from.
 */
export const addedAuditEvents = pgTable('audit_events', {
  actorKind: text('actor_kind').notNull(),
  actorId: uuid('actor_id'),
  actorName: text('actor_name').notNull(),
  actorRole: text('actor_role'),
  action: text('action').notNull(),
  objectType: text('object_type').notNull(),
  objectId: text('object_id'),
  reference: text('reference'),
  patientId: uuid('patient_id'),
  practiceId: uuid('practice_id'),
  detail: jsonb('detail').$type<Record<string, unknown>>().notNull(),
  outcome: text('outcome').notNull(),
  requestId: text('request_id').notNull(),
})

export const addedNeedEvents = pgTable('need_events', {
  requestId: uuid('request_id').notNull(),
  kind: needKindEnum('kind').notNull(),
  state: needStateEnum('state').notNull(),
  note: text('note').notNull(),
  byId: uuid('by_id'),
})
