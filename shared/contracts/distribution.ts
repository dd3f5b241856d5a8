import { z } from 'zod'
import {
  coordinateKindSchema,
  coordinateUnitSchema,
  idSchema,
  numbersSchema,
  personSchema,
  timestampSchema,
} from './common'

export const MAX_FILE_BYTES = 20 * 1024 * 1024

/** The file as it came, kept compressed on the server. */
export const sourceFileSchema = z
  .object({
    name: z.string(),
    size: z.number().int(),
    sha256: z.string().regex(/^[0-9a-f]{64}$/),
    uploadedBy: personSchema.nullable(),
    uploadedAt: timestampSchema,
  })
  .meta({ id: 'SourceFile' })
export type SourceFile = z.infer<typeof sourceFileSchema>

/** Most blocks or chains of one distribution. */
export const MAX_BLOCKS = 200
/** All files of one upload together, in bytes. */
export const MAX_UPLOAD_BYTES = 64 * 1024 * 1024

export const blockKindSchema = z.enum(['time', 'chain']).meta({ id: 'BlockKind' })

const columnSchema = z.number().int().nonnegative()
const samplesSchema = z.number().positive().max(1e15).nullable()

/** How a text file is read as the distribution of one term (document version 1). Columns count from 0. */
export const intakeSettingsSchema = z
  .object({
    version: z.literal(1),
    kind: coordinateKindSchema,
    unit: coordinateUnitSchema,
    layout: z.enum(['centre', 'edges', 'samples']),
    value: z.enum(['count', 'density', 'probability']),
    /** `low` and `high` hold the same column unless the layout is edges. */
    columns: z.object({ low: columnSchema, high: columnSchema, value: columnSchema }),
    alreadyDivided: z.boolean(),
    independentSamples: samplesSchema,
    /** Columns of counts, one per block: the distribution is their sum. */
    blocks: z
      .object({ kind: blockKindSchema, columns: z.array(columnSchema).min(1).max(MAX_BLOCKS).readonly() })
      .nullable()
      .optional(),
  })
  .meta({
    id: 'IntakeSettings',
    description:
      'How a text file is read: columns count from 0; the unit is that of the file; low and high name the same column unless the layout is edges; independentSamples null takes every count as independent',
  })

/** How a text file is read as the joint distribution of two terms (document version 1). */
export const jointIntakeSettingsSchema = z
  .object({
    version: z.literal(1),
    kinds: z.tuple([coordinateKindSchema, coordinateKindSchema]),
    units: z.tuple([coordinateUnitSchema, coordinateUnitSchema]),
    layout: z.enum(['grid', 'samples']),
    value: z.enum(['count', 'density', 'probability']),
    columns: z.object({ x: columnSchema, y: columnSchema, value: columnSchema }),
    independentSamples: samplesSchema,
  })
  .meta({
    id: 'JointIntakeSettings',
    description:
      'How a text file of two coordinates is read; columns count from 0, units are those of the file',
  })

/**
 * POST /api/terms/:termId/distributions, multipart: `file`; any number of files `blocks` (stretches of time, in their order)
 * and `chains`; and this as the JSON field `settings`. Block files are read with the settings of the file and have its grid.
 */
export const distributionUploadSchema = z
  .object({
    statePointId: idSchema,
    settings: intakeSettingsSchema,
    /** `file` is the first block of this kind and the distribution the sum of all; null: `file` holds the whole. */
    firstOf: blockKindSchema.nullable().optional(),
  })
  .meta({ id: 'DistributionUpload' })
export type DistributionUpload = z.infer<typeof distributionUploadSchema>

/** PATCH /api/distributions/:distributionId: the number of independent samples the user states; null takes it back. */
export const distributionUpdateSchema = z
  .object({ independentSamples: samplesSchema })
  .meta({ id: 'DistributionUpdate' })
export type DistributionUpdate = z.infer<typeof distributionUpdateSchema>

/** Statistical inefficiency of the counts, from the scatter between blocks or chains; the larger of several. */
export const blockInefficiencySchema = z
  .object({
    kind: blockKindSchema,
    count: z.number().int(),
    inefficiency: z.number(),
    deviation: z.number(),
  })
  .meta({ id: 'BlockInefficiency' })

const blockingLevelSchema = z.object({
  length: z.number().int(),
  blocks: z.number().int(),
  inefficiency: z.number(),
  deviation: z.number(),
})

/** How strongly raw samples are correlated in their order in the file: evidence, not mixed into the inefficiency. */
export const sampleInefficiencySchema = z
  .object({
    samples: z.number().int(),
    autocorrelation: z.object({
      inefficiency: z.number(),
      deviation: z.number(),
      window: z.number().int(),
    }),
    blocking: blockingLevelSchema.nullable(),
    levels: z.array(blockingLevelSchema).readonly(),
  })
  .meta({ id: 'SampleInefficiency' })

