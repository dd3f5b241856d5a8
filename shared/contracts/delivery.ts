import { z } from 'zod'
import { idSchema, nameSchema, personSchema, timestampSchema } from './common'
import { handOverReleaseSchema } from './hand-over-desk'
import { reasonSchema } from './hand-over'
import { layoutDocumentSchema } from './layout'
import { emailSchema } from './session'

/** How long a link to a hand-over works unless the sender says otherwise, and at most, in days. */
export const LINK_DAYS = 90
export const MAX_LINK_DAYS = 730

/** Recipients named in one sending at most. */
export const MAX_RECIPIENTS = 50

const daysSchema = z
  .number({ error: 'Give a number of days.' })
  .int('Give a whole number of days.')
  .min(1, 'A link works for a day at least.')
  .max(MAX_LINK_DAYS, `A link works for ${MAX_LINK_DAYS} days at most.`)

const messageSchema = z.string().trim().max(2000, 'Keep the message within 2000 characters.')

export const recipientNameSchema = z
  .object({ name: nameSchema, email: emailSchema })
  .meta({ id: 'RecipientName' })
export type RecipientName = z.infer<typeof recipientNameSchema>

/**
 * POST /api/hand-overs/:handOverId/deliveries. `earlier` sends it to the recipients of the hand-over it replaces as well.
 * 409 IN_USE for an address that it was sent to already: send that one again instead.
 */
export const deliverySendSchema = z
  .object({
    recipients: z.array(recipientNameSchema).max(MAX_RECIPIENTS),
    earlier: z.boolean().default(false),
    days: daysSchema.default(LINK_DAYS),
    message: messageSchema.default(''),
  })
  .meta({ id: 'DeliverySend' })
export type DeliverySend = z.input<typeof deliverySendSchema>

/** POST /api/recipients/:recipientId/send, PATCH /api/recipients/:recipientId: days from now on. */
export const linkDaysSchema = z.object({ days: daysSchema.default(LINK_DAYS) }).meta({ id: 'LinkDays' })

/** Somebody a hand-over was sent to, as the group sees them. */
export const recipientSchema = z
  .object({
    id: idSchema,
    name: z.string(),
    email: z.string(),
    /** The address has an account: it sees the hand-over there as well. */
    hasAccount: z.boolean(),
    state: z.enum(['waiting', 'sent', 'opened', 'acknowledged', 'expired', 'revoked', 'not delivered']),
    /** How often it was sent; only the last link works. */
    sent: z.number().int().positive(),
    sentBy: personSchema.nullable(),
    /** When it was put on its way; the mail server may have taken it later. */
    sentAt: timestampSchema,
    expiresAt: timestampSchema,
    revokedAt: timestampSchema.nullable(),
    openedAt: timestampSchema.nullable(),
    acknowledgedAt: timestampSchema.nullable(),
    /** The name they gave with it. */
    acknowledgedBy: z.string().nullable(),
  })
  .meta({ id: 'Recipient' })
export type Recipient = z.infer<typeof recipientSchema>

/** One file that a recipient took. */
export const downloadSchema = z
  .object({
    recipientId: idSchema,
    recipient: z.string(),
    file: z.string(),
    layout: z.string(),
    via: z.enum(['link', 'account']),
    at: timestampSchema,
  })
  .meta({ id: 'Download' })
export type DownloadRecord = z.infer<typeof downloadSchema>

const tableNameSchema = z.string().max(300)

/** A question on a table, or on the whole for null, with its answer. */
export const questionSchema = z
  .object({
    id: idSchema,
    table: z.string().nullable(),
    text: z.string(),
    askedAt: timestampSchema,
    /** The asker's name; another recipient of the hand-over is not named to recipients. */
    askedBy: z.string().nullable(),
    /** Asked by whoever looks at it. */
    own: z.boolean(),
    answer: z.object({ text: z.string(), by: z.string().nullable(), at: timestampSchema }).nullable(),
  })
  .meta({ id: 'Question' })
export type Question = z.infer<typeof questionSchema>

/** POST …/questions. */
export const questionAskSchema = z
  .object({
    table: tableNameSchema.nullable(),
    text: z
      .string()
      .trim()
      .min(3, 'Write the question.')
      .max(4000, 'Keep the question within 4000 characters.'),
  })
  .meta({ id: 'QuestionAsk' })
export type QuestionAsk = z.infer<typeof questionAskSchema>

