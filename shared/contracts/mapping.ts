import { z } from 'zod'
import {
  coordinateKindSchema,
  idSchema,
  nameSchema,
  personSchema,
  revisionSchema,
  timestampSchema,
} from './common'

export const MAX_BEADS = 40
export const MAX_BEAD_NAME_LENGTH = 2
export const MAX_BEAD_TYPE_LENGTH = 8

/** Where the bead sits: centre of mass, geometric centre, or on one atom. */
export const siteSchema = z
  .discriminatedUnion('rule', [
    z.object({ rule: z.literal('mass') }),
    z.object({ rule: z.literal('geometry') }),
    z.object({ rule: z.literal('atom'), atom: z.number().int().nonnegative() }),
  ])
  .meta({ id: 'Site' })

/** An atom of the repeat unit in a bead: `unit` is the offset along the chain (0 = the drawn unit). */
export const beadAtomSchema = z
  .object({
    atom: z.number().int().nonnegative(),
    weight: z.number().positive().max(1),
    unit: z.number().int().min(-1).max(1),
  })
  .meta({ id: 'BeadAtom' })

export const beadSchema = z
  .object({
    id: z.string().regex(/^[a-z0-9-]{1,36}$/),
    /** The letters on the drawing. */
    name: z.string().trim().min(1).max(MAX_BEAD_NAME_LENGTH),
    /** Beads of one type share their potentials. */
    type: z
      .string()
      .trim()
      .min(1)
      .max(MAX_BEAD_TYPE_LENGTH)
      .regex(/^[A-Za-z0-9_+]+$/, 'A bead type is made of letters, digits, _ and +.'),
    /** A word for people, such as backbone. */
    label: z.string().trim().max(40),
    /** Place in the order of bead colours, from 0. */
    colour: z.number().int().min(0).max(7),
    site: siteSchema,
    atoms: z.array(beadAtomSchema).max(400),
    /** What differs where this bead ends a chain. */
    endGroup: z.string().trim().max(80).optional(),
  })
  .meta({ id: 'Bead' })

const termTypesSchema = z.array(beadSchema.shape.type).min(2).max(4)
const reasonSchema = z.string().trim().max(400)

/** One term for each kind of place of a type sequence, or one for all of them and why. */
export const termPoolingSchema = z
  .object({ types: termTypesSchema, choice: z.enum(['split', 'pooled']), reason: reasonSchema })
  .refine(({ choice, reason }) => choice === 'split' || reason !== '', 'Say why the places are pooled.')
  .meta({ id: 'TermPooling' })

/** Whether a term is used; `placeKey` is empty unless the term is one of several of a split sequence. */
export const termChoiceSchema = z
  .object({
    types: termTypesSchema,
    placeKey: z.string().max(200),
    use: z.enum(['used', 'left out']),
    reason: reasonSchema,
  })
  .meta({ id: 'TermChoice' })

/** Most decisions about terms that a mapping stores; more terms than these have no use. */
export const MAX_TERM_DECISIONS = 2000

/** The saved mapping: document version 1. */
export const mappingDocumentSchema = z
  .object({
    version: z.literal(1),
    beads: z
      .array(beadSchema)
      .max(MAX_BEADS, `A mapping has at most ${MAX_BEADS} beads per repeat unit.`)
      .refine((beads) => new Set(beads.map(({ id }) => id)).size === beads.length, 'Two beads have one id.'),
    /** Absent in documents from before there were any. */
    poolings: z.array(termPoolingSchema).max(MAX_TERM_DECISIONS).optional(),
    termChoices: z.array(termChoiceSchema).max(MAX_TERM_DECISIONS).optional(),
  })
  .meta({ id: 'MappingDocument' })
export type MappingDocument = z.infer<typeof mappingDocumentSchema>

/** A bead on the chain: which bead of the unit, in which unit. */
export const placeSchema = z
  .array(z.object({ bead: z.string(), unit: z.number().int() }))
  .min(2)
  .max(4)
  .meta({ id: 'Place' })
export type Place = z.infer<typeof placeSchema>

/** Number of a version of a mapping. */
export const versionSchema = z.number().int().positive()

/** POST /api/polymers/:polymerId/mappings. Without a document the mapping starts without beads. */
export const mappingCreateSchema = z
  .object({ name: nameSchema, document: mappingDocumentSchema.default({ version: 1, beads: [] }) })
  .meta({ id: 'MappingCreate' })
export type MappingCreate = z.input<typeof mappingCreateSchema>

/** PUT /api/mappings/:mappingId. 409 CONFLICT with the current mapping in `details` when the revision is not the current one. */
export const mappingUpdateSchema = z
  .object({ revision: revisionSchema, name: nameSchema, document: mappingDocumentSchema })
  .meta({ id: 'MappingUpdate' })
export type MappingUpdate = z.infer<typeof mappingUpdateSchema>

export const mappingSchema = z
  .object({
    id: idSchema,
    polymerId: idSchema,
    name: z.string(),
    document: mappingDocumentSchema,
    revision: revisionSchema,
    /** A frozen state of the beads, from 1: the next one is made when they change while data stand on the mapping. */
    version: versionSchema,
    /** Distributions were brought in for it, so that a change of its beads makes a new version. */
    hasData: z.boolean(),
    savedAt: timestampSchema,
    savedBy: personSchema.nullable(),
    /**
     * Terms in use, how many of them have data that fit at any state point, how many only such as no longer fit; and terms left
     * out of the set.
     */
    counts: z.object({
      beads: z.number().int(),
      terms: z.number().int(),
      leftOut: z.number().int(),
      termsWithData: z.number().int(),
      termsUnfit: z.number().int(),
    }),
  })
  .meta({ id: 'Mapping' })
export type Mapping = z.infer<typeof mappingSchema>

/** Facts only; "questioned" and "accepted" come from a reviewer and are added with reviews. */
export const standingSchema = z.enum(['no data', 'data', 'inverted']).meta({ id: 'Standing' })
export type Standing = z.infer<typeof standingSchema>

/** A few points of a curve for the rail: ys from 0 to 1 over the coordinate's range. */
export const silhouetteSchema = z
  .object({ measured: z.array(z.number()), derived: z.array(z.number()).nullable() })
  .meta({ id: 'Silhouette' })

/**
 * A term of a mapping at one state point. `types` in canonical direction; all places along the chain that carry this type
 * sequence are pooled in it. A term whose beads are gone from the mapping stays while data stand on it, with `current` false.
 */
export const termSchema = z
  .object({
    id: idSchema,
    mappingId: idSchema,
    kind: coordinateKindSchema,
    types: z.array(z.string()),
    name: z.string(),
    places: z.array(placeSchema),
    /** Tells the terms of a split type sequence apart; empty where all its places are pooled. */
    placeKey: z.string().optional(),
    current: z.boolean(),
    standing: standingSchema,
    silhouette: silhouetteSchema.nullable(),
    /** Also of data that no longer fit. */
    distributionId: idSchema.nullable(),
    /** Why its data here no longer fit the mapping; the standing is then that of a term without data. */
    unfit: z.string().nullable().optional(),
    /** An inversion is saved, but its input has changed since: the standing is that of the data. */
    stale: z.boolean().optional(),
  })
  .meta({ id: 'Term' })
export type Term = z.infer<typeof termSchema>
