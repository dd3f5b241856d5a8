import type { AngleUnit, EnergyUnit, LengthUnit } from '../units'
import type { JointQuantity, Layout, LayoutQuantity, NumberFormat } from './layout'

export type BuiltInKey =
  | 'two-columns'
  | 'three-columns'
  | 'four-columns'
  | 'two-columns-comma'
  | 'three-columns-comma'
  | 'four-columns-comma'
  | 'json'

/** Units that the layouts of the house are made for. */
export interface LayoutUnits {
  readonly length: LengthUnit
  readonly angle: AngleUnit
  readonly energy: EnergyUnit
}

/** A layout that every group has, whatever the units. */
export interface BuiltInLayout {
  readonly key: BuiltInKey
  readonly name: string
  /** What stands in a row, for people. */
  readonly about: string
}

/** The layouts of the house, in the order they are offered; none of them belongs to an engine. */
export const BUILT_IN_LAYOUTS: readonly BuiltInLayout[] = [
  { key: 'three-columns', name: 'Three columns', about: 'coordinate, energy, force; parted by blanks' },
  { key: 'two-columns', name: 'Two columns', about: 'coordinate, energy; parted by blanks' },
  {
    key: 'four-columns',
    name: 'Four columns',
    about: 'row number, coordinate, energy, force; parted by blanks',
  },
  {
    key: 'three-columns-comma',
    name: 'Three columns, commas',
    about: 'coordinate, energy, force; parted by commas',
  },
  { key: 'two-columns-comma', name: 'Two columns, commas', about: 'coordinate, energy; parted by commas' },
  {
    key: 'four-columns-comma',
    name: 'Four columns, commas',
    about: 'row number, coordinate, energy, force; parted by commas',
  },
  { key: 'json', name: 'JSON', about: 'one object with units, conventions and rows' },
]

/** The one that is taken where nothing was chosen. */
export const DEFAULT_BUILT_IN: BuiltInKey = 'three-columns'

const COLUMNS: Readonly<Record<2 | 3 | 4, readonly LayoutQuantity[]>> = {
  2: ['coordinate', 'energy'],
  3: ['coordinate', 'energy', 'force'],
  4: ['row', 'coordinate', 'energy', 'force'],
}
const JOINT_COLUMNS: Readonly<Record<2 | 3 | 4, readonly JointQuantity[]>> = {
  2: ['x', 'y', 'energy'],
  3: ['x', 'y', 'energy', 'xForce', 'yForce'],
  4: ['row', 'x', 'y', 'energy', 'xForce', 'yForce'],
}

const HEADER = '{{#comments}}\n{{comment}} {{.}}\n{{/comments}}\n{{comment}}\n{{comment}} {{columnNames}}\n'

/** A layout of the house in the units asked for; its files of three columns are those of `formatTable`. */
export function builtInLayout(key: BuiltInKey, { length, angle, energy }: LayoutUnits): Layout {
  const isJson = key === 'json'
  const count = key.startsWith('two') ? 2 : key.startsWith('four') ? 4 : 3
  const commas = key.endsWith('-comma')
  const width = commas || isJson ? 0 : 15
  const number: NumberFormat = { style: 'shortest', digits: 7, width }
  const rows = { rows: null, low: null, high: null }
  const angular = {
    coordinateUnit: angle,
    energyUnit: energy,
    force: { energyUnit: energy, per: angle },
    ...rows,
  }
  const header = isJson ? '' : HEADER
  return {
    version: 1,
    writing: isJson ? 'json' : 'columns',
    columns: COLUMNS[count],
    rowTemplate: '',
    firstRow: 1,
    bond: { coordinateUnit: length, energyUnit: energy, force: { energyUnit: energy, per: length }, ...rows },
    angle: { ...angular, reading: 'internal' },
    dihedral: { ...angular, zero: 'cis', range: '-180..180', repeatEnd: true },
    numbers: { row: { width: width && 8 }, coordinate: number, energy: number, force: number },
    separator: commas ? 'comma' : 'spaces',
    comment: '#',
    lineEnd: 'lf',
    header,
    footer: '',
    joint: {
      columns: JOINT_COLUMNS[count],
      rowTemplate: '',
      outer: 'x',
      blankLines: !commas,
      header,
      footer: '',
    },
  }
}