/** A stored distribution in internal units (nm, rad). */
export const distributionSchema = z
  .object({
    id: idSchema,
    termId: idSchema,
    statePointId: idSchema,
    kind: coordinateKindSchema,
    edges: numbersSchema,
    weights: numbersSchema,
    content: z.enum(['count', 'density', 'probability']),
    /** What it stands for: as stated (`settings.independentSamples`), or the counts divided by the inefficiency of blocks. */
    independentSamples: z.number().nullable(),
    blocks: blockInefficiencySchema.nullable(),
    sampleInefficiency: sampleInefficiencySchema.nullable(),
    settings: intakeSettingsSchema,
    notes: z.array(z.string()),
    file: sourceFileSchema,
    demo: z.boolean(),
  })
  .meta({
    id: 'Distribution',
    description: 'A histogram in internal units, nm or rad, as it was read from its file',
  })
export type Distribution = z.infer<typeof distributionSchema>

/** POST /api/mappings/:mappingId/joint-distributions, multipart: file, and this as the JSON field `settings`. */
export const jointDistributionUploadSchema = z
  .object({
    firstTermId: idSchema,
    secondTermId: idSchema,
    statePointId: idSchema,
    settings: jointIntakeSettingsSchema,
  })
  .meta({ id: 'JointDistributionUpload' })
export type JointDistributionUpload = z.infer<typeof jointDistributionUploadSchema>

export const decisionChoiceSchema = z
  .enum(['joint', 'separate', 'change mapping'])
  .meta({ id: 'DecisionChoice' })

/**
 * The numbers a verdict rests on, in nats: `mutualInformation` as it comes out on the verdict grid, and less the mean of
 * the null tables. null where nobody said how many independent samples there are.
 */
export const verdictNumbersSchema = z
  .object({
    verdict: z.enum(['separable', 'borderline', 'joint', 'undecided']),
    mutualInformation: z.number(),
    mutualInformationCorrected: z.number().nullable(),
    nullMean: z.number().nullable(),
    pValue: z.number().nullable(),
    independentSamples: z.number().nullable(),
    /** With them the verdict follows at other thresholds; missing in what was recorded before they were kept. */
    nullPercentile99: z.number().nullable().optional(),
    basinsBeyondProduct: z.number().int().nullable().optional(),
  })
  .meta({ id: 'VerdictNumbers' })
export type VerdictNumbers = z.infer<typeof verdictNumbersSchema>

/** PUT /api/joint-distributions/:jointDistributionId/decision; the server works out the verdict's numbers itself. */
export const decisionWriteSchema = z
  .object({
    choice: decisionChoiceSchema,
    reason: z.string().trim().min(3, 'Say in a few words why: it stays on record.').max(2000),
  })
  .meta({ id: 'DecisionWrite' })
export type DecisionWrite = z.infer<typeof decisionWriteSchema>

export const decisionSchema = z
  .object({
    choice: decisionChoiceSchema,
    reason: z.string(),
    decidedBy: personSchema.nullable(),
    decidedAt: timestampSchema,
    numbers: verdictNumbersSchema,
  })
  .meta({ id: 'Decision' })
export type Decision = z.infer<typeof decisionSchema>

/** Weights are row-major: index = x * ny + y. */
export const jointDistributionSchema = z
  .object({
    id: idSchema,
    mappingId: idSchema,
    firstTermId: idSchema,
    secondTermId: idSchema,
    statePointId: idSchema,
    kinds: z.tuple([coordinateKindSchema, coordinateKindSchema]),
    xEdges: numbersSchema,
    yEdges: numbersSchema,
    weights: numbersSchema,
    content: z.enum(['count', 'density', 'probability']),
    independentSamples: z.number().nullable(),
    settings: jointIntakeSettingsSchema,
    notes: z.array(z.string()),
    file: sourceFileSchema,
    decision: decisionSchema.nullable(),
    demo: z.boolean(),
  })
  .meta({ id: 'JointDistribution' })
export type JointDistribution = z.infer<typeof jointDistributionSchema>

/** Two terms that share a bead, with what is known of them together. */
export const pairSchema = z
  .object({
    firstTermId: idSchema,
    secondTermId: idSchema,
    name: z.string(),
    jointDistributionId: idSchema.nullable(),
    numbers: verdictNumbersSchema.nullable(),
    decision: decisionChoiceSchema.nullable(),
    /** Why the data do not fit the mapping any more; null where they do or there are none. */
    unfit: z.string().nullable().optional(),
  })
  .meta({ id: 'Pair' })
export type Pair = z.infer<typeof pairSchema>

/**
 * GET /api/mappings/:mappingId/pairs?statePoint=: pairs of terms in use that share a bead, bonds with angles first; `leftOut` counts
 * pairs without data that a long list was cut by.
 */
export const pairListSchema = z
  .object({ pairs: z.array(pairSchema), leftOut: z.number().int().nonnegative() })
  .meta({ id: 'PairList' })
export type PairList = z.infer<typeof pairListSchema>
