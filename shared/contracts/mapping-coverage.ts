import { z } from 'zod'
import { coordinateKindSchema, idSchema } from './common'
import { coverageSchema } from './comparison'

/** A term at one state point. */
export const coverageCellSchema = z
  .object({
    statePointId: idSchema,
    coverage: coverageSchema,
    /** A potential is saved for these very data. */
    inverted: z.boolean(),
    /** Why the data here do not fit; null where there are none or they fit. */
    reason: z.string().nullable(),
  })
  .meta({ id: 'CoverageCell' })
export type CoverageCell = z.infer<typeof coverageCellSchema>

export const coveredTermSchema = z
  .object({
    id: idSchema,
    kind: coordinateKindSchema,
    name: z.string(),
    types: z.array(z.string()),
    /** Why the mapping leaves the term out, empty where nobody said; null for a term in use. */
    leftOut: z.string().nullable(),
    /** One for each state point, in their order. */
    cells: z.array(coverageCellSchema),
  })
  .meta({ id: 'CoveredTerm' })
export type CoveredTerm = z.infer<typeof coveredTermSchema>

/** GET /api/mappings/:mappingId/coverage: terms by state points. */
export const mappingCoverageSchema = z
  .object({
    /** The coldest first. */
    statePointIds: z.array(idSchema),
    terms: z.array(coveredTermSchema),
  })
  .meta({ id: 'MappingCoverage' })
export type MappingCoverage = z.infer<typeof mappingCoverageSchema>
