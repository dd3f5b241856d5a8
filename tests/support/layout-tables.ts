import type { Table } from '@shared/tables'
import type { CoordinateKind } from '@shared/units'

/** K */
export const TEMPERATURE = 400

/** Analytic potentials in kJ/mol of nm or rad, one of each kind, none of them symmetric. */
export const CURVES: Record<CoordinateKind, { energy: (q: number) => number; force: (q: number) => number }> =
  {
    bond: {
      energy: (r) => 4000 * (r - 0.36) ** 2 + 9000 * (r - 0.36) ** 3,
      force: (r) => -(8000 * (r - 0.36) + 27000 * (r - 0.36) ** 2),
    },
    angle: {
      energy: (theta) => 30 * (Math.cos(theta) + 0.5) ** 2 + 4 * Math.sin(theta / 2),
      force: (theta) => 60 * (Math.cos(theta) + 0.5) * Math.sin(theta) - 2 * Math.cos(theta / 2),
    },
    dihedral: {
      energy: (phi) => 6 * (1 + Math.cos(3 * phi)) + 3 * (1 - Math.sin(phi)),
      force: (phi) => 18 * Math.sin(3 * phi) + 3 * Math.cos(phi),
    },
  }

const DOMAINS: Record<CoordinateKind, readonly [number, number]> = {
  bond: [0.21, 0.51],
  angle: [0, Math.PI],
  dihedral: [-Math.PI, Math.PI],
}

/** A table of an analytic potential, numbers as exact as they come. */
export function analyticTable(
  kind: CoordinateKind,
  rows = 361,
  [low, high]: readonly [number, number] = DOMAINS[kind],
): Table {
  const { energy, force } = CURVES[kind]
  const coordinates = Float64Array.from(
    { length: rows },
    (_, row) => (low * (rows - 1 - row) + high * row) / (rows - 1),
  )
  return {
    kind,
    temperature: TEMPERATURE,
    coordinates,
    energies: coordinates.map(energy),
    forces: coordinates.map(force),
  }
}
