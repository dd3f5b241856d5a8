import { jacobian } from '@shared/histogram'
import { potentialEnergy, type Inversion } from '@shared/inversion'
import { thermalEnergy } from '@shared/units'
import { deviationAt } from './deviation-at'

/** The drawn curves of an inversion in internal units, at ascending coordinates within the data. */
export interface PotentialCurve {
  readonly coordinates: Float64Array
  readonly energies: Float64Array
  /** Standard deviations of U − U_min, NaN where the data say nothing; null without a stated sample size. */
  readonly deviations: Float64Array | null
  readonly comparison: Comparison | null
}

/**
 * What the same smooth distribution gives when the Jacobian is left out (or put in, where it was left out): U ∓ kT ln J,
 * with least value 0 among the points.
 */
export interface Comparison {
  readonly energies: Float64Array
  /** The comparison at any other coordinate, in kJ/mol. */
  readonly at: (coordinate: number) => number
}

const LEAST_POINTS = 300
const POINTS_PER_BIN = 2
/** A point every pixel and a half is as smooth as can be seen, and each costs under a moving slider. */
const MOST_POINTS = 480

/** Evenly spaced coordinates from low to high, both included. */
export function evenly(low: number, high: number, count: number): Float64Array {
  return Float64Array.from({ length: count }, (_, index) => low + ((high - low) * index) / (count - 1))
}

/** Points enough to draw the spline of so many bins as a smooth line. */
export function curvePoints(bins: number): number {
  return Math.min(MOST_POINTS, Math.max(LEAST_POINTS, POINTS_PER_BIN * bins))
}

/** Samples what is drawn in the potential's panel between two coordinates. A dihedral's Jacobian is constant: no comparison. */
export function potentialCurve(inversion: Inversion, low: number, high: number): PotentialCurve {
  const { kind, potential } = inversion
  const coordinates = evenly(low, high, curvePoints(inversion.bins.weights.length))
  return {
    coordinates,
    energies: coordinates.map((coordinate) => potentialEnergy(potential, coordinate)),
    deviations:
      potential.deviations && coordinates.map((coordinate) => deviationAt(potential, coordinate) ?? NaN),
    comparison: kind === 'dihedral' ? null : comparisonWith(inversion, coordinates),
  }
}

function comparisonWith(inversion: Inversion, coordinates: Float64Array): Comparison {
  const { kind, potential } = inversion
  const kT = thermalEnergy(inversion.temperature) * (inversion.jacobian ? -1 : 1)
  const unshifted = (coordinate: number): number =>
    potentialEnergy(potential, coordinate) + kT * Math.log(jacobian(kind, coordinate))
  const curve = coordinates.map(unshifted)
  const least = curve.reduce((low, value) => Math.min(low, value), Infinity)
  return { energies: curve.map((value) => value - least), at: (coordinate) => unshifted(coordinate) - least }
}
