import type { RepeatUnit } from '../chemistry'
import type { VerdictNumbers } from '../contracts/distribution'
import type { FrozenHandOver } from '../contracts/hand-over'
import type { DerivedPotential } from '../forms'
import type { JointHistogram } from '../histogram'
import type { JointPotential } from '../joint-potential'
import type { CoordinateKind } from '../units'

/** A warning of a table, and who keeps it for what reason. */
export interface SourceWarning {
  readonly message: string
  readonly answer: { readonly reason: string; readonly by: string | null; readonly at: string } | null
}

/** A table of a hand-over with its file and the evidence it rests on; internal units. */
export interface SourceTable {
  /** As in B–E–H; of a joint table both names, parted by a middle dot. */
  readonly name: string
  readonly kinds: readonly CoordinateKind[]
  /** Bead types of the one or two terms. */
  readonly types: readonly (readonly string[])[]
  readonly path: string
  readonly text: string
  readonly size: number
  readonly sha256: string
  readonly coordinates: ArrayLike<number>
  readonly secondCoordinates: ArrayLike<number> | null
  /** kJ/mol, row-major. */
  readonly energies: ArrayLike<number>
  readonly lowestAt: readonly number[]
  readonly silhouette: readonly number[]
  readonly basins: number | null
  readonly input: { readonly name: string; readonly sha256: string }
  readonly warnings: readonly SourceWarning[]
  /** How a single term was inverted; null for a joint table. */
  readonly single: DerivedPotential | null
  readonly joint: { readonly histogram: JointHistogram; readonly potential: JointPotential } | null
}

/** Two terms whose joint distribution was looked at. */
export interface SourcePair {
  readonly name: string
  readonly numbers: VerdictNumbers
  readonly decision: {
    readonly choice: 'separate' | 'joint' | 'change mapping'
    readonly reason: string
    readonly by: string | null
    readonly at: string
  } | null
  /** Why its tables go out one by one although a joint one was decided for; null otherwise. */
  readonly apart: string | null
}

/** Everything that a data sheet is made from. */
export interface SheetSource {
  readonly frozen: FrozenHandOver
  readonly unit: RepeatUnit
  /** The mapping as an SVG document. */
  readonly drawing: string
  readonly tables: readonly SourceTable[]
  readonly pairs: readonly SourcePair[]
  readonly tablesSha256: string
}
