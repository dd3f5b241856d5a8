import { z } from 'zod'
import { coordinateKindSchema, idSchema, personSchema, revisionSchema, timestampSchema } from './common'
import { decisionChoiceSchema, verdictNumbersSchema } from './distribution'
import {
  frozenHandOverSchema,
  handOverCommentSchema,
  handOverLayoutSchema,
  handOverReviewSchema,
  handOverSelectionSchema,
  handOverStandingSchema,
  reviewMarkSchema,
  warningAnswerSchema,
} from './hand-over'
import { silhouetteSchema } from './mapping'

/** A hand-over in a list. */
export const handOverSchema = z
  .object({
    id: idSchema,
    polymerId: idSchema,
    mappingId: idSchema,
    mapping: z.string(),
    statePointId: idSchema,
    statePoint: z.object({
      temperature: z.number(),
      pressure: z.number().nullable(),
      phase: z.string(),
      composition: z.string(),
    }),
    title: z.string(),
    standing: handOverStandingSchema,
    number: z.number().int().nullable(),
    revision: revisionSchema,
    author: personSchema.nullable(),
    reviewer: personSchema.nullable(),
    changedAt: timestampSchema,
    signedOffBy: personSchema.nullable(),
    signedOffAt: timestampSchema.nullable(),
    releasedAt: timestampSchema.nullable(),
    /** Number of the hand-over this one takes the place of. */
    replaces: z.number().int().nullable(),
    /** A later one that took its place. */
    replacedBy: z.object({ id: idSchema, number: z.number().int() }).nullable(),
    withdrawn: z.object({ by: personSchema.nullable(), at: timestampSchema, reason: z.string() }).nullable(),
  })
  .meta({ id: 'HandOver' })
export type HandOver = z.infer<typeof handOverSchema>

const placeSchema = z.object({
  room: z.enum(['bench', 'intake', 'correlation', 'mapping', 'layout', 'terms']),
  termId: idSchema.optional(),
  firstTermId: idSchema.optional(),
  secondTermId: idSchema.optional(),
})

/** A point that must be met before review and release. */
export const checklistItemSchema = z
  .object({
    code: z.enum([
      'TERMS_COVERED',
      'VERDICTS_RECORDED',
      'WARNINGS_ANSWERED',
      'DATA_FIT_MAPPING',
      'LAYOUT_STATED',
    ]),
    title: z.string(),
    met: z.boolean(),
    lines: z.array(z.object({ text: z.string(), open: z.boolean(), place: placeSchema.nullable() })),
  })
  .meta({ id: 'HandOverChecklistItem' })

const answeredWarningSchema = z.object({
  code: z.string(),
  message: z.string(),
  action: z.string(),
  answer: warningAnswerSchema.nullable(),
})
export type AnsweredWarning = z.infer<typeof answeredWarningSchema>

const evidenceSchema = z.object({
  /** Why no table can be made; null where it can. */
  refused: z.string().nullable(),
  /** Bounds of the table for each axis, nm or rad. */
  domain: z.array(z.tuple([z.number(), z.number()])),
  rows: z.array(z.number().int()),
  lowestAt: z.array(z.number()),
  /** As `silhouette` of a frozen table. */
  silhouette: z.array(z.number()),
  independentSamples: z.number().nullable(),
  inefficiency: z.number().nullable(),
  basins: z.number().int().nullable(),
  form: z.object({ name: z.string(), deviation: z.number().nullable() }).nullable(),
})

/** A term of the mapping in a hand-over, with what a reviewer looks at. */
export const handOverTermSchema = z
  .object({
    id: idSchema,
    kind: coordinateKindSchema,
    types: z.array(z.string()),
    name: z.string(),
    state: z.enum(['covered', 'no data', 'not inverted', 'stale', 'refused', 'left out']),
    leftOut: z.object({ by: z.enum(['mapping', 'hand-over']), reason: z.string() }).nullable(),
    /** Its energy is in a joint table. */
    joined: z.boolean(),
    potentialId: idSchema.nullable(),
    savedBy: personSchema.nullable(),
    savedAt: timestampSchema.nullable(),
    /** Name of the file its data came in. */
    source: z.string().nullable(),
    measured: silhouetteSchema.nullable(),
    evidence: evidenceSchema.nullable(),
    warnings: z.array(answeredWarningSchema),
    mark: z.object({ mark: reviewMarkSchema, by: personSchema.nullable(), at: timestampSchema }).nullable(),
  })
  .meta({ id: 'HandOverTerm' })
export type HandOverTerm = z.infer<typeof handOverTermSchema>

