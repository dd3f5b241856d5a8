import { z } from 'zod'
import { JOINT_ABOVE, SEPARABLE_BELOW } from '../correlation/correlation'
import { FLAT_BELOW } from '../flatness/flatness'
import {
  angleUnitSchema,
  energyUnitSchema,
  idSchema,
  lengthUnitSchema,
  nameSchema,
  revisionSchema,
} from './common'

/** Ranges in which a group may set its thresholds; ends included. Mutual information in nats, amplitude in kT. */
export const THRESHOLD_LIMITS = {
  separableBelow: { low: 0.001, high: 0.5 },
  jointAbove: { low: 0.002, high: 1 },
  flatBelow: { low: 0.05, high: 5 },
} as const

const within = ({ low, high }: { readonly low: number; readonly high: number }, unit: string) =>
  z
    .number({ error: 'Give a number.' })
    .min(low, `Give a number from ${low} to ${high} ${unit}.`)
    .max(high, `Give a number from ${low} to ${high} ${unit}.`)

/** The units in which a group reads, until someone chooses others on their own screen. */
export const groupUnitsSchema = z
  .object({ length: lengthUnitSchema, angle: angleUnitSchema, energy: energyUnitSchema })
  .meta({ id: 'GroupUnits' })
export type GroupUnits = z.infer<typeof groupUnitsSchema>

/** From which numbers on the verdicts of a group speak. */
export const groupThresholdsSchema = z
  .object({
    /** Below this mutual information, in nats, two terms are called separable. */
    separableBelow: within(THRESHOLD_LIMITS.separableBelow, 'nats'),
    /** From this mutual information on, in nats, a joint potential is advised. */
    jointAbove: within(THRESHOLD_LIMITS.jointAbove, 'nats'),
    /** A dihedral whose potential rises by less than this, in kT, may be dropped. */
    flatBelow: within(THRESHOLD_LIMITS.flatBelow, 'kT'),
  })
  .refine(({ separableBelow, jointAbove }) => separableBelow < jointAbove, {
    path: ['jointAbove'],
    error: 'A joint potential is advised from a higher value on than separable ends at.',
  })
  .meta({ id: 'GroupThresholds' })
export type GroupThresholds = z.infer<typeof groupThresholdsSchema>

/** What holds in a group unless someone chooses otherwise. */
export const groupDefaultsSchema = z
  .object({ units: groupUnitsSchema, thresholds: groupThresholdsSchema })
  .meta({ id: 'GroupDefaults' })
export type GroupDefaults = z.infer<typeof groupDefaultsSchema>

/** What holds in a group that has set nothing. */
export const HOUSE_DEFAULTS: GroupDefaults = {
  units: { length: 'nm', angle: 'degree', energy: 'kJ/mol' },
  thresholds: { separableBelow: SEPARABLE_BELOW, jointAbove: JOINT_ABOVE, flatBelow: FLAT_BELOW },
}

/** GET /api/groups/:groupId. */
export const groupSchema = z
  .object({
    id: idSchema,
    name: z.string(),
    demo: z.boolean(),
    defaults: groupDefaultsSchema,
    /** Of name and defaults. */
    revision: revisionSchema,
  })
  .meta({ id: 'Group' })
export type Group = z.infer<typeof groupSchema>

/** PATCH /api/groups/:groupId. 409 CONFLICT with the group in `details` when someone else saved in between. */
export const groupUpdateSchema = z
  .object({ revision: revisionSchema, name: nameSchema.optional(), defaults: groupDefaultsSchema.optional() })
  .meta({ id: 'GroupUpdate' })
export type GroupUpdate = z.infer<typeof groupUpdateSchema>
