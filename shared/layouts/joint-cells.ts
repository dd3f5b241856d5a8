import type { JointTable } from '../joint-potential'
import { unitWords } from './column-names'
import type { JointQuantity, Layout, NumberFormat } from './layout'
import type { JointLayoutValues } from './joint-values'

/** Every quantity of a joint table. */
export const JOINT_QUANTITIES: readonly JointQuantity[] = [
  'row',
  'x',
  'y',
  'energy',
  'xForce',
  'yForce',
  'xDerivative',
  'yDerivative',
]

/** How numbers of a quantity are written. */
export function jointFormat({ numbers }: Layout, quantity: JointQuantity): NumberFormat {
  return quantity === 'x' || quantity === 'y'
    ? numbers.coordinate
    : quantity === 'energy'
      ? numbers.energy
      : numbers.force
}

/** The number of a quantity at a cell. */
export function jointValue(
  { axes, energies, xForces, yForces }: JointLayoutValues,
  quantity: JointQuantity,
  { ix, iy, cell }: JointCell,
): number {
  if (quantity === 'x') return axes[0].written[ix]
  if (quantity === 'y') return axes[1].written[iy]
  if (quantity === 'energy') return energies[cell]
  const forces = quantity.startsWith('x') ? xForces : yForces
  return quantity.endsWith('Force') ? forces[cell] : -forces[cell]
}

/** A cell in the order of writing. */
export interface JointCell {
  readonly ix: number
  readonly iy: number
  /** ix · ny + iy */
  readonly cell: number
  /** The outer coordinate changes next. */
  readonly blockEnd: boolean
  readonly last: boolean
}

/** Cells in the order in which they are written. */
export function* jointCells({ axes: [x, y] }: JointLayoutValues, outer: 'x' | 'y'): Generator<JointCell> {
  const [nx, ny] = [x.written.length, y.written.length]
  const [outside, inside] = outer === 'x' ? [nx, ny] : [ny, nx]
  for (let slow = 0; slow < outside; slow++) {
    for (let fast = 0; fast < inside; fast++) {
      const [ix, iy] = outer === 'x' ? [slow, fast] : [fast, slow]
      yield {
        ix,
        iy,
        cell: ix * ny + iy,
        blockEnd: fast === inside - 1,
        last: slow === outside - 1 && fast === inside - 1,
      }
    }
  }
}

/** Name and unit of a column, as in 'xforce[kJ/mol/nm]'. */
export function jointColumnName(layout: Layout, { kinds }: JointTable, quantity: JointQuantity): string {
  if (quantity === 'row') return 'row'
  if (quantity === 'energy') return `energy[${unitWords(layout, kinds[0]).energy}]`
  const { coordinate, force } = unitWords(layout, kinds[quantity.startsWith('x') ? 0 : 1])
  if (quantity === 'x' || quantity === 'y') return `${quantity}[${coordinate}]`
  return `${quantity.toLowerCase()}[${force}]`
}
