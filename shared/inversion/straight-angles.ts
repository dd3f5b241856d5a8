import type { Histogram } from '../histogram'
import type { Warning } from './warning'

/** Nearly straight: within 10° of 180°, where the forces of a dihedral grow as 1/sin θ. */
const NEARLY_STRAIGHT = (170 * Math.PI) / 180
/** A larger share of nearly straight angles is often. */
const OFTEN = 0.01

/**
 * Doubts about keeping a dihedral, from the distributions of the two angles it is made of: where one of them is often nearly
 * straight, the dihedral is undefined and its forces have no bound.
 *
 * @param angles histograms of kind angle; others are left out
 */
export function straightAngleWarnings(angles: readonly Histogram[]): Warning[] {
  const share = Math.max(0, ...angles.filter(({ kind }) => kind === 'angle').map(nearlyStraightShare))
  if (share <= OFTEN) return []
  return [
    {
      code: 'DIHEDRAL_NEAR_STRAIGHT',
      message: `One angle of this dihedral is within 10° of straight in ${(100 * share).toPrecision(2)} % of all samples: the dihedral is undefined there and its forces grow without bound.`,
      action:
        'Leave the dihedral out, or use a form whose force vanishes when an angle is straight; a shorter time step does not mend it.',
    },
  ]
}

function nearlyStraightShare({ edges, weights }: Histogram): number {
  const total = weights.reduce((sum, weight) => sum + weight, 0)
  const straight = weights.reduce((sum, weight, bin) => {
    const inside = edges[bin + 1] - Math.max(edges[bin], NEARLY_STRAIGHT)
    return sum + weight * Math.max(0, inside / (edges[bin + 1] - edges[bin]))
  }, 0)
  return straight / total
}
