import { z } from 'zod'
import { idSchema, nameSchema, revisionSchema, timestampSchema } from './common'

export const MAX_SMILES_LENGTH = 2000

export const smilesSchema = z
  .string()
  .trim()
  .min(1, 'Type the repeat unit as SMILES with two *.')
  .max(MAX_SMILES_LENGTH, `Keep the SMILES within ${MAX_SMILES_LENGTH} characters.`)

/** POST /api/groups/:groupId/polymers */
export const polymerCreateSchema = z
  .object({ name: nameSchema, smiles: smilesSchema, notes: z.string().max(4000).default('') })
  .meta({
    id: 'PolymerCreate',
    description: 'A repeat unit: SMILES with two *, which are the bonds to its neighbours',
  })
export type PolymerCreate = z.input<typeof polymerCreateSchema>

/** PATCH /api/polymers/:polymerId. The SMILES is fixed once a mapping stands on it. */
export const polymerUpdateSchema = z
  .object({
    revision: revisionSchema,
    name: nameSchema.optional(),
    smiles: smilesSchema.optional(),
    notes: z.string().max(4000).optional(),
  })
  .meta({ id: 'PolymerUpdate' })
export type PolymerUpdate = z.infer<typeof polymerUpdateSchema>

/** Lists show a polymer with how far it is. `mass` in g/mol per repeat unit, formula in Hill order such as C9H16O2. */
export const polymerSchema = z
  .object({
    id: idSchema,
    groupId: idSchema,
    name: z.string(),
    smiles: z.string(),
    notes: z.string(),
    formula: z.string(),
    mass: z.number(),
    heavyAtoms: z.number().int(),
    revision: revisionSchema,
    demo: z.boolean(),
    createdAt: timestampSchema,
    counts: z.object({
      statePoints: z.number().int(),
      mappings: z.number().int(),
      distributions: z.number().int(),
      potentials: z.number().int(),
    }),
  })
  .meta({
    id: 'Polymer',
    description: 'A repeat unit; mass in g/mol per unit, formula in Hill order, counts of what is current',
  })
export type Polymer = z.infer<typeof polymerSchema>

const statePointFields = {
  temperature: z
    .number('Give the temperature in kelvin.')
    .positive('The temperature must be above 0 K.')
    .max(10_000),
  /** bar */
  pressure: z.number().min(-100_000).max(10_000_000).nullable(),
  /** such as melt, solution, bulk */
  phase: z.string().trim().max(60),
  composition: z.string().trim().max(200),
  notes: z.string().max(4000),
}

/** POST /api/polymers/:polymerId/state-points */
export const statePointCreateSchema = z
  .object({
    temperature: statePointFields.temperature,
    pressure: statePointFields.pressure.default(null),
    phase: statePointFields.phase.default(''),
    composition: statePointFields.composition.default(''),
    notes: statePointFields.notes.default(''),
  })
  .meta({
    id: 'StatePointCreate',
    description: 'Temperature in K, pressure in bar; null or empty where nothing is stated',
  })
export type StatePointCreate = z.input<typeof statePointCreateSchema>

/** PATCH /api/state-points/:statePointId. The temperature is fixed once data stand on it. */
export const statePointUpdateSchema = z
  .object(statePointFields)
  .partial()
  .extend({ revision: revisionSchema })
  .meta({ id: 'StatePointUpdate' })
export type StatePointUpdate = z.infer<typeof statePointUpdateSchema>

export const statePointSchema = z
  .object({
    id: idSchema,
    polymerId: idSchema,
    ...statePointFields,
    revision: revisionSchema,
    distributions: z.number().int(),
    createdAt: timestampSchema,
  })
  .meta({
    id: 'StatePoint',
    description: 'Temperature in K, pressure in bar; it sets kT of every potential made there',
  })
export type StatePoint = z.infer<typeof statePointSchema>
