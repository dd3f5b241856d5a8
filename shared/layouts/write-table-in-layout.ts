import { type JointTable, type JointTableCommentInput, jointTableComments } from '../joint-potential'
import { type Table, type TableCommentInput, tableComments } from '../tables'
import { kindLayout, type Layout } from './layout'
import { type LayoutFields, NO_FIELDS } from './layout-fields'
import { jointLayoutWording, layoutWording } from './layout-wording'
import type { BeyondTable } from './table-curve'
import { jointLayoutRows, writeJointLayout } from './write-joint-layout'
import { layoutRows, writeLayout } from './write-layout'

/** What is known of a table whichever layout it is written in. */
export interface TableAbout {
  /** What its comment lines state; units, wording and checksum follow from the layout. */
  readonly comments: Omit<TableCommentInput, 'units' | 'rowsSha256' | 'wording'>
  /** SMILES, null where there is none. */
  readonly repeatUnit: string | null
  /** Bead types of the term. */
  readonly types: readonly string[]
  /** Number of the hand-over, null outside one. */
  readonly handOver: string | null
}

/** As `TableAbout`, for a joint table. */
export interface JointAbout {
  readonly comments: Omit<JointTableCommentInput, 'units' | 'rowsSha256' | 'wording'>
  readonly repeatUnit: string | null
  /** Bead types of both terms. */
  readonly types: readonly (readonly string[])[]
  readonly handOver: string | null
}

/** SHA-256 of a text in hexadecimal digits: the core knows no digests. */
export type Digest = (text: string) => string

/**
 * Writes a table in a layout with all that is known of it: comment lines worded for the layout, with the checksum of its rows.
 *
 * @param beyond as in `writeLayout`
 * @throws {InvalidInputError} as `writeLayout`
 */
export function writeTableInLayout(
  table: Table,
  layout: Layout,
  about: TableAbout,
  digest: Digest,
  beyond: BeyondTable | null = null,
): string {
  const { comments, types, repeatUnit, handOver } = about
  const { coordinateUnit, energyUnit } = kindLayout(layout, table.kind)
  const fields: LayoutFields = {
    ...NO_FIELDS,
    invented: comments.invented,
    polymer: comments.polymer,
    repeatUnit,
    mapping: comments.mapping,
    term: comments.term,
    types,
    beadOrder: comments.beadOrder,
    statePoint: comments.statePoint,
    input: comments.input,
    savedOn: comments.savedOn,
    handOver,
    warnings: comments.warnings,
  }
  const lines = tableComments({
    ...comments,
    units: { coordinateUnit, energyUnit },
    wording: layoutWording(layout, table.kind),
    rowsSha256: digest(layoutRows(table, layout, fields, beyond)),
  })
  return writeLayout(table, layout, { ...fields, comments: lines }, beyond)
}

/**
 * Writes a joint table in a layout with all that is known of it.
 *
 * @throws {InvalidInputError} as `writeJointLayout`
 */
export function writeJointTableInLayout(
  table: JointTable,
  layout: Layout,
  { comments, types, repeatUnit, handOver }: JointAbout,
  digest: Digest,
): string {
  const [x, y] = table.kinds
  const fields: LayoutFields = {
    ...NO_FIELDS,
    invented: comments.invented,
    polymer: comments.polymer,
    repeatUnit,
    mapping: comments.mapping,
    term: comments.terms && `${comments.terms[0]} with ${comments.terms[1]}`,
    types: types.flat(),
    beadOrder: comments.beadOrders && `${comments.beadOrders[0]}; ${comments.beadOrders[1]}`,
    statePoint: comments.statePoint,
    input: comments.input,
    handOver,
    warnings: comments.potential.warnings,
  }
  const lines = jointTableComments({
    ...comments,
    units: {
      coordinateUnits: [layout[x].coordinateUnit, layout[y].coordinateUnit],
      energyUnit: layout[x].energyUnit,
    },
    wording: jointLayoutWording(layout, table.kinds),
    rowsSha256: digest(jointLayoutRows(table, layout, fields)),
  })
  return writeJointLayout(table, layout, { ...fields, comments: lines })
}
