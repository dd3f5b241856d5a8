import { InvalidInputError } from '../errors'
import { type CoordinateKind, jacobian } from '../histogram'
import { GAUSS_LEGENDRE } from '../numeric'
import { thermalEnergy } from '../units'
import type { Potential } from './potential'
import { potentialEnergy } from './potential-energy'

/**
 * The distribution a potential stands for: ∫_bin J exp(−U/kT) dq of each bin, by Gauss–Legendre with five points.
 *
 * @param edges ascending, length n + 1, nm or rad
 * @param useJacobian false takes J = 1, for a potential that was made without it
 * @returns probability mass of each bin, sum 1 over the bins
 * @throws {InvalidInputError} SINGULAR_SYSTEM when the potential leaves no mass in the bins
 */
export function regenerate(
  kind: CoordinateKind,
  potential: Potential,
  edges: Float64Array,
  useJacobian: boolean,
): Float64Array {
  const kT = thermalEnergy(potential.temperature)
  const masses = new Float64Array(edges.length - 1)
  let total = 0
  for (let bin = 0; bin < masses.length; bin++) {
    const half = (edges[bin + 1] - edges[bin]) / 2
    const middle = edges[bin] + half
    let sum = 0
    for (const { node, weight } of GAUSS_LEGENDRE) {
      const coordinate = middle + node * half
      const volume = useJacobian ? jacobian(kind, coordinate) : 1
      sum += weight * volume * Math.exp(-potentialEnergy(potential, coordinate) / kT)
    }
    masses[bin] = sum * half
    total += masses[bin]
  }
  if (!(total > 0 && Number.isFinite(total))) {
    throw new InvalidInputError(
      'SINGULAR_SYSTEM',
      'The curve is least where no bin is: the counts do not determine it.',
    )
  }
  return masses.map((mass) => mass / total)
}
