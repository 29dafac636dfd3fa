import { z } from 'zod'
import { roles } from '@/lib/domain/access'
import { shortText, show, uuid } from '@/lib/schemas/common'

export const passwordLimits = { min: 12, max: 200 } as const

/** An address as it is kept: trimmed, lower-case. */
export const emailSchema = z
  .string({ error: 'The e-mail address is missing.' })
  .trim()
  .toLowerCase()
  .max(254, 'An e-mail address has at most 254 characters.')
  .pipe(z.email({ error: (issue) => `Found ${show(issue.input)}; an e-mail address is needed.` }))

/** A password being chosen; one that is only compared needs no rules. */
export const newPasswordSchema = z
  .string({ error: 'The password is missing.' })
  .min(passwordLimits.min, `A password needs at least ${passwordLimits.min} characters.`)
  .max(passwordLimits.max, `A password may have at most ${passwordLimits.max} characters.`)
  .refine(
    (text) => new Set(text).size > 3,
    'Choose a password of more than three different characters.',
  )

export const typedPasswordSchema = z
  .string({ error: 'The password is missing.' })
  .min(1, 'The password is missing.')
  .max(passwordLimits.max, `A password has at most ${passwordLimits.max} characters.`)

/** A zone of the IANA time zone database, such as America/Denver. */
export const zoneSchema = z.string({ error: 'The time zone is missing.' }).refine(isZone, {
  error: (issue) => `Found ${show(issue.input)}; a zone such as America/Denver is needed.`,
})

function isZone(text: string): boolean {
  try {
    return Boolean(text) && Boolean(new Intl.DateTimeFormat('en-US', { timeZone: text }))
  } catch {
    return false
  }
}

export const roleSchema = z.enum(roles, {
  error: (issue) => `Found ${show(issue.input)}; allowed: ${roles.join(', ')}.`,
})

export const rolesSchema = z
  .array(roleSchema, { error: 'The roles are missing.' })
  .min(1, 'Choose at least one role.')
  .transform((held) => [...new Set(held)])

/** `id` is made by the client, so that a second submit is the same invitation. */
export const invitationInput = z.strictObject({
  id: uuid,
  name: shortText('The name'),
  email: emailSchema,
  roles: rolesSchema,
  zone: zoneSchema,
})
export type InvitationInput = z.infer<typeof invitationInput>

export const personChange = z
  .strictObject({
    name: shortText('The name').optional(),
    zone: zoneSchema.optional(),
    roles: rolesSchema.optional(),
    active: z.boolean({ error: 'Active is true or false.' }).optional(),
  })
  .refine((change) => Object.keys(change).length > 0, 'Nothing to change was sent.')
export type PersonChange = z.infer<typeof personChange>

export const standings = ['active', 'invited', 'disabled'] as const

export const personSchema = z
  .object({
    id: uuid,
    name: z.string(),
    email: z.string(),
    zone: z.string(),
    roles: z.array(roleSchema),
    standing: z.enum(standings),
    /** Null where the person never signed in. */
    lastSignInAt: z.string().nullable(),
  })
  .meta({ id: 'Person' })
export type Person = z.infer<typeof personSchema>

export const personListSchema = z.object({ items: z.array(personSchema) })

export const meSchema = z
  .object({
    id: uuid,
    name: z.string(),
    email: z.string(),
    zone: z.string(),
    roles: z.array(roleSchema),
  })
  .meta({ id: 'Me' })
export type Me = z.infer<typeof meSchema>

export const meChange = z.strictObject({ name: shortText('Your name'), zone: zoneSchema })
export type MeChange = z.infer<typeof meChange>

export const passwordChange = z.strictObject({
  current: typedPasswordSchema,
  password: newPasswordSchema,
})
export type PasswordChange = z.infer<typeof passwordChange>

export const tokenInput = z.strictObject({ id: uuid, name: shortText('The name of the token', 80) })
export type TokenInput = z.infer<typeof tokenInput>

export const tokenSchema = z
  .object({
    id: uuid,
    name: z.string(),
    createdAt: z.string(),
    lastUsedAt: z.string().nullable(),
  })
  .meta({ id: 'ApiToken' })
export type ApiToken = z.infer<typeof tokenSchema>

export const tokenListSchema = z.object({ items: z.array(tokenSchema) })

/** The secret is in this answer and nowhere else. */
export const newTokenSchema = tokenSchema.extend({ secret: z.string() }).meta({ id: 'NewApiToken' })
export type NewApiToken = z.infer<typeof newTokenSchema>

export const resetRequest = z.strictObject({ email: emailSchema })
export type ResetRequest = z.infer<typeof resetRequest>

export const linkAcceptance = z.strictObject({
  secret: z.string({ error: 'The link is missing.' }).min(1, 'The link is missing.').max(100),
  password: newPasswordSchema,
})
export type LinkAcceptance = z.infer<typeof linkAcceptance>

export const saidSchema = z.object({ message: z.string() })
export const acceptedSchema = z.object({ email: z.string() })

export const credentialsInput = z.object({ email: emailSchema, password: typedPasswordSchema })
