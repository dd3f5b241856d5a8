import { performance } from 'node:perf_hooks'
import { expect, test } from 'vitest'
import { createHistogram, type CoordinateKind, type Histogram } from '@shared/histogram'
import { DEFAULT_INVERSION_SETTINGS, invert } from '@shared/inversion'
import { createRandom } from '@shared/numeric'
import { makeTable } from '@shared/tables'

const BINS = [90, 360, 1000, 5000]
const SAMPLES = 100_000
const WARM_UPS = 15
const RUNS = 41

interface Case {
  readonly name: string
  readonly kind: CoordinateKind
  readonly range: readonly [number, number]
  /** In kT. */
  readonly energy: (coordinate: number) => number
}

const CASES: readonly Case[] = [
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
function noisyHistogram({ kind, range: [low, high], energy }: Case, bins: number): Histogram {
  const edges = Float64Array.from({ length: bins + 1 }, (_, edge) => low + ((high - low) * edge) / bins)
  const masses = Float64Array.from({ length: bins }, (_, bin) => {
    const middle = (edges[bin] + edges[bin + 1]) / 2
    const volume = kind === 'bond' ? middle * middle : kind === 'angle' ? Math.sin(middle) : 1
    return volume * Math.exp(-energy(middle))
  })
  const total = masses.reduce((sum, mass) => sum + mass, 0)
  const random = createRandom(7)
  const weights = masses.map((mass) => random.poisson((SAMPLES * mass) / total))
  return createHistogram({ kind, edges, weights, content: 'count' })
}

function median(values: number[]): number {
  return values.toSorted((one, other) => one - other)[values.length >> 1]
}

function measure(histogram: Histogram): number {
  const run = () => {
    const { potential } = invert(histogram, 400, DEFAULT_INVERSION_SETTINGS)
    return makeTable(potential, DEFAULT_INVERSION_SETTINGS.table)
  }
  for (let round = 0; round < WARM_UPS; round++) run()
  const times = Array.from({ length: RUNS }, () => {
    const start = performance.now()
    run()
    return performance.now() - start
  })
  return median(times)
}

test('automatic inversion with band and a table of 1,000 rows', () => {
  const rows = CASES.map((benchCase) => {
    const medians = BINS.map((bins) => measure(noisyHistogram(benchCase, bins)))
    expect(medians.every((time) => Number.isFinite(time))).toBe(true)
    const cells = medians.map((time, place) => {
      const ratio = `×${(time / medians[0]).toFixed(1)} for ×${(BINS[place] / BINS[0]).toFixed(1)}`
      return `${time.toFixed(2)} ms${place === 0 ? '' : ` (${ratio})`}`.padEnd(28)
    })
    return `${benchCase.name.padEnd(24)}${cells.join('')}`
  })
  const head = `${'median after warm-up'.padEnd(24)}${BINS.map((bins) => `${bins} bins`.padEnd(28)).join('')}`
  console.log([`${SAMPLES} samples, ${RUNS} runs`, head, ...rows].join('\n'))
})
