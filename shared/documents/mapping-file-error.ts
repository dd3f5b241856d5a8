import type { InvalidInputCode } from '../errors'

export type MappingFileErrorCode =
  /** Not JSON at all. */
  | 'FILE_NOT_JSON'
  /** JSON, but of something else. */
  | 'FILE_FORMAT_UNKNOWN'
  | 'FILE_VERSION_UNKNOWN'
  | 'FIELD_MISSING'
  | 'FIELD_UNKNOWN'
  | 'FIELD_INVALID'
  /** An index beyond the SMILES. */
  | 'ATOM_UNKNOWN'
  /** An index that names a `*`. */
  | 'ATOM_IS_ATTACHMENT'
  /** One bead names the same atom of the same unit twice. */
  | 'ATOM_TWICE'
  /** A bead name or place that the file does not have. */
  | 'PLACE_UNKNOWN'
  /** The file is for another chain. */
  | 'CHAIN_DIFFERS'
  /** Written for the other SMILES, a bead would reach over more than the neighbouring units. */
  | 'BEAD_TOO_LONG'
  /** Whatever is wrong with the SMILES. */
  | InvalidInputCode

/** Something wrong with a mapping file. */
export interface MappingFileError {
  readonly code: MappingFileErrorCode
  readonly message: string
  /** Where in the file, such as `beads[2].atoms[0].atom`; empty for the file as a whole. */
  readonly path: string
}

/**
 * A path in a JSON file as people write it.
 *
 * @example filePath(['beads', 2, 'name']) // 'beads[2].name'
 */
export function filePath(keys: readonly PropertyKey[]): string {
  return keys
    .map((key) => (typeof key === 'number' ? `[${key}]` : `.${String(key)}`))
    .join('')
    .replace(/^\./, '')
}
