import { describe, expect, it } from 'vitest'
import { correlate } from '@shared/correlation'
import { mutualInformation, mutualInformationMillerMadow } from '@shared/correlation/mutual-information'
import { accumulateJoint, type CoordinateKind, createJointHistogram } from '@shared/histogram'
import { createRandom, GAUSS_LEGENDRE, type Random } from '@shared/numeric'
import { edgesOf } from '../support/exact-histograms'
import fixture from './fixtures/joint-2d.json'

/*
 * Source: fixtures/joint-2d.json. Mutual information of the normal density is analytic, −½ ln(1 − ρ²) (Gelfand & Yaglom 1957;
 * Cover & Thomas 2006; citations from memory); that of the other densities is the double integral of p ln[p/(p_x p_y)] by
 * composite quadrature at two resolutions that agree to 1e-12. Miller–Madow: Miller 1955, in Information Theory in Psychology
 * II-B, 95. The tolerance of a comparison without samples is the fixture's own.
 */
const { inputs, tolerance } = fixture
const { bivariate_normal, binned_probability_matrix, jacobian_weighted, miller_madow_worked_example } =
  fixture.expected
const { two_basin, three_basin } = fixture.expected

const DEGREE = Math.PI / 180
const SAMPLES = 100_000
const BINS = 40
/** Nats: asked for at 100,000 samples on 40 × 40 bins. */
const SAMPLED = 0.01
/** In standard deviations: the window of the fixture's binned normal densities. */
const NORMAL_WINDOW: Range = [-4, 4]

type Pair = readonly [number, number]
type Density = (x: number, y: number) => number
type Range = readonly [number, number]

/** A density of the fixture, up to a factor, with a way to draw from it and a window that holds all of it but 1e-5. */
interface Case {
  readonly name: string
  readonly kinds: readonly [CoordinateKind, CoordinateKind]
  readonly density: Density
  readonly draw: (random: Random) => Pair
  /** Nats, of the density itself. */
  readonly exact: number
  readonly window: readonly [Range, Range]
  /** For quadrature: beyond it the density is below 1e-20 of its peak, or not defined. */
  readonly support: readonly [Range, Range]
}

const gauss = (x: number, mean: number, deviation: number) =>
  Math.exp(-(((x - mean) / deviation) ** 2) / 2) / deviation

function correlated(rho: number): (random: Random) => Pair {
  return (random) => {
    const x = random.normal()
    return [x, rho * x + Math.sqrt(1 - rho * rho) * random.normal()]
  }
}

/** r² sin θ times a correlated normal density: drawn from the latter, kept in proportion to the former. */
function jacobianCase({ rho, MI_nats }: (typeof jacobian_weighted)[number]): Case {
  const { r0_nm, sr_nm, theta0_deg, st_rad } = inputs.jacobian_weighted
  const theta0 = theta0_deg * DEGREE
  const window: Case['window'] = [
    [r0_nm - 4.5 * sr_nm, r0_nm + 4.5 * sr_nm],
    [theta0 - 4.5 * st_rad, theta0 + 4.5 * st_rad],
  ]
  const volume: Density = (r, theta) => r * r * Math.sin(theta)
  const pairOf = correlated(rho)
  return {
    name: `r² sin θ times a normal density, ρ = ${rho}`,
    kinds: ['bond', 'angle'],
    exact: MI_nats,
    density: (r, theta) => {
      const [x, y] = [(r - r0_nm) / sr_nm, (theta - theta0) / st_rad]
      return volume(r, theta) * Math.exp(-(x * x - 2 * rho * x * y + y * y) / (1 - rho * rho) / 2)
    },
    draw: (random) => {
      for (;;) {
        const [x, y] = pairOf(random)
        const [r, theta] = [r0_nm + sr_nm * x, theta0 + st_rad * y]
        if (random.uniform() * window[0][1] ** 2 < volume(r, theta)) return [r, theta]
      }
    },
    window,
    support: [
      [r0_nm - 10 * sr_nm, r0_nm + 10 * sr_nm],
      [0, Math.PI],
    ],
  }
}

function twoBasins(): Case {
  const components = inputs.two_basin.components_w_mx_sx_my_sy
  return {
    name: 'two basins of a bond and an angle',
    kinds: ['bond', 'angle'],
    exact: two_basin.MI_nats,
    density: (x, y) =>
      components.reduce((sum, [w, mx, sx, my, sy]) => sum + w * gauss(x, mx, sx) * gauss(y, my, sy), 0),
    draw: (random) => {
      const [, mx, sx, my, sy] = components[random.uniform() < components[0][0] ? 0 : 1]
      return [mx + sx * random.normal(), my + sy * random.normal()]
    },
    window: [
      [0.28, 0.46],
      [1.35, 3.1],
    ],
    support: [
      [0.2, 0.55],
      [0.5, 4],
    ],
  }
}

