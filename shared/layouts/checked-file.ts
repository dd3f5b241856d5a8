import type { Table } from '../tables'
import type { Layout } from './layout'
import type { LayoutCells } from './layout-cells'
import type { LayoutValues } from './layout-values'
import type { PrintedNumbers } from './printed-numbers'

/** What the checks look at. */
export interface CheckedFile {
  readonly table: Table
  readonly layout: Layout
  readonly values: LayoutValues
  readonly cells: LayoutCells
  readonly printed: PrintedNumbers
}
