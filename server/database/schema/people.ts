import { sql } from 'drizzle-orm'
import { boolean, check, index, integer, pgEnum, pgTable, primaryKey, text, timestamp, uniqueIndex, uuid } from 'drizzle-orm/pg-core'
import { roles } from '../../../shared/domain/access/roles'

export const roleEnum = pgEnum('role', roles)

const at = (name: string) => timestamp(name, { withTimezone: true, mode: 'date' })

export const practices = pgTable('practices', {
  id: uuid('id').primaryKey().defaultRandom(),
  name: text('name').notNull(),
  phone: text('phone').notNull().default(''),
  version: integer('version').notNull().default(1),
  disabledAt: at('disabled_at'),
  createdAt: at('created_at').notNull().defaultNow(),
}, table => [
  uniqueIndex('practices_name_key').on(sql`lower(${table.name})`),
  check('practices_name_check', sql`length(${table.name}) between 1 and 120`),
])

export const users = pgTable('users', {
  id: uuid('id').primaryKey().defaultRandom(),
  email: text('email').notNull(),
  name: text('name').notNull(),
  role: roleEnum('role').notNull(),
  maySign: boolean('may_sign').notNull().default(false),
  guidanceLead: boolean('guidance_lead').notNull().default(false),
  /** argon2id, with its parameters inside. Null until the invitation is accepted. */
  passwordHash: text('password_hash'),
  /** Made by the demo seed; refused at sign-in when the demo setting is off. */
  demo: boolean('demo').notNull().default(false),
  shortcuts: boolean('shortcuts').notNull().default(true),
  version: integer('version').notNull().default(1),
  disabledAt: at('disabled_at'),
  createdAt: at('created_at').notNull().defaultNow(),
}, table => [
  uniqueIndex('users_email_key').on(sql`lower(${table.email})`),
  check('users_name_check', sql`length(${table.name}) between 1 and 120`),
])

export const memberships = pgTable('memberships', {
  userId: uuid('user_id').notNull().references(() => users.id),
  practiceId: uuid('practice_id').notNull().references(() => practices.id),
  createdAt: at('created_at').notNull().defaultNow(),
}, table => [
  primaryKey({ name: 'memberships_pkey', columns: [table.userId, table.practiceId] }),
  index('memberships_practice_idx').on(table.practiceId),
])

/** One row a sign-in; the row, not the cookie, decides on every request. */
export const sessions = pgTable('sessions', {
  /** SHA-256 of the random id that the cookie carries, hex. */
  idHash: text('id_hash').primaryKey(),
  userId: uuid('user_id').notNull().references(() => users.id),
  createdAt: at('created_at').notNull().defaultNow(),
  lastSeenAt: at('last_seen_at').notNull().defaultNow(),
  expiresAt: at('expires_at').notNull(),
  endedAt: at('ended_at'),
}, table => [
  /** When each account was seen last. */
  index('sessions_user_seen_idx').on(table.userId, table.lastSeenAt),
  index('sessions_open_user_idx').on(table.userId).where(sql`${table.endedAt} is null`),
])

export const invitations = pgTable('invitations', {
  id: uuid('id').primaryKey().defaultRandom(),
  userId: uuid('user_id').notNull().references(() => users.id),
  /** SHA-256 of the token in the link, hex. Null until the mail job mints one. */
  tokenHash: text('token_hash'),
  invitedById: uuid('invited_by_id').notNull().references(() => users.id),
  createdAt: at('created_at').notNull().defaultNow(),
  expiresAt: at('expires_at').notNull(),
  acceptedAt: at('accepted_at'),
}, table => [
  uniqueIndex('invitations_token_key').on(table.tokenHash),
  index('invitations_user_idx').on(table.userId),
])
