import { z } from 'zod'
import { coordinateKindSchema, idSchema, personSchema, timestampSchema } from './common'
import { mappingDocumentSchema, versionSchema } from './mapping'

/** An earlier version of a mapping, as it was last saved before its beads changed. */
export const mappingVersionSchema = z
  .object({
    number: versionSchema,
    document: mappingDocumentSchema,
    savedAt: timestampSchema,
    savedBy: personSchema.nullable(),
    /** Current distributions, single and joint, that were measured under it. */
    data: z.number().int().nonnegative(),
  })
  .meta({ id: 'MappingVersion' })
export type MappingVersion = z.infer<typeof mappingVersionSchema>

/** GET /api/mappings/:mappingId/versions: the earlier ones, the newest first; the newest of all is the mapping itself. */
export const mappingVersionListSchema = z.object({ versions: z.array(mappingVersionSchema) })

/** POST /api/mappings/:mappingId/fit: what saving this document would do to the data. Nothing is saved. */
export const mappingFitRequestSchema = z
  .object({ document: mappingDocumentSchema })
  .meta({ id: 'MappingFitRequest' })

/** Data of a term, or of two terms together, that would no longer fit. */
export const unfitDataSchema = z
  .object({
    /** Of the term as it is stored, or of both. */
    name: z.string(),
    kind: coordinateKindSchema.nullable(),
    statePointIds: z.array(idSchema),
    reason: z.string(),
  })
  .meta({ id: 'UnfitData' })
export type UnfitData = z.infer<typeof unfitDataSchema>

export const mappingFitSchema = z
  .object({
    /** The version that the mapping would have: a new one when its beads change while data stand on it. */
    version: versionSchema,
    makesVersion: z.boolean(),
    /** Data that fit the mapping as it is stored and would no longer. */
    lost: z.array(unfitDataSchema),
    /** How many distributions, single and joint, would fit. */
    fitting: z.number().int().nonnegative(),
  })
  .meta({ id: 'MappingFit' })
export type MappingFit = z.infer<typeof mappingFitSchema>
