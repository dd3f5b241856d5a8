import { jacobian } from '@shared/histogram'
import { potentialEnergy, type Inversion } from '@shared/inversion'
import { thermalEnergy } from '@shared/units'
import { curvePoints, evenly } from './potential-curve'

/** A probability density at ascending coordinates, per internal unit. */
export interface DensityCurve {
  readonly coordinates: Float64Array
  readonly densities: Float64Array
}

/** Even number of intervals of Simpson's rule over one bin. */
const INTERVALS = 8

/**
 * The distribution that the potential gives back, p(q) ∝ J exp(−U/kT), as a smooth curve between two coordinates. Its
 * height is set by the regenerated mass of the fullest bin, so that curve and bins tell the same story.
 */
export function regeneratedCurve(inversion: Inversion, low: number, high: number): DensityCurve {
  const { kind, potential, regenerated } = inversion
  const kT = thermalEnergy(inversion.temperature)
  const weight = (coordinate: number): number =>
    (inversion.jacobian ? jacobian(kind, coordinate) : 1) *
    Math.exp(-potentialEnergy(potential, coordinate) / kT)
  const fullest = regenerated.indexOf(regenerated.reduce((most, mass) => Math.max(most, mass), 0))
  const { edges } = inversion.bins
  const scale = regenerated[fullest] / integral(weight, edges[fullest], edges[fullest + 1])
  const coordinates = evenly(low, high, curvePoints(inversion.bins.weights.length))
  return { coordinates, densities: coordinates.map((coordinate) => scale * weight(coordinate)) }
}

/** Simpson's rule. */
function integral(of: (coordinate: number) => number, low: number, high: number): number {
  const step = (high - low) / INTERVALS
  let sum = of(low) + of(high)
  for (let index = 1; index < INTERVALS; index += 1) sum += (index % 2 === 1 ? 4 : 2) * of(low + index * step)
  return (sum * step) / 3
}
