import { z } from 'zod'
import {
  beadAtomSchema,
  beadSchema,
  MAX_BEADS,
  MAX_TERM_DECISIONS,
  termPoolingSchema,
} from '../contracts/mapping'
import { nameSchema } from '../contracts/common'
import { smilesSchema } from '../contracts/polymer'

export const MAPPING_FILE_FORMAT = 'beadwright mapping'
/** Version written; readers lift older ones, and refuse newer ones. */
export const MAPPING_FILE_VERSION = 1

const { name, type, label, colour, endGroup } = beadSchema.shape
const { weight, unit } = beadAtomSchema.shape
const indexSchema = z.number().int().nonnegative()

const siteSchema = z.discriminatedUnion('rule', [
  z.strictObject({ rule: z.literal('mass') }),
  z.strictObject({ rule: z.literal('geometry') }),
  z.strictObject({ rule: z.literal('atom'), atom: indexSchema }),
])

const termChoiceSchema = z.strictObject({
  types: z.array(type).min(2).max(4),
  /** Which of several terms of a split sequence: one of its places, beads by name. */
  place: z
    .array(z.strictObject({ bead: name, unit: z.number().int() }))
    .min(2)
    .max(4)
    .optional(),
  use: z.enum(['used', 'left out']),
  reason: z.string().trim().max(400).default(''),
})

/**
 * A mapping as a file, version 1. `atom` counts the heavy atoms and `*` of the SMILES from 0, in the order in which it names
 * them. Described in docs/mapping-file.md.
 */
export const mappingFileSchema = z.strictObject({
  format: z.literal(MAPPING_FILE_FORMAT),
  version: z.literal(MAPPING_FILE_VERSION),
  name: nameSchema.optional(),
  smiles: smilesSchema,
  beads: z
    .array(
      z.strictObject({
        name,
        type,
        label: label.default(''),
        colour: colour.optional(),
        site: siteSchema.default({ rule: 'mass' }),
        endGroup,
        atoms: z
          .array(z.strictObject({ atom: indexSchema, weight: weight.default(1), offset: unit.default(0) }))
          .max(400),
      }),
    )
    .max(MAX_BEADS),
  poolings: z.array(termPoolingSchema).max(MAX_TERM_DECISIONS).optional(),
  termChoices: z.array(termChoiceSchema).max(MAX_TERM_DECISIONS).optional(),
})
export type MappingFile = z.output<typeof mappingFileSchema>
