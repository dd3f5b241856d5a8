import { plainWords } from '../csv'
import type { Table } from '../tables'
import { energyScale, thermalEnergy } from '../units'
import { columnName, columnWidth, headLine, unitWords } from './column-names'
import { plainValue } from './format-value'
import { kindLayout, type Layout } from './layout'
import { plainNumbers } from './layout-cells'
import type { LayoutFields } from './layout-fields'
import type { LayoutValues } from './layout-values'
import { oneLine, type TemplateView } from './render-template'

/** How numbers that have no column are written. */
export const SHORT = { style: 'shortest', digits: 7, width: 0 } as const

/** Fields of the templates that do not depend on whether a table has one coordinate or two. */
export function commonView(layout: Layout, fields: LayoutFields): TemplateView {
  // A file with commas is opened in spreadsheets: no name may become a formula there.
  const parted = layout.separator === 'comma' || layout.separator === 'semicolon'
  const words = (text: string | null): string => (parted ? plainWords(oneLine(text)) : oneLine(text))
  const names = [
    'polymer',
    'repeatUnit',
    'mapping',
    'term',
    'beadOrder',
    'statePoint',
    'savedOn',
    'handOver',
  ] as const
  const types = fields.types.map(words)
  return {
    ...Object.fromEntries(names.map((name) => [name, words(fields[name])])),
    types,
    ...Object.fromEntries([1, 2, 3, 4].map((place) => [`type${place}`, types[place - 1] ?? ''])),
    inputName: words(fields.input?.name ?? null),
    inputSha256: words(fields.input?.sha256 ?? null),
    invented: fields.invented,
    comment: layout.comment,
    // Without a comment sign these lines would be read as rows.
    comments: layout.comment === '' ? [] : fields.comments.map(words),
    warnings: fields.warnings.map(({ code, message }) => ({
      code: words(code),
      message: words(message),
    })),
  }
}

/** Temperature and kT as the templates show them. */
export function thermalView(temperature: number, scale: number): TemplateView {
  return {
    temperature: plainValue(temperature, SHORT),
    kT: plainValue(thermalEnergy(temperature) * scale, SHORT),
  }
}

/** Every field that header, row and footer of a table may use, save those of a row. */
export function tableView(
  table: Table,
  layout: Layout,
  values: LayoutValues,
  fields: LayoutFields,
): TemplateView {
  const { kind, temperature } = table
  const { coordinates, energies } = values
  const last = coordinates.length - 1
  const plain = plainNumbers(layout)
  const words = unitWords(layout, kind)
  const lowest = energies.reduce((best, energy, row) => (energy < energies[best] ? row : best), 0)
  return {
    ...commonView(layout, fields),
    ...thermalView(temperature, energyScale(kindLayout(layout, kind).energyUnit, temperature)),
    kind,
    bond: kind === 'bond',
    angle: kind === 'angle',
    dihedral: kind === 'dihedral',
    rows: String(coordinates.length),
    intervals: String(last),
    low: plain.coordinate(coordinates[0]),
    high: plain.coordinate(coordinates[last]),
    step: plainValue((coordinates[last] - coordinates[0]) / last, SHORT),
    lowestAt: plain.coordinate(coordinates[lowest]),
    lowestEnergy: plain.energy(energies[lowest]),
    highestEnergy: plain.energy(energies.reduce((most, energy) => Math.max(most, energy), -Infinity)),
    coordinateUnit: words.coordinate,
    energyUnit: words.energy,
    forceUnit: words.force,
    columnNames: headLine(
      layout,
      layout.columns.map((quantity) => ({
        name: columnName(layout, kind, quantity),
        width: columnWidth(layout, quantity),
      })),
    ),
  }
}
