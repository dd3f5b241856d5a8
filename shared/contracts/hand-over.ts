import { z } from 'zod'
import {
  angleUnitSchema,
  coordinateKindSchema,
  energyUnitSchema,
  idSchema,
  lengthUnitSchema,
  nameSchema,
  personSchema,
  revisionSchema,
  timestampSchema,
} from './common'
import { layoutRefSchema } from './layout'
import { mappingDocumentSchema } from './mapping'

/** How far a hand-over is. From `released` on it has a number and never changes; `withdrawn` keeps its files for the record. */
export const handOverStandingSchema = z
  .enum(['draft', 'in review', 'sent back', 'signed off', 'released', 'withdrawn'])
  .meta({ id: 'HandOverStanding' })
export type HandOverStanding = z.infer<typeof handOverStandingSchema>

const textSchema = z.string().trim().max(4000, 'Keep it within 4000 characters.')
/** Why something is so, or what should be mended: it stays on record. */
export const reasonSchema = z
  .string()
  .trim()
  .min(3, 'Say in a few words why: it stays on record.')
  .max(2000, 'Keep the reason within 2000 characters.')

/**
 * What of a mapping goes into a hand-over (document version 1): all terms in use, less those left out here; a joint table for
 * each pair whose recorded decision asks for one, less those kept apart here.
 */
export const handOverSelectionSchema = z
  .object({
    version: z.literal(1),
    leftOut: z.array(z.object({ termId: idSchema, reason: reasonSchema })).max(2000),
    apart: z
      .array(z.object({ firstTermId: idSchema, secondTermId: idSchema, reason: reasonSchema }))
      .max(2000),
  })
  .meta({ id: 'HandOverSelection' })
export type HandOverSelection = z.infer<typeof handOverSelectionSchema>

/** A hand-over of all that the mapping asks for. */
export const EVERYTHING: HandOverSelection = { version: 1, leftOut: [], apart: [] }

/**
 * How the files are written: a layout of the house in the units given, three columns for null; or one of the group in the version
 * given, with the units it has itself.
 */
export const handOverLayoutSchema = z
  .object({
    layoutId: layoutRefSchema.nullable(),
    layoutVersion: z.number().int().positive().nullable().optional(),
    length: lengthUnitSchema,
    angle: angleUnitSchema,
    energy: energyUnitSchema,
  })
  .meta({ id: 'HandOverLayout' })
export type HandOverLayout = z.infer<typeof handOverLayoutSchema>

/** A person's answer to a warning, "Keep, with reason"; it lapses when the input or the settings change. */
export const warningAnswerSchema = z
  .object({ code: z.string(), reason: z.string(), by: personSchema.nullable(), at: timestampSchema })
  .meta({ id: 'WarningAnswer' })
export type WarningAnswer = z.infer<typeof warningAnswerSchema>

/** PUT /api/potentials/:potentialId/answers and the same of a joint distribution. */
export const warningAnswerWriteSchema = z
  .object({ code: z.string().regex(/^[A-Z0-9_]{3,60}$/), reason: reasonSchema })
  .meta({ id: 'WarningAnswerWrite' })
export type WarningAnswerWrite = z.infer<typeof warningAnswerWriteSchema>

/** A reviewer's mark on a single term. */
export const reviewMarkSchema = z.enum(['questioned', 'accepted']).meta({ id: 'ReviewMark' })
export type ReviewMark = z.infer<typeof reviewMarkSchema>

/** POST /api/polymers/:polymerId/hand-overs. */
export const handOverCreateSchema = z
  .object({ mappingId: idSchema, statePointId: idSchema, title: nameSchema, notes: textSchema.default('') })
  .meta({ id: 'HandOverCreate' })
export type HandOverCreate = z.input<typeof handOverCreateSchema>

/** PATCH /api/hand-overs/:handOverId, of a draft or one that was sent back. */
export const handOverUpdateSchema = z
  .object({
    revision: revisionSchema,
    title: nameSchema.optional(),
    notes: textSchema.optional(),
    selection: handOverSelectionSchema.optional(),
    layout: handOverLayoutSchema.optional(),
  })
  .meta({ id: 'HandOverUpdate' })
export type HandOverUpdate = z.infer<typeof handOverUpdateSchema>

/** POST /api/hand-overs/:handOverId/review. */
export const reviewAskSchema = z
  .object({ revision: revisionSchema, reviewerId: idSchema, note: textSchema.default('') })
  .meta({ id: 'ReviewAsk' })
export type ReviewAsk = z.input<typeof reviewAskSchema>

/** POST to what a revision is enough for: take back, release. */
export const atRevisionSchema = z.object({ revision: revisionSchema }).meta({ id: 'AtRevision' })

/** POST /api/hand-overs/:handOverId/decision, a reviewer's. A note is needed to send back. */
export const reviewDecisionSchema = z
  .discriminatedUnion('outcome', [
    z.object({ outcome: z.literal('signed off'), revision: revisionSchema, note: textSchema.default('') }),
    z.object({ outcome: z.literal('sent back'), revision: revisionSchema, note: reasonSchema }),
  ])
  .meta({ id: 'ReviewDecision' })
export type ReviewDecision = z.input<typeof reviewDecisionSchema>

/** PUT /api/hand-overs/:handOverId/mark; null takes the mark away. */
export const markWriteSchema = z
  .object({ termId: idSchema, mark: reviewMarkSchema.nullable() })
  .meta({ id: 'ReviewMarkWrite' })

