import type { CoordinateKind } from '../units'

const COORDINATES: Record<CoordinateKind, string> = {
  bond: 'bond length: distance between the two beads',
  angle: 'bond angle: internal angle at the middle bead, 180 deg is straight',
  dihedral: 'dihedral: 0 is cis, 180 deg is trans, sign by the right-hand rule (IUPAC)',
}

const JACOBIANS: Record<CoordinateKind, string> = {
  bond: 'divided by the exact volume of each bin, integral of r^2',
  angle: 'divided by the exact volume of each bin, integral of sin(theta)',
  dihedral: 'constant for a dihedral, bins divided by their width',
}

/** What a coordinate is and how it is counted, in the letters of a text file. */
export function coordinateSentence(kind: CoordinateKind): string {
  return COORDINATES[kind]
}

/** What bins of a coordinate were divided by, in the letters of a text file. */
export function jacobianSentence(kind: CoordinateKind): string {
  return JACOBIANS[kind]
}