function threeBasins(): Case {
  // All three are equally narrow in φ, so the norm of their von Mises densities is a common factor.
  const components = inputs.three_basin.components_w_mu_deg_kappa_m_deg_s_deg
  const wave = (phi: number, mu: number, kappa: number) => Math.exp(kappa * (Math.cos(phi - mu * DEGREE) - 1))
  return {
    name: 'three basins of a dihedral and an angle',
    kinds: ['dihedral', 'angle'],
    exact: three_basin.MI_nats,
    density: (phi, theta) =>
      components.reduce(
        (sum, [w, mu, kappa, m, s]) => sum + w * wave(phi, mu, kappa) * gauss(theta, m * DEGREE, s * DEGREE),
        0,
      ),
    draw: (random) => {
      const chosen = random.uniform()
      const [, mu, kappa, m, s] =
        components[chosen < components[0][0] ? 0 : chosen < components[0][0] + components[1][0] ? 1 : 2]
      let phi: number
      do phi = Math.PI * (2 * random.uniform() - 1)
      while (random.uniform() > wave(phi, mu, kappa))
      return [phi, m * DEGREE + s * DEGREE * random.normal()]
    },
    window: [
      [-Math.PI, Math.PI],
      [80 * DEGREE, 140 * DEGREE],
    ],
    support: [
      [-Math.PI, Math.PI],
      [50 * DEGREE, 170 * DEGREE],
    ],
  }
}

const CASES: readonly Case[] = [...jacobian_weighted.map(jacobianCase), twoBasins(), threeBasins()]

/** Points and weights of the composite Gauss–Legendre rule. */
function quadrature([low, high]: Range, panels: number): Pair[] {
  const width = (high - low) / panels
  return Array.from({ length: panels }, (_, panel) => panel).flatMap((panel) =>
    GAUSS_LEGENDRE.map(({ node, weight }): Pair => [
      low + width * (panel + (1 + node) / 2),
      (weight * width) / 2,
    ]),
  )
}

/** The table of w_i w_j p(x_i, y_j): its mutual information is the double integral, by quadrature. */
function quadratureTable(density: Density, x: readonly Pair[], y: readonly Pair[]): Float64Array {
  const table = new Float64Array(x.length * y.length)
  let cell = 0
  for (const [a, u] of x) for (const [b, v] of y) table[cell++] = u * v * density(a, b)
  return table
}

/** Exact masses of `bins` × `bins` cells of a window, each cell by five points a side. */
function binnedTable(density: Density, [x, y]: readonly [Range, Range], bins: number): Float64Array {
  const [rows, columns] = [quadrature(x, bins), quadrature(y, bins)]
  const fine = quadratureTable(density, rows, columns)
  const points = GAUSS_LEGENDRE.length
  const cells = new Float64Array(bins * bins)
  fine.forEach((mass, index) => {
    const [row, column] = [Math.floor(index / columns.length), index % columns.length]
    cells[Math.floor(row / points) * bins + Math.floor(column / points)] += mass
  })
  return cells
}

/** 100,000 draws inside the window, or as many as asked, on equal bins. */
function sampled(
  { kinds, draw, window: [x, y] }: Pick<Case, 'kinds' | 'draw' | 'window'>,
  seed: number,
  samples = SAMPLES,
  bins: readonly [number, number] = [BINS, BINS],
) {
  const random = createRandom(seed)
  const inside = (value: number, [low, high]: Range) => value > low && value < high
  const [first, second] = [new Float64Array(samples), new Float64Array(samples)]
  for (let kept = 0; kept < samples;) {
    const [a, b] = draw(random)
    if (!inside(a, x) || !inside(b, y)) continue
    first[kept] = a
    second[kept++] = b
  }
  const xEdges = Float64Array.from(edgesOf(...x, bins[0]))
  const yEdges = Float64Array.from(edgesOf(...y, bins[1]))
  const weights = accumulateJoint(first, second, xEdges, yEdges)
  return createJointHistogram({ kinds, xEdges, yEdges, weights, content: 'count' })
}

/** Standard normal pairs as bonds and angles, in a window of ±4σ: the densities of the fixture are renormalised to it. */
function normalCase(rho: number): Pick<Case, 'kinds' | 'draw' | 'window'> {
  const pairOf = correlated(rho)
  return {
    kinds: ['bond', 'angle'],
    draw: (random) => {
      const [x, y] = pairOf(random)
      return [0.35 + 0.01 * x, 2 + 0.1 * y]
    },
    window: [
      [0.31, 0.39],
      [1.6, 2.4],
    ],
  }
}

