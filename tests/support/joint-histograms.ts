import { type CoordinateKind, createJointHistogram, jacobian, type JointHistogram } from '@shared/histogram'
import { createRandom, GAUSS_LEGENDRE } from '@shared/numeric'

/** A joint potential whose exact cell probabilities follow by quadrature. */
export interface JointCase {
  readonly kinds: readonly [CoordinateKind, CoordinateKind]
  readonly xEdges: readonly number[]
  readonly yEdges: readonly number[]
  /** In kT, up to a constant; coordinates in nm or rad. */
  readonly energy: (x: number, y: number) => number
}

/** Exact counts ∫∫ J exp(−U/kT) dq of each cell by Gauss–Legendre with five by five points, `samples` in all. */
export function exactJointCounts({ kinds, xEdges, yEdges, energy }: JointCase, samples: number): number[] {
  const [xNodes, yNodes] = [nodesOf(kinds[0], xEdges), nodesOf(kinds[1], yEdges)]
  const masses = xNodes.flatMap((column) =>
    yNodes.map((row) =>
      column.reduce(
        (sum, x) => row.reduce((part, y) => part + x.share * y.share * Math.exp(-energy(x.at, y.at)), sum),
        0,
      ),
    ),
  )
  const total = masses.reduce((sum, mass) => sum + mass, 0)
  return masses.map((mass) => (samples * mass) / total)
}

/** The exact counts, or Poisson counts about them where a seed is given. */
export function jointCase(exact: JointCase, samples: number, seed?: number): JointHistogram {
  const means = exactJointCounts(exact, samples)
  const random = seed === undefined ? null : createRandom(seed)
  const weights = random === null ? means : means.map((mean) => random.poisson(mean))
  const { kinds, xEdges, yEdges } = exact
  return createJointHistogram({ kinds, xEdges, yEdges, weights, content: 'count' })
}

function nodesOf(kind: CoordinateKind, edges: readonly number[]): { at: number; share: number }[][] {
  return edges.slice(1).map((edge, bin) => {
    const half = (edge - edges[bin]) / 2
    return GAUSS_LEGENDRE.map(({ node, weight }) => {
      const at = edges[bin] + half * (1 + node)
      return { at, share: weight * half * jacobian(kind, at) }
    })
  })
}