/** POST /api/questions/:questionId/answer. 409 CONFLICT when a colleague was first. */
export const answerWriteSchema = z.object({ text: reasonSchema }).meta({ id: 'AnswerWrite' })

export const returnStandingSchema = z.enum(['new', 'taken', 'set aside']).meta({ id: 'ReturnStanding' })
export type ReturnStanding = z.infer<typeof returnStandingSchema>

/** A distribution that a recipient measured with a table and sent back. */
export const returnedFileSchema = z
  .object({
    id: idSchema,
    table: z.string(),
    name: z.string(),
    size: z.number().int(),
    sha256: z.string(),
    note: z.string(),
    /** How it was read: what the columns hold, the unit, and how many bins came of it. */
    reading: z.string(),
    sentBy: z.string(),
    at: timestampSchema,
    standing: returnStandingSchema,
    settledBy: personSchema.nullable(),
    settledAt: timestampSchema.nullable(),
  })
  .meta({ id: 'ReturnedFile' })
export type ReturnedFile = z.infer<typeof returnedFileSchema>

/** POST …/returned-files, multipart: the file, and this as the JSON field `settings`. */
export const returnSendSchema = z
  .object({ table: tableNameSchema, note: messageSchema.default('') })
  .meta({ id: 'ReturnSend' })
export type ReturnSend = z.input<typeof returnSendSchema>

/** PUT /api/returned-files/:returnedFileId. */
export const returnSettleSchema = z
  .object({ standing: z.enum(['taken', 'set aside']) })
  .meta({ id: 'ReturnSettle' })

/** GET /api/hand-overs/:handOverId/deliveries: everything between a hand-over and its recipients, for the group. */
export const deliveriesSchema = z
  .object({
    recipients: z.array(recipientSchema),
    downloads: z.array(downloadSchema),
    questions: z.array(questionSchema),
    returned: z.array(returnedFileSchema),
    /** Recipients of the hand-over that this one replaces, whom it was not sent to. */
    earlier: z.array(recipientNameSchema),
  })
  .meta({ id: 'Deliveries' })
export type Deliveries = z.infer<typeof deliveriesSchema>

const sheetSchema = handOverReleaseSchema.pick({
  frozen: true,
  tables: true,
  files: true,
  picture: true,
  archive: true,
})

/** What a released hand-over shows to whoever may look at it, from the group or not. */
export type ReleasedSheet = z.infer<typeof sheetSchema>

/** The page of a hand-over as its recipient sees it: GET /api/received/:token, GET /api/hand-overs/:handOverId/received. */
export const receivedSchema = sheetSchema
  .extend({
    handOverId: idSchema,
    via: z.enum(['link', 'account']),
    recipient: recipientNameSchema,
    expiresAt: timestampSchema,
    acknowledged: z.object({ at: timestampSchema, by: z.string() }).nullable(),
    withdrawn: z.object({ at: timestampSchema, reason: z.string() }).nullable(),
    /** A later hand-over took its place; `sent` says whether this recipient has it too, `id` names it where the account shows it. */
    replacedBy: z.object({ number: z.number().int(), sent: z.boolean(), id: idSchema.nullable() }).nullable(),
    /** Layouts of the group that are on offer, by value; those of the house are known everywhere. */
    layouts: z.array(z.object({ id: idSchema, name: z.string(), document: layoutDocumentSchema })),
    questions: z.array(questionSchema),
    /** What this recipient sent back. */
    returned: z.array(returnedFileSchema.omit({ settledBy: true })),
  })
  .meta({ id: 'Received' })
export type Received = z.infer<typeof receivedSchema>

/** POST …/acknowledgement: who received it. */
export const acknowledgeSchema = z.object({ name: nameSchema }).meta({ id: 'Acknowledge' })

/** GET /api/received: the hand-overs that were sent to whoever is signed in. */
export const receivedListSchema = z
  .object({
    handOvers: z.array(
      z.object({
        id: idSchema,
        number: z.number().int(),
        title: z.string(),
        group: z.string(),
        polymer: z.string(),
        sentAt: timestampSchema,
        acknowledgedAt: timestampSchema.nullable(),
        withdrawn: z.boolean(),
        replacedBy: z.number().int().nullable(),
      }),
    ),
  })
  .meta({ id: 'ReceivedList' })
export type ReceivedList = z.infer<typeof receivedListSchema>
export type ReceivedEntry = ReceivedList['handOvers'][number]
