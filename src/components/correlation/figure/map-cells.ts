import type { Correlation } from '@shared/correlation'
import type { MapModel } from './map-model'
import { couplingLimit, couplingStep, densityStep } from './ramp-steps'

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
export function densityCells(correlation: Correlation, model: MapModel, steps: number): MapCell[] {
  const { density } = correlation
  return mapCells(model.x.edges, model.y.edges, (index) =>
    density[index] === 0 ? null : densityStep(density[index] / model.highest.density, steps),
  )
}

/** Cells of the coupling map; those too thin to judge are left out. */
export function couplingCells({ coupling }: Correlation, model: MapModel, steps: number): MapCell[] {
  const limit = couplingLimit(coupling.values)
  return mapCells(
    coupling.xEdges.map((edge) => edge / model.x.scale),
    coupling.yEdges.map((edge) => edge / model.y.scale),
    (index) => {
      const value = coupling.values[index]
      return Number.isNaN(value) ? null : couplingStep(value, limit, steps)
    },
  )
}
