import type { MapFigure } from '../contracts/data-sheet'
import type { HandOverLayout } from '../contracts/hand-over'
import type { JointHistogram } from '../histogram'
import { coordinateFromInternal, thermalEnergy, unitSymbol } from '../units'
import { coordinateUnitOf } from './curve-figure'
import { figureNumber } from './figure-number'
import type { SourceTable } from './sheet-source'

const CELLS = { columns: 36, rows: 36 } as const
/** Energies above this are not shown, in kT. */
export const MAP_LIMIT = 8

/** What the figure of a joint table draws: where the pairs were measured, and the energies of the table. */
export function mapFigure(
  table: SourceTable & { readonly joint: NonNullable<SourceTable['joint']> },
  units: Pick<HandOverLayout, 'length' | 'angle' | 'energy'>,
): MapFigure {
  const { histogram, potential } = table.joint
  const [first, second] = table.kinds
  const [x, y] = [0, 1].map((axis) => shownRange(table, axis as 0 | 1))
  const unitNames = [coordinateUnitOf(first, units), coordinateUnitOf(second, units)] as const
  const span = ([low, high]: readonly number[], axis: 0 | 1): [number, number] => [
    figureNumber(coordinateFromInternal(low, unitNames[axis])),
    figureNumber(coordinateFromInternal(high, unitNames[axis])),
  ]
  const centre = ([low, high]: readonly number[], cell: number, cells: number): number =>
    low + ((high - low) * (cell + 0.5)) / cells
  const kT = thermalEnergy(potential.temperature)
  const cells = Array.from({ length: CELLS.columns * CELLS.rows }, (_, cell) => ({
    x: centre(x, Math.floor(cell / CELLS.rows), CELLS.columns),
    y: centre(y, cell % CELLS.rows, CELLS.rows),
  }))
  const measured = cells.map((cell) => densityAt(histogram, cell.x, cell.y))
  const most = Math.max(...measured)
  const [nameX, nameY] = table.name.split(' · ')
  return {
    kinds: [first, second],
    names: [nameX, nameY],
    coordinateUnits: [unitSymbol(unitNames[0]), unitSymbol(unitNames[1])],
    x: span(x, 0),
    y: span(y, 1),
    ...CELLS,
    measured: measured.map((density) => Math.round((1000 * density) / most) / 1000),
    energies: cells.map((cell) =>
      Math.min(MAP_LIMIT, Math.round((100 * energyAt(table, cell.x, cell.y)) / kT) / 100),
    ),
  }
}

/** The part of an axis of the table along which some energy is within the limit. */
function shownRange({ coordinates, secondCoordinates, energies, joint }: SourceTable, axis: 0 | 1): number[] {
  const limit = MAP_LIMIT * thermalEnergy(joint!.potential.temperature)
  const along = axis === 0 ? coordinates : secondCoordinates!
  const columns = secondCoordinates!.length
  let [low, high] = [along.length - 1, 0]
  for (let cell = 0; cell < energies.length; cell++) {
    if (energies[cell] > limit) continue
    const at = axis === 0 ? Math.floor(cell / columns) : cell % columns
    low = Math.min(low, at)
    high = Math.max(high, at)
  }
  return [along[low], along[Math.max(high, low + 1)]]
}

/** Energy of the row of the table that is nearest, kJ/mol. */
function energyAt({ coordinates, secondCoordinates, energies }: SourceTable, x: number, y: number): number {
  const [row, column] = [nearest(coordinates, x), nearest(secondCoordinates!, y)]
  return energies[row * secondCoordinates!.length + column]
}

function nearest(axis: ArrayLike<number>, at: number): number {
  const last = axis.length - 1
  const row = Math.round(((at - axis[0]) / (axis[last] - axis[0])) * last)
  return Math.min(last, Math.max(0, row))
}

/** Measured probability per area at a place; 0 outside the bins. */
function densityAt({ xEdges, yEdges, weights }: JointHistogram, x: number, y: number): number {
  const [column, row] = [binAt(xEdges, x), binAt(yEdges, y)]
  if (column < 0 || row < 0) return 0
  const area = (xEdges[column + 1] - xEdges[column]) * (yEdges[row + 1] - yEdges[row])
  return weights[column * (yEdges.length - 1) + row] / area
}

function binAt(edges: Float64Array, at: number): number {
  if (at < edges[0] || at > edges[edges.length - 1]) return -1
  const next = edges.findIndex((edge) => edge > at)
  return next < 0 ? edges.length - 2 : next - 1
}
