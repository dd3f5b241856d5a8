/** Codes of input that the core refuses. Stable: tests, the API and the command line compare codes, never messages. */
export type InvalidInputCode =
  // numbers and bins
  | 'EDGES_NOT_ASCENDING'
  | 'EDGE_NEGATIVE'
  | 'EDGE_OUT_OF_RANGE'
  | 'LENGTH_MISMATCH'
  | 'COUNT_INVALID'
  | 'TEMPERATURE_INVALID'
  | 'SETTING_INVALID'
  | 'SINGULAR_SYSTEM'
  // files
  | 'FILE_EMPTY'
  | 'FILE_TOO_LARGE'
  | 'TEXT_NOT_A_NUMBER'
  | 'NUMBER_NOT_FINITE'
  | 'DECIMAL_COMMA'
  | 'COLUMN_MISSING'
  | 'COLUMNS_UNEQUAL'
  | 'COUNT_NEGATIVE'
  | 'BINS_NOT_ASCENDING'
  | 'BINS_OVERLAP'
  | 'BINS_GAP'
  | 'BIN_WIDTH_UNKNOWN'
  | 'BOND_NOT_POSITIVE'
  | 'ANGLE_OUT_OF_RANGE'
  | 'DIHEDRAL_OUT_OF_RANGE'
  | 'TOO_FEW_BINS'
  | 'TOO_MANY_BINS'
  | 'TOO_FEW_SAMPLES'
  | 'SAMPLE_SIZE_UNKNOWN'
  | 'TOO_FEW_BLOCKS'
  | 'BLOCKS_DIFFER'
  | 'GRID_INCOMPLETE'
  // chemistry and mapping
  | 'SMILES_UNPARSABLE'
  | 'ATTACHMENT_COUNT'
  | 'FRAGMENTS'
  | 'ATTACHMENT_BONDS'
  | 'TOO_MANY_ATOMS'
  | 'ELEMENT_UNKNOWN'
  | 'VALENCE_EXCEEDED'
  | 'MAPPING_INVALID'
  // layouts
  | 'LAYOUT_INVALID'
  | 'LAYOUT_BEYOND_TABLE'
  | 'TEMPLATE_INVALID'
  | 'TEMPLATE_FIELD_UNKNOWN'

/** Where in the input something is wrong; each part only where it is known. Line and column count from 1. */
export interface InputPlace {
  readonly line?: number
  readonly column?: number
  readonly field?: string
  /** Position in a one-line text such as a SMILES, from 0. */
  readonly position?: number
  readonly index?: number
}

/** Input that the core refuses: a stable code, a sentence for a person that says what to do, and where it happened. */
export class InvalidInputError extends Error {
  override readonly name = 'InvalidInputError'

  constructor(
    readonly code: InvalidInputCode,
    message: string,
    readonly place: InputPlace = {},
  ) {
    super(message)
  }
}
