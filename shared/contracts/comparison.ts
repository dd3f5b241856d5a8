import { z } from 'zod'
import { decisionChoiceSchema } from './distribution'
import { coordinateKindSchema, idSchema } from './common'

/** Fewest and most mappings that stand side by side. */
export const COMPARED_MAPPINGS = { least: 2, most: 6 } as const

/** Query of GET /api/polymers/:polymerId/comparison: ids of mappings, parted by commas, and of a state point. */
export const comparisonQuerySchema = z.object({
  mappings: z
    .string()
    .transform((text) => text.split(','))
    .pipe(
      z
        .array(z.uuid('Name mappings by their ids, parted by commas.'))
        .min(COMPARED_MAPPINGS.least, `Name at least ${COMPARED_MAPPINGS.least} mappings to compare.`)
        .max(COMPARED_MAPPINGS.most, `At most ${COMPARED_MAPPINGS.most} mappings stand side by side.`)
        .refine((ids) => new Set(ids).size === ids.length, 'A mapping is named twice.'),
    ),
  statePoint: idSchema,
})

/** Where a term has data: at the state point, only at other ones, or nowhere; or data here that no longer fit the mapping. */
export const coverageSchema = z.enum(['here', 'elsewhere', 'missing', 'unfit']).meta({ id: 'Coverage' })
export type Coverage = z.infer<typeof coverageSchema>

/** A term in use. Findings are null where nothing is known; internal units (nm, rad). */
export const comparedTermSchema = z
  .object({
    id: idSchema,
    kind: coordinateKindSchema,
    name: z.string(),
    types: z.array(z.string()),
    /** How often it stands in each repeat unit. */
    multiplicity: z.number().int(),
    coverage: coverageSchema,
    /** Why the data here do not fit the mapping; null where they do. */
    unfit: z.string().nullable(),
    /** The other state points where it has data. */
    elsewhere: z.array(idSchema),
    /** Basins deeper than `depth` in kT. */
    basins: z.object({ count: z.number().int(), depth: z.number() }).nullable(),
    /** Standard deviation of the distribution; circular for a dihedral. */
    deviation: z.number().nullable(),
    /** Of a dihedral: whether it is flat enough to be dropped. */
    flatness: z.enum(['flat', 'keep', 'undecided']).nullable(),
    /** Why its data could not be inverted, so that nobody counted. */
    problem: z.string().nullable(),
  })
  .meta({ id: 'ComparedTerm' })
export type ComparedTerm = z.infer<typeof comparedTermSchema>

/** Two terms in use with joint data at the state point. */
export const comparedPairSchema = z
  .object({
    firstTermId: idSchema,
    secondTermId: idSchema,
    first: z.string(),
    second: z.string(),
    /** Mutual information, not below 0: less what chance makes of it where `corrected`. */
    nats: z.number(),
    corrected: z.boolean(),
    decision: decisionChoiceSchema.nullable(),
  })
  .meta({ id: 'ComparedPair' })
export type ComparedPair = z.infer<typeof comparedPairSchema>

/** One column of the comparison. */
export const comparedMappingSchema = z
  .object({
    id: idSchema,
    name: z.string(),
    /** null for a mapping whose beads hold no atoms. Degrees of freedom and atoms, hydrogens included, per repeat unit. */
    numbers: z
      .object({
        beads: z.number().int(),
        atoms: z.number().int(),
        degreesKept: z.number().int(),
        degreesBefore: z.number().int(),
        /** Atoms per bead, hydrogens included. */
        reduction: z.number(),
      })
      .nullable(),
    terms: z.array(comparedTermSchema),
    /** Terms of the mapping that are not used. */
    leftOut: z.number().int(),
    /** Pairs with data, the most coupled first. */
    pairs: z.array(comparedPairSchema),
    /** Pairs of terms in use that share a bead and have no joint data here. */
    pairsWithoutData: z.number().int(),
    /** Sum of `nats` over the pairs; null without pairs. */
    coupling: z.number().nullable(),
    /** Pairs within the cutoff per step, relative to the mapping with fewest beads. */
    cost: z.number().nullable(),
  })
  .meta({ id: 'ComparedMapping' })
export type ComparedMapping = z.infer<typeof comparedMappingSchema>

/** GET /api/polymers/:polymerId/comparison?mappings=ID,ID&statePoint=ID */
export const comparisonSchema = z
  .object({
    statePointId: idSchema,
    /** What each finer mapping buys over the next coarser one, a sentence or two each. */
    summary: z.array(z.string()),
    /** In the order asked for. */
    mappings: z.array(comparedMappingSchema),
  })
  .meta({ id: 'Comparison' })
export type Comparison = z.infer<typeof comparisonSchema>
