import { performance } from 'node:perf_hooks'
import {
  createHistogram,
  createJointHistogram,
  type CoordinateKind,
  type Histogram,
  type JointHistogram,
} from '@shared/histogram'
import { createRandom } from '@shared/numeric'

/** A distribution that milliseconds are measured on. */
export interface BenchCase {
  readonly name: string
  readonly kind: CoordinateKind
  readonly range: readonly [number, number]
  /** In kT. */
  readonly energy: (coordinate: number) => number
}

/** Distributions of every kind, easy and hard ones. */
export const BENCH_CASES: readonly BenchCase[] = [
  { name: 'bond, harmonic', kind: 'bond', range: [0.2, 0.5], energy: (r) => 750 * (r - 0.35) ** 2 },
  {
    name: 'bond, two states',
    kind: 'bond',
    range: [0.3, 0.9],
    energy: (r) =>
      -Math.log(Math.exp(-(((r - 0.5) / 0.04) ** 2)) + 0.6 * Math.exp(-(((r - 0.65) / 0.05) ** 2))),
  },
  {
    name: 'angle, broad',
    kind: 'angle',
    range: [0, Math.PI],
    energy: (theta) => 7 * (Math.cos(theta) + 0.6) ** 2,
  },
  {
    name: 'dihedral, three wells',
    kind: 'dihedral',
    range: [-Math.PI, Math.PI],
    energy: (phi) => 1.5 * (1 + Math.cos(3 * phi)) + 0.8 * (1 + Math.cos(phi)),
  },
  { name: 'dihedral, flat', kind: 'dihedral', range: [-Math.PI, Math.PI], energy: () => 0 },
]

/** Poisson counts of the case on equal bins, with the same seed for every number of bins. */
export function noisyHistogram(
  { kind, range: [low, high], energy }: BenchCase,
  bins: number,
  samples: number,
): Histogram {
  const edges = Float64Array.from({ length: bins + 1 }, (_, edge) => low + ((high - low) * edge) / bins)
  const masses = Float64Array.from({ length: bins }, (_, bin) => {
    const middle = (edges[bin] + edges[bin + 1]) / 2
    const volume = kind === 'bond' ? middle * middle : kind === 'angle' ? Math.sin(middle) : 1
    return volume * Math.exp(-energy(middle))
  })
  const total = masses.reduce((sum, mass) => sum + mass, 0)
  const random = createRandom(7)
  const weights = masses.map((mass) => random.poisson((samples * mass) / total))
  return createHistogram({ kind, edges, weights, content: 'count' })
}

/** Median time in ms of `runs` calls, after `warmUps` that are not timed. */
export function medianTime(run: () => unknown, { warmUps, runs }: { warmUps: number; runs: number }): number {
  for (let round = 0; round < warmUps; round++) run()
  const times = Array.from({ length: runs }, () => {
    const start = performance.now()
    run()
    return performance.now() - start
  })
  return times.sort((one, other) => one - other)[runs >> 1]
}

/** Poisson counts of a coupled bond and angle on 90 × 120 bins, about as many as asked. */
export function noisyJointHistogram(samples: number): JointHistogram {
  const [nx, ny] = [90, 120]
  const random = createRandom(3)
  const weights = Array.from({ length: nx * ny }, (_, cell) => {
    const [x, y] = [(Math.floor(cell / ny) - 45) / 15, ((cell % ny) - 60) / 20]
    return random.poisson((samples / 1885) * Math.exp(-0.5 * (x * x - x * y + y * y)))
  })
  return createJointHistogram({
    kinds: ['bond', 'angle'],
    xEdges: Array.from({ length: nx + 1 }, (_, edge) => 0.3 + 0.002 * edge),
    yEdges: Array.from({ length: ny + 1 }, (_, edge) => 0.5 + 0.02 * edge),
    weights,
    content: 'count',
  })
}
