import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { basinsAtDepth, type EnergyGrid, gridBasins } from '@shared/basins'
import { createRandom } from '@shared/numeric'

const N = 30
const axis = Float64Array.from({ length: N }, (_, cell) => (cell + 0.5) / N)

function gridOf(energy: (x: number, y: number) => number, rest: Partial<EnergyGrid> = {}): EnergyGrid {
  const energies = Float64Array.from({ length: N * N }, (_, cell) =>
    energy(axis[Math.floor(cell / N)], axis[cell % N]),
  )
  return { x: axis, y: axis, energies, deviations: null, masses: null, periodic: [false, false], ...rest }
}

/** Two wells along x, 4 kT deep, the second half a kT higher; a parabola along y. */
const doubleWell = (x: number, y: number) => 2 * Math.cos(4 * Math.PI * x) + x + 30 * (y - 0.5) ** 2
const everyDepth = { depth: 0, deviations: 0 }

describe('gridBasins', () => {
  it('finds two wells with their barrier, depth and shares of the probability', () => {
    const grid = gridOf(doubleWell)
    const masses = grid.energies.map((energy) => Math.exp(-energy))
    const { basins, owners } = gridBasins({ ...grid, masses })
    expect(basins).toHaveLength(2)
    const [low, high] = basins
    expect(low).toMatchObject({ depth: null, barrier: null, deviation: null })
    expect(low.x).toBeCloseTo(0.25, 1)
    expect(high.x).toBeCloseTo(0.75, 1)
    expect(high.barrier?.x).toBeCloseTo(0.5, 1)
    // Analytic up to the grid: from the minimum near ¾ to the barrier near ½, 4 − ¼ kT.
    expect(high.depth).toBeCloseTo(3.75, 1)
    expect((low.population ?? 0) + (high.population ?? 0)).toBeCloseTo(1, 12)
    const left = masses.reduce(
      (sum, mass, cell) => sum + (axis[Math.floor(cell / N)] < high.barrier!.x ? mass : 0),
      0,
    )
    const total = masses.reduce((sum, mass) => sum + mass, 0)
    // The row of the barrier itself may go to either side.
    expect(Math.abs((low.population ?? 0) - left / total)).toBeLessThan(0.01)
    expect(owners).toHaveLength(N * N)
  })

  it('keeps a narrow diagonal valley in one piece', () => {
    const { basins } = gridBasins(gridOf((x, y) => (Math.abs(x - y) < 1e-9 ? x : 5)))
    expect(basins).toHaveLength(1)
  })

  it('goes over the border of a turn, and not over that of a line', () => {
    const edgeWells = (x: number) => 3 * Math.sin(Math.PI * x)
    expect(gridBasins(gridOf(edgeWells)).basins).toHaveLength(2)
    expect(gridBasins(gridOf(edgeWells, { periodic: [true, false] })).basins).toHaveLength(1)
  })

  it('asks for twice the deviation of a depth where that is more than half a kT', () => {
    const certain = new Float64Array(N * N).fill(1)
    const doubtful = new Float64Array(N * N).fill(1.5)
    // √2 · 1 · 2 = 2.8 kT is less than the 3.75 kT of the second well, √2 · 1.5 · 2 = 4.2 kT is more.
    expect(gridBasins(gridOf(doubleWell, { deviations: certain })).basins).toHaveLength(2)
    expect(gridBasins(gridOf(doubleWell, { deviations: doubtful })).basins).toHaveLength(1)
    const ignored = gridBasins(gridOf(doubleWell, { deviations: doubtful }), { depth: 0.5, deviations: 0 })
    expect(ignored.basins).toHaveLength(2)
    expect(ignored.threshold).toEqual({ depth: 0.5, deviations: 0 })
  })

  it('says nothing of a grid without data', () => {
    const { basins, curve, owners } = gridBasins(gridOf(() => NaN))
    expect(basins).toEqual([])
    expect(curve).toEqual({ lasting: 0, steps: [] })
    expect([...owners].every((owner) => owner === -1)).toBe(true)
  })

  it('lets walls part two regions and gives neither a depth', () => {
    const { basins } = gridBasins(gridOf((x) => (Math.abs(x - 0.5) < 0.02 ? NaN : x)))
    expect(basins.map(({ depth }) => depth)).toEqual([null, null])
  })

  it('white noise below the depth asked for adds no basin', () => {
    fc.assert(
      fc.property(fc.nat(), (seed) => {
        const random = createRandom(seed)
        const noisy = gridOf((x, y) => doubleWell(x, y) + 0.49 * random.uniform())
        expect(gridBasins(noisy).basins).toHaveLength(2)
      }),
      { numRuns: 50 },
    )
  })

  it('does not care about a constant, nor from which side the grid is read', () => {
    const landscape = fc.array(fc.integer({ min: 0, max: 20 }), { minLength: N * N, maxLength: N * N })
    fc.assert(
      fc.property(landscape, (values) => {
        const grid = gridOf(() => 0)
        const of = (energies: readonly number[]) =>
          gridBasins({ ...grid, energies: Float64Array.from(energies) }, everyDepth).curve
        expect(of(values.map((value) => value + 7))).toEqual(of(values))
        expect(of([...values].reverse())).toEqual(of(values))
      }),
      { numRuns: 30 },
    )
  })

  it('says how the number of basins falls with the depth', () => {
    const { curve } = gridBasins(gridOf(doubleWell))
    expect(basinsAtDepth(curve, 3)).toBe(2)
    expect(basinsAtDepth(curve, 4)).toBe(1)
    const depths = curve.steps.map(({ depth }) => depth)
    expect(depths).toEqual([...depths].sort((a, b) => b - a))
  })

  it('refuses arrays that do not fit and a negative depth', () => {
    expect(() => gridBasins(gridOf(() => 0, { masses: new Float64Array(3) }))).toThrow(
      expect.objectContaining({ code: 'LENGTH_MISMATCH' }),
    )
    expect(() =>
      gridBasins(
        gridOf(() => 0),
        { depth: -1, deviations: 2 },
      ),
    ).toThrow(expect.objectContaining({ code: 'SETTING_INVALID' }))
  })
})
