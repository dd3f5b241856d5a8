import { z } from 'zod'
import { idSchema, nameSchema, roleSchema } from './common'
import { groupDefaultsSchema } from './group'

export const MIN_PASSWORD_LENGTH = 10

export const emailSchema = z
  .string()
  .trim()
  .toLowerCase()
  .max(254)
  .pipe(z.email('This does not look like an e-mail address.'))
export const passwordSchema = z
  .string()
  .min(MIN_PASSWORD_LENGTH, `Use at least ${MIN_PASSWORD_LENGTH} characters.`)
  .max(256, 'Use at most 256 characters.')

export const membershipSchema = z
  .object({
    groupId: idSchema,
    groupName: z.string(),
    role: roleSchema,
    demo: z.boolean(),
    defaults: groupDefaultsSchema,
  })
  .meta({ id: 'Membership' })
export type Membership = z.infer<typeof membershipSchema>

export const signedInUserSchema = z
  .object({
    id: idSchema,
    name: z.string(),
    email: z.string(),
    memberships: z.array(membershipSchema),
    /** The group whose work the person looked at last, or the first they are in; null without any. */
    currentGroupId: idSchema.nullable(),
  })
  .meta({ id: 'SignedInUser' })
export type SignedInUser = z.infer<typeof signedInUserSchema>

/** One of the demo's people, offered on the sign-in page only when the demo is on. */
export const demoUserSchema = z
  .object({ id: idSchema, name: z.string(), role: roleSchema })
  .meta({ id: 'DemoUser' })
export type DemoUser = z.infer<typeof demoUserSchema>

/** POST /api/session/demo: sign in as one of the demo's people, without a password; 404 when the demo is off. */
export const demoSignInSchema = z.object({ userId: idSchema }).meta({ id: 'DemoSignIn' })
export type DemoSignIn = z.infer<typeof demoSignInSchema>

/** GET /api/session. The token goes with every write as the header X-CSRF-Token. */
export const sessionSchema = z
  .object({
    user: signedInUserSchema.nullable(),
    csrfToken: z.string(),
    demoUsers: z.array(demoUserSchema),
  })
  .meta({ id: 'Session' })
export type Session = z.infer<typeof sessionSchema>

/** POST /api/session. The password is not held to today's length rule: older ones must still work. */
export const signInSchema = z
  .object({ email: emailSchema, password: z.string().min(1, 'Type your password.').max(256) })
  .meta({ id: 'SignIn' })
export type SignIn = z.infer<typeof signInSchema>

/** POST /api/set-up: the first owner and the first group, by a link that works once. */
export const setUpSchema = z
  .object({
    token: z.string().min(1),
    groupName: nameSchema,
    name: nameSchema,
    email: emailSchema,
    password: passwordSchema,
  })
  .meta({ id: 'SetUp' })
export type SetUp = z.infer<typeof setUpSchema>
