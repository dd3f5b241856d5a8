import { z } from 'zod'

// The content policy forbids code made from strings, which zod would otherwise use to run faster.
z.config({ jitless: true })

export const idSchema = z.uuid()

export const roleSchema = z.enum(['owner', 'modeller', 'reviewer', 'collaborator']).meta({ id: 'Role' })
export type Role = z.infer<typeof roleSchema>

export const coordinateKindSchema = z.enum(['bond', 'angle', 'dihedral']).meta({ id: 'CoordinateKind' })

export const lengthUnitSchema = z.enum(['nm', 'angstrom']).meta({ id: 'LengthUnit' })
export const angleUnitSchema = z.enum(['degree', 'radian']).meta({ id: 'AngleUnit' })
export const coordinateUnitSchema = z
  .enum(['nm', 'angstrom', 'degree', 'radian'])
  .meta({ id: 'CoordinateUnit' })
export const energyUnitSchema = z.enum(['kJ/mol', 'kcal/mol', 'kT']).meta({ id: 'EnergyUnit' })

/** A name people give: trimmed, one line. */
export const nameSchema = z
  .string()
  .trim()
  .min(1, 'Give it a name.')
  .max(120, 'Keep the name within 120 characters.')
  .regex(/^[^\n\r\t]*$/, 'A name stands on one line.')

export const revisionSchema = z.number().int().positive()
export const timestampSchema = z.iso.datetime()

/** Who did something, by name, for screens. */
export const personSchema = z.object({ id: idSchema, name: z.string() }).meta({ id: 'Person' })
export type Person = z.infer<typeof personSchema>

/** null stands for "no data": JSON knows no NaN. */
export const numbersSchema = z.array(z.number())
export const sparseNumbersSchema = z.array(z.number().nullable())
