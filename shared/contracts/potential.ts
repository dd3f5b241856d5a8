import { z } from 'zod'
import { DEFAULT_INVERSION_SETTINGS, SETTING_LIMITS } from '../inversion/inversion-settings'
import {
  angleUnitSchema,
  energyUnitSchema,
  idSchema,
  lengthUnitSchema,
  personSchema,
  revisionSchema,
  timestampSchema,
} from './common'
import { layoutRefSchema } from './layout'

const { log10Lambda, inefficiency, tailStiffness, rows } = SETTING_LIMITS
/** Longest name of a form. */
const FORM_NAME_LENGTH = 40

const smoothingSchema = z
  .discriminatedUnion('mode', [
    z.object({ mode: z.literal('auto'), criterion: z.enum(['likelihood', 'aic']) }),
    z.object({ mode: z.literal('off') }),
    z.object({
      mode: z.literal('manual'),
      log10Lambda: z.number().min(log10Lambda.low).max(log10Lambda.high),
    }),
  ])
  .meta({ id: 'SmoothingSettings' })

/**
 * Settings of an inversion (document version 1), in internal units (nm, rad, kJ/mol). null takes the default of the kind,
 * what the distribution says, or no form; what is left out takes the default of the core.
 */
export const inversionSettingsSchema = z
  .object({
    version: z.literal(1),
    jacobian: z.boolean(),
    smoothing: smoothingSchema,
    inefficiency: z
      .number()
      .min(inefficiency.low)
      .max(inefficiency.high)
      .nullable()
      .default(DEFAULT_INVERSION_SETTINGS.inefficiency),
    straightAngle: z.enum(['free', 'level']).default(DEFAULT_INVERSION_SETTINGS.straightAngle),
    tails: z
      .object({ stiffness: z.number().min(tailStiffness.low).max(tailStiffness.high) })
      .default(DEFAULT_INVERSION_SETTINGS.tails),
    form: z.string().min(1).max(FORM_NAME_LENGTH).nullable().default(DEFAULT_INVERSION_SETTINGS.form),
    table: z.object({
      rows: z.number().int().min(rows.low).max(rows.high),
      low: z.number().nullable(),
      high: z.number().nullable(),
      cap: z.number().positive().nullable(),
    }),
  })
  .meta({
    id: 'InversionSettings',
    description:
      'How counts become a potential. Limits of the table in nm or rad, its cap in kJ/mol; null takes the default of the kind',
  })

/**
 * PUT /api/terms/:termId/potential. `revision` is null for the first save and the current revision after; 409 CONFLICT with
 * the stored potential in `details` when someone else saved in between.
 */
export const potentialSaveSchema = z
  .object({ statePointId: idSchema, revision: revisionSchema.nullable(), settings: inversionSettingsSchema })
  .meta({ id: 'PotentialSave' })
export type PotentialSave = z.infer<typeof potentialSaveSchema>

/** A saved inversion: settings and the hash of its input. The numbers follow from them by shared/inversion. */
export const potentialSchema = z
  .object({
    id: idSchema,
    termId: idSchema,
    statePointId: idSchema,
    distributionId: idSchema,
    settings: inversionSettingsSchema,
    /** SHA-256 of the distribution, temperature and file hash the inversion rests on. */
    inputSha256: z.string(),
    /** The stored distribution is no longer the one the inversion was saved with. */
    stale: z.boolean(),
    revision: revisionSchema,
    savedBy: personSchema.nullable(),
    savedAt: timestampSchema,
  })
  .meta({
    id: 'StoredPotential',
    description: 'A saved inversion: its settings and the SHA-256 of its input; the numbers follow from them',
  })
export type StoredPotential = z.infer<typeof potentialSchema>

/** Query of the table downloads: GET /api/terms/:termId/table and GET /api/mappings/:mappingId/tables.zip. */
export const tableQuerySchema = z
  .object({
    statePoint: idSchema,
    length: lengthUnitSchema.default('nm'),
    angle: angleUnitSchema.default('degree'),
    energy: energyUnitSchema.default('kJ/mol'),
    /** A layout of the house, in these units, or one of the group, which has its own; three columns when left out. */
    layout: layoutRefSchema.optional(),
    /** Of a layout of the group: an older version than its newest. */
    layoutVersion: z.coerce.number<number>().int().positive().optional(),
  })
  .meta({ id: 'TableQuery', description: 'Units of the file: force is −dU/dq in the units asked for' })
export type TableQuery = z.input<typeof tableQuerySchema>

/** Query of GET /api/joint-distributions/:jointDistributionId/table, whose state point is that of the data. */
export const jointTableQuerySchema = tableQuerySchema
  .omit({ statePoint: true })
  .meta({ id: 'JointTableQuery' })
export type JointTableQuery = z.input<typeof jointTableQuerySchema>