/** POST /api/hand-overs/:handOverId/comments; null is about the whole hand-over. */
export const commentWriteSchema = z
  .object({ termId: idSchema.nullable(), text: reasonSchema })
  .meta({ id: 'CommentWrite' })

/** POST /api/hand-overs/:handOverId/withdrawal. */
export const withdrawalSchema = z
  .object({ revision: revisionSchema, reason: reasonSchema })
  .meta({ id: 'Withdrawal' })

/** A comment on a hand-over or on one of its terms. */
export const handOverCommentSchema = z
  .object({
    id: idSchema,
    termId: idSchema.nullable(),
    text: z.string(),
    by: personSchema.nullable(),
    at: timestampSchema,
  })
  .meta({ id: 'HandOverComment' })
export type HandOverComment = z.infer<typeof handOverCommentSchema>

/** One time that a review was asked for, and what came of it; `lapsed`: what was reviewed had changed by then. */
export const handOverReviewSchema = z
  .object({
    askedBy: personSchema.nullable(),
    askedAt: timestampSchema,
    askedNote: z.string(),
    reviewer: personSchema.nullable(),
    outcome: z.enum(['signed off', 'sent back', 'taken back', 'lapsed']).nullable(),
    note: z.string(),
    decidedBy: personSchema.nullable(),
    decidedAt: timestampSchema.nullable(),
  })
  .meta({ id: 'HandOverReview' })
export type HandOverReview = z.infer<typeof handOverReviewSchema>

/** What a frozen table remembers of how it was made, in internal units; `kinds` and `types` are two for a joint table. */
export const frozenTableMetaSchema = z
  .object({
    version: z.literal(1),
    types: z.array(z.array(z.string())),
    beadOrders: z.array(z.string()),
    /** Settings of the inversion; null for a joint table, which takes the house's own. */
    settings: z.unknown().nullable(),
    /** Coordinates of the least energy, one or two. */
    lowestAt: z.array(z.number()),
    independentSamples: z.number().nullable(),
    /** Statistical inefficiency that counts were divided by. */
    inefficiency: z.number().nullable(),
    basins: z.number().int().nullable(),
    /** The analytic form the rows are written from, as text; null for the smoothed curve. */
    form: z.object({ name: z.string(), formula: z.string(), parameters: z.string() }).nullable(),
    warnings: z.array(z.object({ code: z.string(), message: z.string(), answer: z.string().nullable() })),
    input: z.object({ name: z.string(), sha256: z.string() }),
    /** Comment lines of the table as they were written, without the comment sign. */
    comments: z.array(z.string()),
    /** What `tableComments` was given but for units and checksum, so that another layout can state it in its own units. */
    commentInput: z.unknown(),
    savedBy: z.string().nullable(),
    savedOn: z.string().nullable(),
    /** Why two terms share a joint table. */
    reason: z.string().nullable(),
  })
  .meta({ id: 'FrozenTableMeta' })
export type FrozenTableMeta = z.infer<typeof frozenTableMetaSchema>

/** One line of what changed against the hand-over before. */
export const handOverDifferenceSchema = z
  .object({
    /** Names of the terms it is about; empty for all others or the whole. */
    about: z.string(),
    change: z.enum(['added', 'removed', 'changed', 'whole', 'same']),
    text: z.string(),
    /** Largest change of the energy in kT where both matter; null where there is none to tell. */
    largest: z.object({ kT: z.number(), coordinates: z.array(z.number()) }).nullable(),
  })
  .meta({ id: 'HandOverDifference' })
export type HandOverDifference = z.infer<typeof handOverDifferenceSchema>

/** A term that has no file of its own, and why. */
export const leftOutTermSchema = z.object({
  kind: coordinateKindSchema,
  name: z.string(),
  types: z.array(z.string()),
  reason: z.string(),
})

/** What a release freezes beside files and tables: everything a page or a data sheet says, by value (document version 1). */
export const frozenHandOverSchema = z
  .object({
    version: z.literal(1),
    number: z.number().int(),
    title: z.string(),
    notes: z.string(),
    group: z.string(),
    invented: z.boolean(),
    polymer: z.object({ name: z.string(), smiles: z.string(), formula: z.string(), mass: z.number() }),
    mapping: z.object({ name: z.string(), revision: z.number().int(), document: mappingDocumentSchema }),
    statePoint: z.object({
      temperature: z.number(),
      pressure: z.number().nullable(),
      phase: z.string(),
      composition: z.string(),
    }),
    /** The layout by value: its name and, for one of the group's, its document. */
    layout: handOverLayoutSchema.extend({ name: z.string(), document: z.unknown().nullable() }),
    madeBy: z.string().nullable(),
    signedOffBy: z.string().nullable(),
    signedOffAt: timestampSchema,
    releasedAt: timestampSchema,
    /** Number of the hand-over that this one takes the place of. */
    replaces: z.number().int().nullable(),
    leftOut: z.array(leftOutTermSchema),
    /** What whoever runs the tables must know. */
    points: z.array(z.object({ title: z.string(), text: z.string() })),
    differences: z.array(handOverDifferenceSchema),
    contentSha256: z.string(),
  })
  .meta({ id: 'FrozenHandOver' })
export type FrozenHandOver = z.infer<typeof frozenHandOverSchema>
