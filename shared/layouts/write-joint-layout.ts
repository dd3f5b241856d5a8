import type { JointTable } from '../joint-potential'
import { separatorOf } from './column-names'
import { formatValue } from './format-value'
import { JOINT_QUANTITIES, jointCells, jointFormat, jointValue } from './joint-cells'
import { jointJson } from './joint-json'
import { type JointLayoutValues, jointLayoutValues } from './joint-values'
import { jointView } from './joint-view'
import type { JointQuantity, Layout } from './layout'
import type { LayoutFields } from './layout-fields'
import { closedText, renderTemplate, type TemplateView, withLineEnds } from './render-template'

/**
 * Writes a joint table in a layout: the units, readings and number formats of its two kinds, the columns and texts of
 * `layout.joint`. Its rows stand at the table's own places; the energy column is in the energy unit of the first kind.
 *
 * @param layout checked by `checkLayout`
 * @returns the file, every line closed by the line end of the layout
 * @throws {InvalidInputError} as `jointLayoutValues`
 */
export function writeJointLayout(table: JointTable, layout: Layout, fields: LayoutFields): string {
  const values = jointLayoutValues(table, layout)
  if (layout.writing === 'json') return withLineEnds(jointJson(table, layout, values, fields), layout.lineEnd)
  const view = jointView(table, layout, values, fields)
  const text = [
    closedText(renderTemplate(layout.joint.header, view)),
    rowsText(layout, values, view),
    closedText(renderTemplate(layout.joint.footer, view)),
  ]
  return withLineEnds(text.join(''), layout.lineEnd)
}

/** The rows of a joint table in a layout, without header and footer: what the checksum of a file is taken over. */
export function jointLayoutRows(table: JointTable, layout: Layout, fields: LayoutFields): string {
  const values = jointLayoutValues(table, layout)
  return withLineEnds(rowsText(layout, values, jointView(table, layout, values, fields)), layout.lineEnd)
}

function rowsText(layout: Layout, values: JointLayoutValues, view: TemplateView): string {
  const { writing, joint, firstRow, numbers } = layout
  const separator = separatorOf(layout)
  const lines: string[] = []
  for (const cell of jointCells(values, joint.outer)) {
    const { blockEnd, last } = cell
    const number = lines.length + firstRow
    const cells = (quantity: JointQuantity): string => {
      if (quantity === 'row') return String(number).padStart(numbers.row.width)
      return formatValue(jointValue(values, quantity, cell), jointFormat(layout, quantity))
    }
    const text =
      writing === 'template'
        ? closedText(
            renderTemplate(joint.rowTemplate, {
              ...view,
              ...Object.fromEntries(JOINT_QUANTITIES.map((quantity) => [quantity, cells(quantity)])),
              first: number === firstRow,
              last,
              blockEnd,
            }),
          )
        : `${joint.columns.map(cells).join(separator)}\n`
    lines.push(blockEnd && !last && joint.blankLines ? `${text}\n` : text)
  }
  return lines.join('')
}
