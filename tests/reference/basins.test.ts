import { describe, expect, it } from 'vitest'
import { curveBasins, gridBasins } from '@shared/basins'
import { DEFAULT_INVERSION_SETTINGS, invert } from '@shared/inversion'
import { edgesOf, exactHistogram } from '../support/exact-histograms'
import ryckaertBellemans from './fixtures/dihedral-rb.json'
import vonMises from './fixtures/dihedral-vonmises.json'
import joint from './fixtures/joint-2d.json'

const DEGREE = Math.PI / 180

function inverted({ inputs, expected }: typeof ryckaertBellemans | typeof vonMises) {
  const edges = edgesOf(-Math.PI, Math.PI, inputs.n_bins)
  const exact = {
    kind: 'dihedral',
    edges,
    probabilities: expected.bin_probability,
    energy: () => 0,
    ...inputs,
  } as const
  return invert(exactHistogram({ ...exact, temperature: inputs.T }), inputs.T, DEFAULT_INVERSION_SETTINGS)
}

/** U = Σ C_n cosⁿ(φ − 180°): Ryckaert & Bellemans, Chem. Phys. Lett. 30 (1975) 123. */
const butane = (phi: number) =>
  ryckaertBellemans.inputs.C_kJ_per_mol.reduce(
    (sum, c, power) => sum + c * Math.cos(phi - Math.PI) ** power,
    0,
  )

/** Place of the least (sign 1) or largest (sign −1) energy of butane between two angles in degrees, to 0.001°. */
function extremum([low, high]: readonly [number, number], sign: 1 | -1): number {
  const places = Array.from({ length: 1000 * (high - low) + 1 }, (_, place) => (low + place / 1000) * DEGREE)
  return places.reduce((best, place) => (sign * butane(place) < sign * butane(best) ? place : best))
}

describe('basins of exact dihedrals', () => {
  it('butane has trans and two gauche basins with their barriers (analytic: cosine powers)', () => {
    const { basins } = curveBasins(inverted(ryckaertBellemans).potential)
    const { kT } = ryckaertBellemans.inputs
    const [gauche, barrier] = [extremum([30, 90], 1), extremum([90, 150], -1)]
    expect(basins).toHaveLength(3)
    expect(Math.abs(basins[0].coordinate)).toBeCloseTo(Math.PI, 2)
    for (const basin of basins.slice(1)) {
      // The inversion itself is within 0.01 kT of the true potential, and half a degree for its minimum.
      expect(Math.abs(Math.abs(basin.coordinate) - gauche)).toBeLessThan(0.5 * DEGREE)
      expect(Math.abs(Math.abs(basin.barrier?.coordinate ?? 0) - barrier)).toBeLessThan(0.5 * DEGREE)
      expect(Math.abs((basin.depth ?? 0) - (butane(barrier) - butane(gauche)) / kT)).toBeLessThan(0.02)
    }
    // Populations from the fixture's own bins: the barriers at ±120° stand on bin edges, near enough to the true ones.
    const { bin_probability } = ryckaertBellemans.expected
    const trans = [...bin_probability.slice(0, 12), ...bin_probability.slice(60)].reduce(
      (sum, p) => sum + p,
      0,
    )
    expect(Math.abs(basins[0].population - trans)).toBeLessThan(0.002)
    expect(Math.abs(basins[1].population - (1 - trans) / 2)).toBeLessThan(0.001)
  })

  it('one cosine has one basin where it should be (analytic)', () => {
    const { basins } = curveBasins(inverted(vonMises).potential)
    expect(basins).toHaveLength(1)
    expect(Math.abs(basins[0].coordinate - vonMises.inputs.mu_deg * DEGREE)).toBeLessThan(0.1 * DEGREE)
    expect(basins[0].population).toBeCloseTo(1, 10)
  })
})

describe('basins of exact joint densities', () => {
  const middles = (low: number, high: number, bins: number) =>
    Float64Array.from({ length: bins }, (_, bin) => low + ((bin + 0.5) * (high - low)) / bins)
  const grid = (
    x: Float64Array,
    y: Float64Array,
    density: (x: number, y: number) => number,
    periodic: readonly [boolean, boolean],
  ) => {
    const masses = Float64Array.from([...x].flatMap((a) => [...y].map((b) => density(a, b))))
    return { x, y, energies: masses.map((mass) => -Math.log(mass)), deviations: null, masses, periodic }
  }
  const gauss = (value: number, mean: number, deviation: number) =>
    Math.exp(-(((value - mean) / deviation) ** 2) / 2) / deviation

  it('two of a bond and an angle, at the components’ means with their weights', () => {
    const components = joint.inputs.two_basin.components_w_mx_sx_my_sy
    const density = (a: number, b: number) =>
      components.reduce((sum, [w, mx, sx, my, sy]) => sum + w * gauss(a, mx, sx) * gauss(b, my, sy), 0)
    const { basins } = gridBasins(
      grid(middles(0.28, 0.46, 90), middles(1.35, 3.1, 90), density, [false, false]),
    )
    expect(basins).toHaveLength(2)
    const byWeight = [...components].sort(([one], [other]) => other - one)
    const byPopulation = [...basins].sort((one, other) => (other.population ?? 0) - (one.population ?? 0))
    byPopulation.forEach(({ x, y, population }, index) => {
      const [w, mx, , my] = byWeight[index]
      // A cell is 0.002 nm and 0.02 rad; the tail of one component beyond the saddle is below 2 %.
      expect(Math.abs(x - mx)).toBeLessThan(0.004)
      expect(Math.abs(y - my)).toBeLessThan(0.04)
      expect(Math.abs((population ?? 0) - w)).toBeLessThan(0.02)
    })
  })

  it('three of a dihedral and an angle, around the turn', () => {
    const components = joint.inputs.three_basin.components_w_mu_deg_kappa_m_deg_s_deg
    const density = (a: number, b: number) =>
      components.reduce(
        (sum, [w, mu, kappa, m, s]) =>
          sum + w * Math.exp(kappa * (Math.cos(a - mu * DEGREE) - 1)) * gauss(b, m * DEGREE, s * DEGREE),
        0,
      )
    const { basins } = gridBasins(
      grid(middles(-Math.PI, Math.PI, 72), middles(80 * DEGREE, 140 * DEGREE, 60), density, [true, false]),
    )
    expect(basins).toHaveLength(3)
    for (const [w, mu] of components) {
      const near = basins.find(({ x }) => Math.cos(x - mu * DEGREE) > Math.cos(5 * DEGREE))
      expect(Math.abs((near?.population ?? 0) - w)).toBeLessThan(0.02)
    }
  })
})
