/** What the texts of a layout may say about a table beside its numbers; null where there is nothing to say. */
export interface LayoutFields {
  /** True when the data are made up, as in the demo. */
  readonly invented: boolean
  readonly polymer: string | null
  /** SMILES */
  readonly repeatUnit: string | null
  readonly mapping: string | null
  /** Name of the term, e.g. 'B–E–H'; of a joint table both, x first. */
  readonly term: string | null
  /** Bead types of the term in the order the coordinate is measured; of a joint table those of x and then those of y. */
  readonly types: readonly string[]
  /** Beads in the order the coordinate is measured, e.g. 'B(0) E(0) H(0)'. */
  readonly beadOrder: string | null
  /** Anything beside the temperature that names the state point. */
  readonly statePoint: string | null
  /** Name and SHA-256 of the file the distribution came from. */
  readonly input: { readonly name: string; readonly sha256: string } | null
  /** When the inversion was saved, e.g. '2025-03-14'. */
  readonly savedOn: string | null
  /** Number of the hand-over the table belongs to. */
  readonly handOver: string | null
  readonly warnings: readonly { readonly code: string; readonly message: string }[]
  /** Lines that state what the table is, without a comment sign: `tableComments` with the wording of `layoutWording`. */
  readonly comments: readonly string[]
}

/** A table that nothing is known about but its numbers. */
export const NO_FIELDS: LayoutFields = {
  invented: false,
  polymer: null,
  repeatUnit: null,
  mapping: null,
  term: null,
  types: [],
  beadOrder: null,
  statePoint: null,
  input: null,
  savedOn: null,
  handOver: null,
  warnings: [],
  comments: [],
}
