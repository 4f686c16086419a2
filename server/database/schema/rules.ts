import { jsonb, pgTable, text, timestamp, uniqueIndex, uuid, integer } from 'drizzle-orm/pg-core'
import type { Guidance } from '../../../shared/domain/guidance/types'
import type { Policy } from '../../../shared/domain/policy/types'

const at = (name: string) => timestamp(name, { withTimezone: true, mode: 'date' })

/** Only added. The version in force is the newest whose time has come. */
export const guidanceVersions = pgTable('guidance_versions', {
  id: uuid('id').primaryKey().defaultRandom(),
  label: text('label').notNull(),
  content: jsonb('content').$type<Guidance>().notNull(),
  signedBy: text('signed_by').notNull(),
  effectiveFrom: at('effective_from').notNull(),
  createdAt: at('created_at').notNull().defaultNow(),
}, table => [uniqueIndex('guidance_versions_label_key').on(table.label)])

/** Only added. */
export const policyVersions = pgTable('policy_versions', {
  id: uuid('id').primaryKey().defaultRandom(),
  label: text('label').notNull(),
  content: jsonb('content').$type<Policy>().notNull(),
  signedBy: text('signed_by').notNull(),
  effectiveFrom: at('effective_from').notNull(),
  createdAt: at('created_at').notNull().defaultNow(),
}, table => [uniqueIndex('policy_versions_label_key').on(table.label)])

export const scanners = pgTable('scanners', {
  id: uuid('id').primaryKey().defaultRandom(),
  name: text('name').notNull(),
  place: text('place').notNull(),
  fieldStrengthTesla: text('field_strength_tesla').notNull(),
  /** Free words on IV hours, shown at booking. */
  ivHours: text('iv_hours').notNull(),
  position: integer('position').notNull(),
}, table => [uniqueIndex('scanners_name_key').on(table.name)])
