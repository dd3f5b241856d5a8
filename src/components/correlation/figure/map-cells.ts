import type { Correlation } from '@shared/correlation'
import { couplingLimit, couplingStep, densityStep } from '@/components/figure/ramp-steps'
import type { MapModel } from './map-model'

/** A rectangle of the map in data coordinates (internal units), and its place on the colour ramp. */
export interface MapCell {
  readonly x: readonly [low: number, high: number]
  readonly y: readonly [low: number, high: number]
  readonly step: number
}

/**
 * The cells of a grid as rectangles; neighbours along y with one colour become one rectangle, which keeps the drawing
 * small. Cells without a colour are left out.
 *
 * @param stepOf place on the ramp of the cell with this row-major index, or null for none
 */
export function mapCells(
  xEdges: ArrayLike<number>,
  yEdges: ArrayLike<number>,
  stepOf: (index: number) => number | null,
): MapCell[] {
  const ny = yEdges.length - 1
  const cells: MapCell[] = []
  for (let ix = 0; ix < xEdges.length - 1; ix += 1) {
    let iy = 0
    while (iy < ny) {
      const step = stepOf(ix * ny + iy)
      const from = iy
      iy += 1
      while (iy < ny && stepOf(ix * ny + iy) === step) iy += 1
      if (step === null) continue
      cells.push({ x: [xEdges[ix], xEdges[ix + 1]], y: [yEdges[from], yEdges[iy]], step })
    }
  }
  return cells
}

/** Cells of the file's grid by their density per volume; cells without counts are left as ground. */
export function densityCells(model: MapModel, steps: number): MapCell[] {
  return mapCells(model.x.edges, model.y.edges, (index) => {
    const density = model.shown[index]
    return Number.isNaN(density) ? null : densityStep(density / model.highest.density, steps)
  })
}

/** A cell of the file's grid is drawn where independence would put at least this many independent samples in it. */
const LEAST_EXPECTED = 0.5
/** The same where nobody stated a sample size, as a share. */
const LEAST_EXPECTED_SHARE = 1e-4

/** Cells of the file's grid by the coupling drawn in them. */
export function couplingCells(correlation: Correlation, model: MapModel, steps: number): MapCell[] {
  const limit = couplingLimit(correlation.coupling.values)
  const { values } = drawnCoupling(correlation)
  return mapCells(model.x.edges, model.y.edges, (index) =>
    Number.isNaN(values[index]) ? null : couplingStep(values[index], limit, steps),
  )
}

/**
 * The coupling of each cell of the file's grid, with its standard deviation: that of the cell of the coupling map that holds
 * it. NaN where it is too thin to judge, also at the rim, where a merged cell of the coupling map reaches far beyond the
 * samples.
 */
export function drawnCoupling(correlation: Correlation): { values: Float64Array; deviations: Float64Array } {
  const { coupling, marginals, independentSamples, xEdges, yEdges } = correlation
  const columns = holders(xEdges, coupling.xEdges)
  const rows = holders(yEdges, coupling.yEdges)
  const least = independentSamples === null ? LEAST_EXPECTED_SHARE : LEAST_EXPECTED / independentSamples
  const taken = (from: Float64Array): Float64Array =>
    Float64Array.from({ length: columns.length * rows.length }, (_, index) => {
      const ix = Math.floor(index / rows.length)
      const iy = index % rows.length
      if (marginals.x[ix] * marginals.y[iy] < least) return NaN
      return from[columns[ix] * (coupling.yEdges.length - 1) + rows[iy]]
    })
  return { values: taken(coupling.values), deviations: taken(coupling.deviations) }
}

/** For each fine bin the coarse one that holds its middle. */
function holders(fine: Float64Array, coarse: Float64Array): number[] {
  let bin = 0
  return Array.from({ length: fine.length - 1 }, (_, at) => {
    const middle = (fine[at] + fine[at + 1]) / 2
    while (bin < coarse.length - 2 && middle >= coarse[bin + 1]) bin += 1
    return bin
  })
}
