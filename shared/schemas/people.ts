import { z } from 'zod'
import { roles } from '../domain/access/roles'
import { auditActions } from '../domain/access/audit'
import { leastPasswordLength } from '../domain/access/password'
import { mailAddress, optionalText, pageQuery, requiredText } from './common'

export const inviteSchema = z.strictObject({
  name: requiredText(120, 'Give the person\'s name.'),
  email: mailAddress,
  role: z.enum(roles, { error: 'Choose a role.' }),
  maySign: z.boolean(),
  guidanceLead: z.boolean(),
  practiceIds: z.array(z.uuid()).max(50),
}).refine(value => value.role !== 'orderer' || value.practiceIds.length > 0, { path: ['practiceIds'], message: 'An ordering clinician belongs to at least one practice.' })

export const changeUserSchema = z.strictObject({
  name: requiredText(120, 'Give the person\'s name.'),
  role: z.enum(roles),
  maySign: z.boolean(),
  guidanceLead: z.boolean(),
  practiceIds: z.array(z.uuid()).max(50),
  disabled: z.boolean(),
}).refine(value => value.role !== 'orderer' || value.practiceIds.length > 0, { path: ['practiceIds'], message: 'An ordering clinician belongs to at least one practice.' })

export const practiceSchema = z.strictObject({
  name: requiredText(120, 'Give the practice a name.'),
  phone: optionalText(60),
  disabled: z.boolean().default(false),
})

export const preferencesSchema = z.strictObject({ shortcuts: z.boolean() })

/** The random part of a link that a message carries: 256 bits in base64url. */
export const secretParams = z.strictObject({ token: z.string().regex(/^[\w-]{22,86}$/) })

/** At least as long as is needed where it is the only factor; no rule on which characters. The server also refuses easy ones. */
export const passwordSchema = z.string()
  .refine(value => [...value.normalize('NFKC')].length >= leastPasswordLength, `Use at least ${leastPasswordLength} characters; a few words in a row are fine.`).max(200, 'At most 200 characters.')

export const acceptInvitationSchema = z.strictObject({ password: passwordSchema })

export const auditQuery = pageQuery.extend({
  actor: z.string().trim().max(120).optional(),
  action: z.enum(auditActions as [string, ...string[]]).optional(),
  reference: z.string().trim().max(40).optional(),
  from: z.iso.date().optional(),
  to: z.iso.date().optional(),
})
