import type { Correlation } from '@shared/correlation'
import { fixedText, significantText } from '@/components/figure/number-text'
import { coordinateAt } from './coordinate-at'
import type { MapAxis, MapModel } from './map-model'

/** A cell of the file's grid by its two bins. */
export interface CellPlace {
  readonly ix: number
  readonly iy: number
}

/** What one cell says, in the units shown. */
export interface CellReading extends CellPlace {
  readonly x: string
  readonly y: string
  /** Counts where the file holds counts, else the share in per cent. */
  readonly amount: string
  readonly density: string
  /** In kT with its standard deviation, or why there is none. */
  readonly coupling: string
}

/** Reads one cell. The coupling comes from the cell of the coupling map that holds its middle. */
export function readCell(
  correlation: Correlation,
  model: MapModel,
  weights: ArrayLike<number>,
  { ix, iy }: CellPlace,
): CellReading {
  const ny = correlation.yEdges.length - 1
  const index = ix * ny + iy
  const density = correlation.density[index]
  return {
    ix,
    iy,
    x: middleText(model.x, ix),
    y: middleText(model.y, iy),
    amount:
      correlation.content === 'count'
        ? `${fixedText(weights[index], Number.isInteger(weights[index]) ? 0 : 1)} counts`
        : `${significantText(100 * weights[index], 2)} %`,
    density: `density ${significantText(density / model.highest.density, 2)} of the highest`,
    coupling: couplingText(correlation, ix, iy),
  }
}

/** The bin of a value on an axis, or null outside. */
export function binAt(edges: ArrayLike<number>, value: number): number | null {
  const last = edges.length - 1
  if (!(value >= edges[0] && value <= edges[last])) return null
  let bin = 0
  while (bin < last - 1 && value >= edges[bin + 1]) bin += 1
  return bin
}

function middleText(axis: MapAxis, bin: number): string {
  return coordinateAt(axis, ((axis.edges[bin] + axis.edges[bin + 1]) / 2) * axis.scale)
}

function couplingText({ coupling, xEdges, yEdges }: Correlation, ix: number, iy: number): string {
  const x = binAt(coupling.xEdges, (xEdges[ix] + xEdges[ix + 1]) / 2)
  const y = binAt(coupling.yEdges, (yEdges[iy] + yEdges[iy + 1]) / 2)
  const index = x === null || y === null ? -1 : x * (coupling.yEdges.length - 1) + y
  const value = coupling.values[index]
  if (value === undefined || Number.isNaN(value)) return 'too thin to judge a coupling'
  const deviation = coupling.deviations[index]
  const sign = value > 0 ? '+' : ''
  if (Number.isNaN(deviation)) return `coupling ${sign}${fixedText(value, 2)} kT`
  return `coupling ${sign}${fixedText(value, 2)} ± ${fixedText(deviation, 2)} kT`
}
