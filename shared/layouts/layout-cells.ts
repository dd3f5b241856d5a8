import { formatValue, plainValue } from './format-value'
import type { Layout, LayoutQuantity } from './layout'
import type { LayoutValues } from './layout-values'

/** Cells of a table as text, by quantity; padded to the width of their column. */
export type LayoutCells = Readonly<Record<LayoutQuantity, readonly string[]>>

/** Writes the numbers of a table in the formats of a layout. */
export function layoutCells(layout: Layout, { coordinates, energies, forces }: LayoutValues): LayoutCells {
  const { numbers, firstRow } = layout
  const width = numbers.row.width
  return {
    row: Array.from(coordinates, (_, row) => String(row + firstRow).padStart(width)),
    coordinate: Array.from(coordinates, (value) => formatValue(value, numbers.coordinate)),
    energy: Array.from(energies, (value) => formatValue(value, numbers.energy)),
    force: Array.from(forces, (value) => formatValue(value, numbers.force)),
    derivative: Array.from(forces, (value) => formatValue(-value, numbers.force)),
  }
}

/** Number formats without widths, for texts and JSON. */
export function plainNumbers({ numbers }: Layout) {
  return {
    coordinate: (value: number) => plainValue(value, numbers.coordinate),
    energy: (value: number) => plainValue(value, numbers.energy),
    force: (value: number) => plainValue(value, numbers.force),
  }
}
