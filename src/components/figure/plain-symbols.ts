import type { CoordinateKind } from '@shared/units'

/** Symbols of the coordinates in plain letters, as every spreadsheet and script reads them. */
export const PLAIN_SYMBOLS: Readonly<Record<CoordinateKind, string>> = {
  bond: 'r',
  angle: 'theta',
  dihedral: 'phi',
}
