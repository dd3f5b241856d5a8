import type { Table } from '../tables'
import { separatorOf } from './column-names'
import type { Layout } from './layout'
import { layoutCells } from './layout-cells'
import type { LayoutFields } from './layout-fields'
import { layoutJson } from './layout-json'
import { type LayoutValues, layoutValues } from './layout-values'
import { tableView } from './layout-view'
import { closedText, renderTemplate, type TemplateView, withLineEnds } from './render-template'
import type { BeyondTable } from './table-curve'

/**
 * Writes a table in a layout. The rows stand at the table's own coordinates where the layout asks for no others, and are then its
 * numbers; elsewhere they are read from the curve through its rows (`tableCurve`, which says how close it is). The same
 * arguments give the same text.
 *
 * @param table equally spaced, internal units, full precision
 * @param layout checked by `checkLayout`
 * @param fields what the texts may say; `comments` are best worded for the layout (`layoutWording`)
 * @param beyond what holds outside the table, for limits of the layout that reach further; without it they are refused
 * @returns the file, every line closed by the line end of the layout
 * @throws {InvalidInputError} LAYOUT_BEYOND_TABLE, LAYOUT_INVALID with the field; TEMPERATURE_INVALID for kT of no valid temperature
 */
export function writeLayout(
  table: Table,
  layout: Layout,
  fields: LayoutFields,
  beyond: BeyondTable | null = null,
): string {
  const values = layoutValues(table, layout, beyond)
  const view = tableView(table, layout, values, fields)
  if (layout.writing === 'json')
    return withLineEnds(layoutJson(table, layout, values, fields), layout.lineEnd)
  const text = [
    closedText(renderTemplate(layout.header, view)),
    rowsText(layout, values, view),
    closedText(renderTemplate(layout.footer, view)),
  ]
  return withLineEnds(text.join(''), layout.lineEnd)
}

/**
 * The rows of a table in a layout, without header and footer: what the checksum of a file is taken over. Of JSON the rows alone,
 * one per line.
 *
 * @throws {InvalidInputError} as `writeLayout`
 */
export function layoutRows(
  table: Table,
  layout: Layout,
  fields: LayoutFields,
  beyond: BeyondTable | null = null,
): string {
  const values = layoutValues(table, layout, beyond)
  return withLineEnds(rowsText(layout, values, tableView(table, layout, values, fields)), layout.lineEnd)
}

function rowsText(layout: Layout, values: LayoutValues, view: TemplateView): string {
  const cells = layoutCells(layout, values)
  if (layout.writing !== 'template') {
    const separator = separatorOf(layout)
    const columns = layout.columns.map((quantity) => cells[quantity])
    return cells.row.map((_, row) => `${columns.map((column) => column[row]).join(separator)}\n`).join('')
  }
  const last = cells.row.length - 1
  return cells.row
    .map((number, row) =>
      closedText(
        renderTemplate(layout.rowTemplate, {
          ...view,
          row: number,
          coordinate: cells.coordinate[row],
          energy: cells.energy[row],
          force: cells.force[row],
          derivative: cells.derivative[row],
          first: row === 0,
          last: row === last,
        }),
      ),
    )
    .join('')
}
