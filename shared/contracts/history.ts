import { z } from 'zod'
import { idSchema, personSchema, timestampSchema } from './common'

/** What can happen in a group, each under a name that stays. A new kind of event is added here. */
export const historyActionSchema = z
  .enum([
    'group founded',
    'group renamed',
    'defaults changed',
    'member invited',
    'invitation sent again',
    'invitation revoked',
    'member joined',
    'role changed',
    'member left',
    'member removed',
    'polymer added',
    'polymer changed',
    'polymer deleted',
    'state point added',
    'state point changed',
    'state point deleted',
    'mapping added',
    'mapping changed',
    'mapping deleted',
    'data brought in',
    'data changed',
    'data deleted',
    'potential saved',
    'potential deleted',
    'decision recorded',
    'layout added',
    'layout changed',
    'layout archived',
    'layout restored',
    'default layout changed',
    'hand-over created',
    'hand-over changed',
    'hand-over deleted',
    'review asked',
    'review withdrawn',
    'commented',
    'term questioned',
    'term accepted',
    'warning accepted',
    'signed off',
    'sent back',
    'released',
    'withdrawn',
    'hand-over sent',
    'hand-over opened',
    'file downloaded',
    'receipt acknowledged',
    'question asked',
    'question answered',
    'file sent back',
    'link revoked',
    'link sent again',
    'link extended',
    'file taken',
    'file set aside',
    'key made',
    'key revoked',
  ])
  .meta({ id: 'HistoryAction' })
export type HistoryAction = z.infer<typeof historyActionSchema>

/** Small facts about an event, such as the old and the new value of what changed. */
export const historyDetailsSchema = z.record(
  z.string(),
  z.union([z.string(), z.number(), z.boolean(), z.null()]),
)
export type HistoryDetails = z.infer<typeof historyDetailsSchema>

/** One thing that somebody did. */
export const historyEventSchema = z
  .object({
    id: z.string(),
    at: timestampSchema,
    action: historyActionSchema,
    /** null: someone without an account, named by `by`, or someone whose account is gone. */
    person: personSchema.nullable(),
    /** A recipient, a script's key: whoever acted without being signed in, or how. */
    by: z.string().nullable(),
    subject: z.object({ kind: z.string(), id: idSchema.nullable(), name: z.string() }),
    details: historyDetailsSchema,
  })
  .meta({ id: 'HistoryEvent' })
export type HistoryEvent = z.infer<typeof historyEventSchema>

/** Events on one page. */
export const HISTORY_PAGE = 50

/** Events in one exported file at most: the newest of those that fit the filter. */
export const HISTORY_EXPORT = 50_000

/** Which events of a group: all of what is given must fit. Times are the first and the first no more asked for. */
export const historyFilterSchema = z.object({
  person: idSchema.optional(),
  action: historyActionSchema.optional(),
  /** Part of the subject's name, in any capitals. */
  subject: z.string().trim().max(120).optional(),
  from: z.iso.datetime({ offset: true }).optional(),
  to: z.iso.datetime({ offset: true }).optional(),
})
export type HistoryFilter = z.infer<typeof historyFilterSchema>

/** GET /api/groups/:groupId/history. `before` is the id of the last event of the page before. */
export const historyQuerySchema = historyFilterSchema.extend({
  before: z
    .string()
    .regex(/^\d{1,18}$/, 'This is no event.')
    .optional(),
})
export type HistoryQuery = z.infer<typeof historyQuerySchema>

/** The newest events first; `more` says that older ones fit as well. */
export const historyPageSchema = z
  .object({ events: z.array(historyEventSchema), more: z.boolean() })
  .meta({ id: 'HistoryPage' })
export type HistoryPage = z.infer<typeof historyPageSchema>
