import type { JointTable } from '../joint-potential'
import { unitWords } from './column-names'
import { plainValue } from './format-value'
import { jointCells, jointFormat, jointValue } from './joint-cells'
import type { JointLayoutValues } from './joint-values'
import type { Layout } from './layout'
import type { LayoutFields } from './layout-fields'
import { jsonWithRows, TABLE_JSON_VERSION } from './layout-json'

/** What the JSON of a joint table calls itself. */
export const JOINT_JSON_FORMAT = 'beadwright joint table'

/** A joint table as one JSON object: what it is, its units and conventions, and its rows, one per line. */
export function jointJson(
  table: JointTable,
  layout: Layout,
  values: JointLayoutValues,
  fields: LayoutFields,
): string {
  const { comments, types, warnings, ...about } = fields
  const words = table.kinds.map((kind) => unitWords(layout, kind))
  const head = {
    format: JOINT_JSON_FORMAT,
    version: TABLE_JSON_VERSION,
    kinds: table.kinds,
    temperature: table.temperature,
    ...about,
    types,
    units: {
      x: words[0].coordinate,
      y: words[1].coordinate,
      energy: words[0].energy,
      xForce: words[0].force,
      yForce: words[1].force,
    },
    ...(table.kinds.includes('angle') ? { angle: layout.angle.reading } : {}),
    ...(table.kinds.includes('dihedral') ? { zero: layout.dihedral.zero, range: layout.dihedral.range } : {}),
    comments,
    warnings: warnings.map(({ code, message }) => ({ code, message })),
    columns: layout.joint.columns,
  }
  const rows: string[] = []
  for (const cell of jointCells(values, layout.joint.outer)) {
    const cells = layout.joint.columns.map((quantity) =>
      quantity === 'row'
        ? String(rows.length + layout.firstRow)
        : plainValue(jointValue(values, quantity, cell), jointFormat(layout, quantity)),
    )
    rows.push(`[${cells.join(', ')}]`)
  }
  return jsonWithRows(head, rows)
}
