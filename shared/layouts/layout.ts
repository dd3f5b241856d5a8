import type { AngleUnit, CoordinateKind, CoordinateUnit, EnergyUnit, LengthUnit } from '../units'

/** What a column of a table may hold. A force is −dU/dq, a derivative dU/dq. */
export type LayoutQuantity = 'row' | 'coordinate' | 'energy' | 'force' | 'derivative'

/** What a column of a joint table may hold. */
export type JointQuantity = 'row' | 'x' | 'y' | 'energy' | 'xForce' | 'yForce' | 'xDerivative' | 'yDerivative'

/** How numbers of a column are written, always with a point as decimal sign. */
export interface NumberFormat {
  /**
   * shortest: at most `digits` significant digits, no trailing zeros; fixed: `digits` after the point; scientific: `digits` after
   * the point and an exponent of at least two digits with its sign.
   */
  readonly style: 'shortest' | 'fixed' | 'scientific'
  readonly digits: number
  /** Least number of characters; shorter numbers stand at its right. */
  readonly width: number
}

/** Units, rows and domain of the tables of one kind. */
export interface KindLayout<Unit extends CoordinateUnit> {
  readonly coordinateUnit: Unit
  readonly energyUnit: EnergyUnit
  /** Unit of the force and of the derivative: an energy per a length or an angle, whatever the other columns are in. */
  readonly force: { readonly energyUnit: EnergyUnit; readonly per: Unit }
  /** Rows written; null keeps the spacing of the table. */
  readonly rows: number | null
  /** First and last coordinate as written, in `coordinateUnit`; null takes the table's. */
  readonly low: number | null
  readonly high: number | null
}

export type BondLayout = KindLayout<LengthUnit>

export interface AngleLayout extends KindLayout<AngleUnit> {
  /** The internal angle at the middle bead, 180° when straight; or 180° less it, 0 when straight. */
  readonly reading: 'internal' | 'supplement'
}

export interface DihedralLayout extends KindLayout<AngleUnit> {
  /** Which form of the chain 0 stands for. The sense of rotation stays that of IUPAC. */
  readonly zero: 'cis' | 'trans'
  readonly range: '-180..180' | '0..360'
  /** A turn ends with the row that it began with. */
  readonly repeatEnd: boolean
}

/** How joint tables are written; units, readings and formats are those of the kinds. */
export interface JointLayout {
  readonly columns: readonly JointQuantity[]
  readonly rowTemplate: string
  /** The coordinate that stays the same within a block of rows. */
  readonly outer: 'x' | 'y'
  /** An empty line between blocks. */
  readonly blankLines: boolean
  readonly header: string
  readonly footer: string
}

/** How a table is written, as plain data (document version 1). */
export interface Layout {
  readonly version: 1
  /** Columns parted by the separator; rows by a template; or one JSON object without header and footer. */
  readonly writing: 'columns' | 'template' | 'json'
  /** Left to right, each at most once. */
  readonly columns: readonly LayoutQuantity[]
  /** One row, where `writing` is template. */
  readonly rowTemplate: string
  readonly firstRow: 0 | 1
  readonly bond: BondLayout
  readonly angle: AngleLayout
  readonly dihedral: DihedralLayout
  readonly numbers: {
    readonly row: { readonly width: number }
    readonly coordinate: NumberFormat
    readonly energy: NumberFormat
    /** Of the derivative as well. */
    readonly force: NumberFormat
  }
  readonly separator: 'spaces' | 'tab' | 'comma' | 'semicolon'
  /** What begins a comment line; empty where comments cannot be written. */
  readonly comment: string
  readonly lineEnd: 'lf' | 'crlf'
  /** Templates of the text before and after the rows. */
  readonly header: string
  readonly footer: string
  readonly joint: JointLayout
}

/** Units, rows and domain that a layout has for a kind. */
export function kindLayout(layout: Layout, kind: CoordinateKind): KindLayout<CoordinateUnit> {
  return layout[kind]
}

/** Ranges that forms, contracts and the core all read; ends included. */
export const LAYOUT_LIMITS = {
  /** Significant digits, or digits after the point: more than 17 no double number has. */
  digits: { low: 0, high: 17 },
  width: { low: 0, high: 40 },
  rows: { low: 2, high: 100_000 },
  commentLength: 8,
  templateLength: 20_000,
  rowTemplateLength: 2_000,
} as const
