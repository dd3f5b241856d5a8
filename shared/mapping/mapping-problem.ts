export type MappingProblemCode =
  | 'ATOM_IN_NO_BEAD'
  | 'ATOM_SHARES'
  | 'ATOM_UNKNOWN'
  | 'BEAD_EMPTY'
  | 'BEAD_IN_PIECES'
  | 'BEAD_NAME_TWICE'
  | 'RING_CUT'
  | 'SITE_OUTSIDE'
  | 'TERMS_TOO_MANY'
  | 'TYPE_COMPOSITION'

/**
 * Something about a mapping that a person should see. A problem makes its numbers wrong; a note may be meant. `title` says what,
 * `detail` why it matters, with the number.
 */
export interface MappingProblem {
  readonly code: MappingProblemCode
  readonly severity: 'problem' | 'note'
  readonly title: string
  readonly detail: string
  /** Ids of the beads it is about. */
  readonly beads: readonly string[]
  /** Indices of the atoms it is about. */
  readonly atoms: readonly number[]
}
