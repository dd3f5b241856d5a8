import { type CoordinateKind, unitWord } from '../units'
import { kindLayout, type Layout, type LayoutQuantity } from './layout'

/** Units of a kind in the letters of a text file. */
export interface UnitWords {
  readonly coordinate: string
  readonly energy: string
  /** As in 'kJ/mol/deg'. */
  readonly force: string
}

/** Units that a layout has for a kind, as in `{ coordinate: 'deg', energy: 'kJ/mol', force: 'kJ/mol/deg' }`. */
export function unitWords(layout: Layout, kind: CoordinateKind): UnitWords {
  const { coordinateUnit, energyUnit, force } = kindLayout(layout, kind)
  return {
    coordinate: unitWord(coordinateUnit),
    energy: unitWord(energyUnit),
    force: `${unitWord(force.energyUnit)}/${unitWord(force.per)}`,
  }
}

/** Width that the cells of a column have at least. */
export function columnWidth(layout: Layout, quantity: LayoutQuantity): number {
  const { numbers } = layout
  return numbers[quantity === 'derivative' ? 'force' : quantity].width
}

/** Name and unit of a column, as in 'energy[kJ/mol]'. */
export function columnName(layout: Layout, kind: CoordinateKind, quantity: LayoutQuantity): string {
  if (quantity === 'row') return 'row'
  const words = unitWords(layout, kind)
  return `${quantity}[${words[quantity === 'derivative' ? 'force' : quantity]}]`
}

/**
 * Cells of one line above the rows, as wide as the columns; the first one leaves room for the comment sign and a blank, which
 * stand before it.
 *
 * @param cells names with the width of their column
 */
export function headLine(
  layout: Layout,
  cells: readonly { readonly name: string; readonly width: number }[],
): string {
  const room = layout.comment === '' ? 0 : layout.comment.length + 1
  return cells
    .map(({ name, width }, column) => name.padStart(width - (column === 0 ? room : 0)))
    .join(separatorOf(layout))
}

/** What stands between two cells. */
export function separatorOf({ separator }: Layout): string {
  return { spaces: ' ', tab: '\t', comma: ',', semicolon: ';' }[separator]
}