/** Two terms with joint data, both handed over. */
export const handOverPairSchema = z
  .object({
    jointDistributionId: idSchema,
    firstTermId: idSchema,
    secondTermId: idSchema,
    name: z.string(),
    numbers: verdictNumbersSchema,
    decision: z
      .object({
        choice: decisionChoiceSchema,
        reason: z.string(),
        decidedBy: personSchema.nullable(),
        decidedAt: timestampSchema,
      })
      .nullable(),
    /** A joint table takes the place of both single ones. */
    together: z.boolean(),
    /** Why it does not, although that was decided. */
    apart: z.string().nullable(),
    evidence: evidenceSchema.nullable(),
    warnings: z.array(answeredWarningSchema),
  })
  .meta({ id: 'HandOverPair' })
export type HandOverPair = z.infer<typeof handOverPairSchema>

/** GET /api/hand-overs/:handOverId: the draft, or what was reviewed, with everything there is to say about it. */
export const handOverDetailSchema = handOverSchema
  .extend({
    notes: z.string(),
    selection: handOverSelectionSchema,
    layout: handOverLayoutSchema.extend({ name: z.string().nullable() }),
    /** Empty once released: what is frozen stands in the release. */
    checklist: z.array(checklistItemSchema),
    terms: z.array(handOverTermSchema),
    pairs: z.array(handOverPairSchema),
    /** Something changed since review was asked for: sign-off and release are refused. */
    changed: z.boolean(),
    reviews: z.array(handOverReviewSchema),
    comments: z.array(handOverCommentSchema),
    /** Who may be asked for a review. */
    reviewers: z.array(personSchema),
    /** Whether the one who asks may sign off: a reviewer or owner who neither made it nor asked for the review. */
    mayDecide: z.boolean(),
  })
  .meta({ id: 'HandOverDetail' })
export type HandOverDetail = z.infer<typeof handOverDetailSchema>

/** A file of a release. */
export const releasedFileSchema = z.object({
  path: z.string(),
  mediaType: z.string(),
  size: z.number().int(),
  sha256: z.string(),
})

/** A table of a release, small enough to list. */
export const releasedTableSchema = z
  .object({
    id: idSchema,
    name: z.string(),
    path: z.string(),
    kinds: z.array(coordinateKindSchema),
    types: z.array(z.array(z.string())),
    domain: z.array(z.tuple([z.number(), z.number()])),
    rows: z.array(z.number().int()),
    lowestAt: z.array(z.number()),
    silhouette: z.array(z.number()),
    /** The first lines of its file. */
    firstLines: z.array(z.string()),
  })
  .meta({ id: 'ReleasedTable' })
export type ReleasedTable = z.infer<typeof releasedTableSchema>

/** GET /api/hand-overs/:handOverId/release. */
export const handOverReleaseSchema = handOverSchema
  .extend({
    frozen: frozenHandOverSchema,
    tables: z.array(releasedTableSchema),
    files: z.array(releasedFileSchema),
    /** The mapping as a picture, an SVG document. */
    picture: z.string(),
    archive: z.object({ fileName: z.string(), size: z.number().int(), sha256: z.string() }),
  })
  .meta({ id: 'HandOverRelease' })
export type HandOverRelease = z.infer<typeof handOverReleaseSchema>

const fromRecipientSchema = z.object({
  id: idSchema,
  handOverId: idSchema,
  number: z.number().int(),
  /** Name of the table; null is about the whole hand-over. */
  table: z.string().nullable(),
})

/** GET /api/groups/:groupId/waiting: what waits for the one who asks. */
export const waitingSchema = z
  .object({
    /** Reviews asked of me. */
    reviews: z.array(handOverSchema),
    /** Mine, sent back to me. */
    sentBack: z.array(handOverSchema),
    /** Mine, signed off and not released yet. */
    toRelease: z.array(handOverSchema),
    /** On tables of mine, without an answer. */
    questions: z.array(fromRecipientSchema.extend({ text: z.string() })),
    /** Measured with tables of mine and sent back, not looked at yet. */
    returned: z.array(fromRecipientSchema.extend({ name: z.string() })),
    /** Mappings with terms in use that have no data at a state point where others have. */
    gaps: z.array(
      z.object({
        polymerId: idSchema,
        polymer: z.string(),
        mappingId: idSchema,
        mapping: z.string(),
        statePointId: idSchema,
        temperature: z.number(),
        withoutData: z.number().int(),
        terms: z.number().int(),
      }),
    ),
  })
  .meta({ id: 'Waiting' })
export type Waiting = z.infer<typeof waitingSchema>
