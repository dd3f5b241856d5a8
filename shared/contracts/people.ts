import { z } from 'zod'
import { idSchema, nameSchema, personSchema, roleSchema, timestampSchema } from './common'
import { emailSchema, passwordSchema } from './session'

/** How long an invitation can be taken up, in days, and a link for a new password, in minutes. */
export const INVITATION_DAYS = 7
export const RESET_MINUTES = 60

/** Someone in a group, as the others of it see them. */
export const memberSchema = z
  .object({ person: personSchema, email: z.string(), role: roleSchema, since: timestampSchema })
  .meta({ id: 'Member' })
export type GroupMember = z.infer<typeof memberSchema>

/** PATCH /api/groups/:groupId/members/:userId. 409 LAST_OWNER when nobody would be left to run the group. */
export const roleChangeSchema = z.object({ role: roleSchema }).meta({ id: 'RoleChange' })
export type RoleChange = z.infer<typeof roleChangeSchema>

/** An invitation that nobody has taken up or revoked yet. */
export const invitationSchema = z
  .object({
    id: idSchema,
    email: z.string(),
    role: roleSchema,
    invitedBy: personSchema.nullable(),
    createdAt: timestampSchema,
    expiresAt: timestampSchema,
    expired: z.boolean(),
    /** How often it has been sent; only the last link works. */
    sent: z.number().int().positive(),
  })
  .meta({ id: 'Invitation' })
export type Invitation = z.infer<typeof invitationSchema>

/** POST /api/groups/:groupId/invitations. 409 ALREADY_MEMBER; 409 IN_USE while another invitation to the address is open. */
export const inviteSchema = z.object({ email: emailSchema, role: roleSchema }).meta({ id: 'Invite' })
export type Invite = z.infer<typeof inviteSchema>

/** Why a link does not work, in `details` of LINK_INVALID. */
export const linkFaultSchema = z.object({ reason: z.enum(['unknown', 'used', 'revoked', 'expired']) })
export type LinkFault = z.infer<typeof linkFaultSchema>['reason']

/** GET /api/join/:token: what the link leads to, for whoever holds it. */
export const joinOfferSchema = z
  .object({
    groupName: z.string(),
    demo: z.boolean(),
    role: roleSchema,
    email: z.string(),
    invitedBy: personSchema.nullable(),
    expiresAt: timestampSchema,
    /** Someone has an account with this address: sign in, then join. */
    hasAccount: z.boolean(),
  })
  .meta({ id: 'JoinOffer' })
export type JoinOffer = z.infer<typeof joinOfferSchema>

/** POST /api/join/:token/account: someone new joins under the address the invitation went to. */
export const joinNewSchema = z.object({ name: nameSchema, password: passwordSchema }).meta({ id: 'JoinNew' })
export type JoinNew = z.infer<typeof joinNewSchema>

/** POST /api/password-resets. The answer is the same whether the address is known or not. */
export const resetRequestSchema = z.object({ email: emailSchema }).meta({ id: 'ResetRequest' })
export type ResetRequest = z.infer<typeof resetRequestSchema>

/** POST /api/password-resets/:token. */
export const resetSchema = z.object({ password: passwordSchema }).meta({ id: 'Reset' })
export type Reset = z.infer<typeof resetSchema>

/** PATCH /api/account. */
export const accountUpdateSchema = z.object({ name: nameSchema }).meta({ id: 'AccountUpdate' })
export type AccountUpdate = z.infer<typeof accountUpdateSchema>

/** POST /api/account/password. 401 SIGN_IN_FAILED with field `current` when that is not the password of today. */
export const passwordChangeSchema = z
  .object({ current: z.string().min(1, 'Type your password of today.').max(256), password: passwordSchema })
  .meta({ id: 'PasswordChange' })
export type PasswordChange = z.infer<typeof passwordChangeSchema>

/** PUT /api/account/current-group. */
export const groupChoiceSchema = z.object({ groupId: idSchema }).meta({ id: 'GroupChoice' })
export type GroupChoice = z.infer<typeof groupChoiceSchema>

/** An e-mail of the group that has not reached a mail server. */
export const undeliveredMailSchema = z
  .object({
    id: idSchema,
    to: z.string(),
    subject: z.string(),
    createdAt: timestampSchema,
    /** When it was given up; null while it is still tried. */
    failedAt: timestampSchema.nullable(),
    lastError: z.string().nullable(),
  })
  .meta({ id: 'UndeliveredMail' })
export type UndeliveredMail = z.infer<typeof undeliveredMailSchema>
