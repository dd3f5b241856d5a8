import type { CoordinateKind } from '@shared/histogram'
import type { Potential } from '@shared/inversion'
import { notAKnotCurvatures, periodicCurvatures } from '@shared/numeric'
import { thermalEnergy } from '@shared/units'

export const SPLINE_KNOTS = 90
export const SPLINE_TEMPERATURE = 400

/** A potential through 90 equal midpoints of a range (of the turn for a dihedral), without tails; energies in kT. */
export function splinePotential(
  kind: CoordinateKind,
  [low, high]: readonly [number, number],
  energy: (coordinate: number, knot: number) => number,
  deviation: number | null = null,
): Potential {
  const kT = thermalEnergy(SPLINE_TEMPERATURE)
  const width = (high - low) / SPLINE_KNOTS
  const knots = Float64Array.from({ length: SPLINE_KNOTS }, (_, knot) => low + (knot + 0.5) * width)
  const energies = knots.map((coordinate, knot) => kT * energy(coordinate, knot))
  const period = kind === 'dihedral' ? 2 * Math.PI : null
  return {
    kind,
    temperature: SPLINE_TEMPERATURE,
    knots,
    energies,
    curvatures:
      period === null ? notAKnotCurvatures(knots, energies) : periodicCurvatures(knots, energies, period),
    deviations: deviation === null ? null : new Float64Array(SPLINE_KNOTS).fill(kT * deviation),
    populated: [low, high],
    period,
    lowTail: null,
    highTail: null,
  }
}
