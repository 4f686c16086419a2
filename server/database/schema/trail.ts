import { sql } from 'drizzle-orm'
import { bigint, check, date, index, integer, jsonb, pgTable, primaryKey, text, timestamp, uuid } from 'drizzle-orm/pg-core'

const at = (name: string) => timestamp(name, { withTimezone: true, mode: 'date' })

/**
 * Who did what, when, to what. Append-only by trigger and grants. No foreign keys on purpose: the trail must outlive
 * whatever it speaks of, and an insert must never wait for another row's lock. Order by `id`.
 */
export const auditEvents = pgTable('audit_events', {
  id: bigint('id', { mode: 'number' }).primaryKey().generatedAlwaysAsIdentity(),
  at: at('at').notNull().default(sql`clock_timestamp()`),
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
  /** Facts about the change; never free clinical text. */
  detail: jsonb('detail').$type<Record<string, unknown>>().notNull().default({}),
  outcome: text('outcome').notNull().default('ok'),
  requestId: text('request_id').notNull(),
}, table => [
  // Nulls first, as `order by id desc` means: the other order would be sorted anew for each page.
  index('audit_events_actor_idx').on(table.actorId, table.id.desc().nullsFirst()),
  index('audit_events_object_idx').on(table.objectType, table.objectId, table.id.desc().nullsFirst()),
  index('audit_events_patient_idx').on(table.patientId, table.id.desc().nullsFirst()),
  index('audit_events_action_idx').on(table.action, table.id.desc().nullsFirst()),
  index('audit_events_reference_idx').on(table.reference, table.id.desc().nullsFirst()).where(sql`${table.reference} is not null`),
  index('audit_events_at_idx').on(table.at),
  check('audit_events_outcome_check', sql`${table.outcome} in ('ok', 'refused')`),
  check('audit_events_actor_check', sql`${table.actorKind} in ('user', 'system', 'patient', 'nobody')`),
])

/** One row a day: the hash over that day's audit rows and the day before's hash. */
export const auditSeals = pgTable('audit_seals', {
  day: date('day').primaryKey(),
  rows: integer('rows').notNull(),
  lastId: bigint('last_id', { mode: 'number' }),
  previousHash: text('previous_hash').notNull(),
  hash: text('hash').notNull(),
  sealedAt: at('sealed_at').notNull().defaultNow(),
})

/** Answers to finished writes, kept a day, so that the same key never makes two. */
export const idempotencyKeys = pgTable('idempotency_keys', {
  userId: uuid('user_id').notNull(),
  route: text('route').notNull(),
  key: text('key').notNull(),
  /** SHA-256 over the body. */
  fingerprint: text('fingerprint').notNull(),
  status: integer('status').notNull(),
  response: jsonb('response').$type<unknown>().notNull(),
  etag: text('etag'),
  createdAt: at('created_at').notNull().defaultNow(),
}, table => [
  primaryKey({ name: 'idempotency_keys_pkey', columns: [table.userId, table.route, table.key] }),
  index('idempotency_keys_created_idx').on(table.createdAt),
])

/** Facts of this installation, for instance that the demo department was seeded. */
export const installation = pgTable('installation', {
  key: text('key').primaryKey(),
  value: jsonb('value').$type<unknown>().notNull(),
  at: at('at').notNull().defaultNow(),
})
