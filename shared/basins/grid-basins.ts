import { InvalidInputError } from '../errors'
import { type BasinCurve, type BasinThreshold, DEFAULT_BASIN_THRESHOLD } from './basin'
import { basinCurve, countBasins } from './counted-basins'
import { type MergeTree, mergeTree, type NeighbourList } from './merge-tree'

/** An energy on a grid of two coordinates; where it comes from does not matter. Row-major, index ix · ny + iy. */
export interface EnergyGrid {
  /** Midpoints of the cells along each axis, ascending; nm or rad. */
  readonly x: Float64Array
  readonly y: Float64Array
  /** kT, any constant; what is not finite has no data: a wall. */
  readonly energies: Float64Array
  /** Standard deviation of each energy less that of the most likely cell, kT; NaN where unknown; null when nothing is known. */
  readonly deviations: Float64Array | null
  /** Probability of each cell, any factor; null where populations are not wanted. */
  readonly masses: Float64Array | null
  /** Whether the last row (column) is beside the first, as on a dihedral whose bins fill the turn. */
  readonly periodic: readonly [x: boolean, y: boolean]
}

/** The saddle a basin spills over into a lower one. */
export interface GridBarrier {
  readonly x: number
  readonly y: number
  /** kT on the scale of the grid. */
  readonly energy: number
}

/** A basin of a grid. */
export interface GridBasin {
  /** Midpoint of its lowest cell, nm or rad. */
  readonly x: number
  readonly y: number
  /** Index of that cell. */
  readonly cell: number
  /** kT on the scale of the grid. */
  readonly energy: number
  /** Barrier less minimum in kT; null for the lowest basin and for one that walls cut off: no way leads lower. */
  readonly depth: number | null
  /** Standard deviation of the depth in kT; null where it has none or nothing is known. */
  readonly deviation: number | null
  readonly barrier: GridBarrier | null
  /** Share of the probability of all cells that are no walls; null without masses. */
  readonly population: number | null
}

/** The basins of a grid with what they were asked at. */
export interface GridBasins {
  readonly threshold: BasinThreshold
  /** Ascending energy. */
  readonly basins: readonly GridBasin[]
  readonly curve: BasinCurve
  /** Place in `basins` of the basin each cell belongs to; −1 for a wall. */
  readonly owners: Int32Array
}

/**
 * Basins of an energy on a grid by topological persistence (`mergeTree`). A cell has 8 neighbours: with 4, a narrow valley that
 * runs diagonally would fall apart into one basin a cell. The deviation of a depth is √(σ² of barrier + σ² of minimum): as if
 * the two were independent, which overstates it, so that noise is rather left out.
 *
 * @returns no basins and an empty curve when all cells are walls
 * @throws {InvalidInputError} LENGTH_MISMATCH; SETTING_INVALID for a threshold below 0
 */
export function gridBasins(grid: EnergyGrid, threshold = DEFAULT_BASIN_THRESHOLD): GridBasins {
  checkLengths(grid)
  const { x, y, energies, deviations, masses, periodic } = grid
  const tree = mergeTree(energies, eightNeighbours(x.length, y.length, periodic))
  const sigmas = deviations && depthDeviations(deviations, tree)
  const { kept, holders } = countBasins(tree, sigmas, threshold)
  const owners = tree.labels.map((label) => (label < 0 ? -1 : holders[label]))
  const populations = masses && shares(masses, owners, kept.length)
  const place = (cell: number) => ({
    x: x[Math.floor(cell / y.length)],
    y: y[cell % y.length],
    energy: energies[cell],
  })
  const basins = kept.map((basin, index): GridBasin => {
    const [cell, saddle, sigma] = [tree.minima[basin], tree.saddles[basin], sigmas?.[basin] ?? NaN]
    return {
      ...place(cell),
      cell,
      depth: saddle < 0 ? null : tree.depths[basin],
      deviation: Number.isNaN(sigma) ? null : sigma,
      barrier: saddle < 0 ? null : place(saddle),
      population: populations && populations[index],
    }
  })
  return { threshold, basins, curve: basinCurve(tree), owners }
}

function checkLengths({ x, y, energies, deviations, masses }: EnergyGrid): void {
  for (const [field, values] of Object.entries({ energies, deviations, masses })) {
    if (values === null || values.length === x.length * y.length) continue
    throw new InvalidInputError(
      'LENGTH_MISMATCH',
      `A grid of ${x.length} × ${y.length} cells has ${values.length} ${field}.`,
      { field },
    )
  }
}

function depthDeviations(deviations: Float64Array, { minima, saddles }: MergeTree): Float64Array {
  return Float64Array.from(minima, (cell, basin) => {
    const saddle = saddles[basin]
    return saddle < 0 ? NaN : Math.hypot(deviations[cell], deviations[saddle])
  })
}

function shares(masses: Float64Array, owners: Int32Array, count: number): Float64Array {
  const sums = new Float64Array(count)
  let total = 0
  owners.forEach((owner, cell) => {
    if (owner < 0) return
    sums[owner] += masses[cell]
    total += masses[cell]
  })
  return sums.map((sum) => sum / total)
}

function eightNeighbours(
  nx: number,
  ny: number,
  [xTurns, yTurns]: readonly [boolean, boolean],
): NeighbourList {
  return (cell, into) => {
    const [ix, iy] = [Math.floor(cell / ny), cell % ny]
    let count = 0
    for (let dx = -1; dx <= 1; dx++) {
      const jx = xTurns ? (ix + dx + nx) % nx : ix + dx
      if (jx < 0 || jx >= nx) continue
      for (let dy = -1; dy <= 1; dy++) {
        const jy = yTurns ? (iy + dy + ny) % ny : iy + dy
        if (jy < 0 || jy >= ny || (dx === 0 && dy === 0)) continue
        into[count++] = jx * ny + jy
      }
    }
    return count
  }
}
