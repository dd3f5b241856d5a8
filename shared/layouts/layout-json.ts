import type { Table } from '../tables'
import { unitWords } from './column-names'
import type { Layout } from './layout'
import { plainNumbers } from './layout-cells'
import type { LayoutFields } from './layout-fields'
import type { LayoutValues } from './layout-values'

/** What the JSON of a table calls itself. */
export const TABLE_JSON_FORMAT = 'beadwright table'
/** Raised when what it holds changes its meaning. */
export const TABLE_JSON_VERSION = 1

/** A table as one JSON object: what it is, its units and conventions, and its rows, one per line. */
export function layoutJson(
  { kind, temperature }: Table,
  layout: Layout,
  values: LayoutValues,
  fields: LayoutFields,
): string {
  const { comments, types, warnings, ...about } = fields
  const head = {
    format: TABLE_JSON_FORMAT,
    version: TABLE_JSON_VERSION,
    kind,
    temperature,
    ...about,
    types,
    units: unitWords(layout, kind),
    ...(kind === 'angle' ? { angle: layout.angle.reading } : {}),
    ...(kind === 'dihedral' ? { zero: layout.dihedral.zero, range: layout.dihedral.range } : {}),
    comments,
    warnings: warnings.map(({ code, message }) => ({ code, message })),
    columns: layout.columns,
  }
  return jsonWithRows(head, jsonRows(layout, values))
}

/** An object with its rows as the last member, one per line. */
export function jsonWithRows(head: object, rows: readonly string[]): string {
  const members = JSON.stringify(head, null, 2).replace(/\n}$/, '')
  return `${members},\n  "rows": [\n${rows.map((row) => `    ${row}`).join(',\n')}\n  ]\n}\n`
}

function jsonRows(layout: Layout, { coordinates, energies, forces }: LayoutValues): string[] {
  const plain = plainNumbers(layout)
  return Array.from(coordinates, (coordinate, row) => {
    const cells = layout.columns.map((quantity) => {
      if (quantity === 'row') return String(row + layout.firstRow)
      if (quantity === 'coordinate') return plain.coordinate(coordinate)
      if (quantity === 'energy') return plain.energy(energies[row])
      return plain.force(quantity === 'force' ? forces[row] : -forces[row])
    })
    return `[${cells.join(', ')}]`
  })
}