describe('mutual information of exact tables', () => {
  it('of the binned normal density with ρ = 0.5, as it is printed', () => {
    const matrix = Float64Array.from(binned_probability_matrix.rows_x_columns_y.flat())
    const value = mutualInformation(matrix, binned_probability_matrix.n)
    expect(Math.abs(value - binned_probability_matrix.MI_renormalised_nats)).toBeLessThan(
      tolerance.abs_quadrature,
    )
  })

  it.each(
    bivariate_normal.flatMap(({ rho, MI_binned_nats: exact }) => [
      { rho, bins: 20, exact: exact['20x20_on_pm4_sigma'] },
      { rho, bins: 40, exact: exact['40x40_on_pm4_sigma'] },
    ]),
  )('of the normal density with ρ = $rho on $bins × $bins bins', ({ rho, bins, exact }) => {
    const density: Density = (x, y) => Math.exp(-(x * x - 2 * rho * x * y + y * y) / (1 - rho * rho) / 2)
    // Every bin is cut in five panels, so that the rule leaves nothing of the tolerance.
    const fine = binnedTable(density, [NORMAL_WINDOW, NORMAL_WINDOW], 5 * bins)
    const cells = new Float64Array(bins * bins)
    fine.forEach((mass, index) => {
      const [x, y] = [Math.floor(index / (5 * bins)), index % (5 * bins)]
      cells[Math.floor(x / 5) * bins + Math.floor(y / 5)] += mass
    })
    expect(Math.abs(mutualInformation(cells, bins) - exact)).toBeLessThan(tolerance.abs_quadrature)
  })

  it.each(CASES)('of $name, by quadrature', ({ density, support, exact }) => {
    const [x, y] = support.map((range) => quadrature(range, 90))
    const value = mutualInformation(quadratureTable(density, x, y), y.length)
    expect(Math.abs(value - exact)).toBeLessThan(tolerance.abs_quadrature)
  })

  it('of the worked example, plug-in and with the Miller–Madow correction', () => {
    const { counts, N, MI_plugin, MI_miller_madow } = miller_madow_worked_example
    const masses = Float64Array.from(counts.flat(), (count) => count / N)
    expect(Math.abs(mutualInformation(masses, 4) / MI_plugin - 1)).toBeLessThan(tolerance.rel_closed_form)
    expect(Math.abs(mutualInformationMillerMadow(masses, 4, N) / MI_miller_madow - 1)).toBeLessThan(
      tolerance.rel_closed_form,
    )
  })
})

describe('100,000 samples on 40 × 40 bins', () => {
  it.each(bivariate_normal)(
    'of the normal density with ρ = $rho: within 0.01 nats of the exact table, and the right verdict',
    ({ rho, MI_binned_nats }) => {
      const { mutualInformationCorrected, verdict, pearson } = correlate(sampled(normalCase(rho), 11))
      const exact = MI_binned_nats['40x40_on_pm4_sigma']
      expect(Math.abs((mutualInformationCorrected ?? NaN) - exact)).toBeLessThan(SAMPLED)
      // Three standard errors (1 − ρ²)/√N, and what bins of σ/5 take from the coefficient: w²/12 of 1.
      expect(Math.abs((pearson ?? NaN) - rho)).toBeLessThan(
        3 * ((1 - rho * rho) / Math.sqrt(SAMPLES)) + 0.004,
      )
      const expected = { 0: 'separable', 0.2: 'borderline', 0.5: 'joint', 0.8: 'joint' }[rho]
      // ρ = 0.2 stands at 0.0202 nats, on the threshold: either side is right.
      expect(rho === 0.2 ? ['separable', 'borderline'] : [expected]).toContain(verdict)
    },
  )

  /*
   * Forty bins over ±4.5σ know less than the density: bins never add information (Cover & Thomas 2006, data processing
   * inequality; from memory). The exact table, by quadrature, is what samples can be held against; what it lost is the
   * difference to the fixture's value, and where that is small, samples must meet the density as well.
   */
  it.each(CASES)('of $name: within 0.01 nats of the exact table', ({ exact, ...density }) => {
    const { mutualInformationCorrected } = correlate(sampled(density, 5))
    const binned = mutualInformation(binnedTable(density.density, density.window, BINS), BINS)
    const lost = exact - binned
    expect(Math.abs((mutualInformationCorrected ?? NaN) - binned)).toBeLessThan(SAMPLED)
    // ρ = 0.8 loses most: at a given bond the angle spreads by no more than 2.7 bins.
    expect(lost).toBeGreaterThan(-tolerance.abs_quadrature)
    expect(lost).toBeLessThan(0.75 * SAMPLED)
    if (lost < 0.25 * SAMPLED)
      expect(Math.abs((mutualInformationCorrected ?? NaN) - exact)).toBeLessThan(SAMPLED)
  })
})

describe('independent terms at 2,000 samples', () => {
  const REPEATS = 200

  it.each([
    ['the bins of a fine file', [90, 120]],
    ['40 × 40 bins', [40, 40]],
  ] as const)(
    'are advised a joint potential in less than 1 % of 200 seeded repeats, on %s',
    (_, bins) => {
      const verdicts = Array.from(
        { length: REPEATS },
        (_, seed) => correlate(sampled(normalCase(0), 1000 + seed, 2000, bins), { seed }).verdict,
      )
      expect(verdicts.filter((verdict) => verdict === 'joint').length).toBeLessThan(0.01 * REPEATS)
      // Nor are they saved by never saying anything.
      expect(verdicts.filter((verdict) => verdict === 'separable').length).toBeGreaterThan(0.98 * REPEATS)
    },
    180_000,
  )
})
