import type { CoordinateKind } from '../../shared/histogram/histogram'
import type { Random } from '../../shared/numeric/random'
import type { CoordinatePotential } from './chain-potentials'

/** Cells of the table a coordinate is drawn from: a bond's are 0.06 pm wide, an angle's 0.04°. */
const CELLS = 4096

/** Draws one coordinate from J(q) exp(−U(q)/kT), with J = r², sin θ or 1. */
export interface BoltzmannSampler {
  /** ∫ J exp(−U/kT) dq. */
  readonly partition: number
  draw(random: Random): number
  /** Probability density at a coordinate, Jacobian included. */
  density(coordinate: number): number
}

/**
 * Direct sampling by the inverse of the cumulative distribution, tabulated by midpoints; uniform inside a cell.
 *
 * @param thermalEnergy kT in kJ/mol
 */
export function createBoltzmannSampler(
  potential: CoordinatePotential,
  thermalEnergy: number,
): BoltzmannSampler {
  const width = (potential.high - potential.low) / CELLS
  const weight = (q: number) => jacobian(potential.kind, q) * Math.exp(-potential.energy(q) / thermalEnergy)
  const cumulative = new Float64Array(CELLS + 1)
  for (let cell = 0; cell < CELLS; cell++) {
    cumulative[cell + 1] = cumulative[cell] + weight(potential.low + (cell + 0.5) * width) * width
  }
  const partition = cumulative[CELLS]
  return {
    partition,
    draw: (random) => {
      const target = random.uniform() * partition
      const cell = cellOf(cumulative, target)
      const share = (target - cumulative[cell]) / (cumulative[cell + 1] - cumulative[cell])
      return potential.low + (cell + share) * width
    },
    density: (q) => (q < potential.low || q > potential.high ? 0 : weight(q) / partition),
  }
}

function jacobian(kind: CoordinateKind, coordinate: number): number {
  if (kind === 'bond') return coordinate * coordinate
  return kind === 'angle' ? Math.sin(coordinate) : 1
}

/** The cell with cumulative[cell] ≤ target < cumulative[cell + 1], by bisection. */
function cellOf(cumulative: Float64Array, target: number): number {
  let low = 0
  let high = cumulative.length - 1
  while (high - low > 1) {
    const middle = (low + high) >> 1
    if (cumulative[middle] <= target) low = middle
    else high = middle
  }
  return low
}
