import type { Table } from '../tables'

/** Energy in kJ/mol and force −dU/dq in kJ/mol per nm or rad at one coordinate. */
export interface CurvePoint {
  readonly energy: number
  readonly force: number
}

/** What the potential of a table says outside it; `tablePoint` of the potential the table was made from. */
export type BeyondTable = (coordinate: number) => CurvePoint

/** Part of a step within which a coordinate counts as that of a row: conversions of units are no better than 1e-13 of it. */
const ON_ROW = 1e-9

/** A curve that can be read anywhere in [low, high], nm or rad. */
export interface TableCurve {
  readonly low: number
  readonly high: number
  /** Distance between rows. */
  readonly step: number
  /** True for a dihedral over a whole turn, which can be read in any turn. */
  readonly periodic: boolean
  /** Whether there are rows on both sides of a coordinate, or one at it; a dihedral may lie in any turn. */
  readonly covers: (coordinate: number) => boolean
  readonly at: (coordinate: number) => CurvePoint
}

/**
 * The curve through the rows of a table: at a row the row itself, between two rows the cubic that has both energies and both
 * forces (Hermite). Its energy is off by at most h⁴/384 max|U⁗|, its force by h³ √3/216 max|U⁗| (de Boor 1978), which is less
 * than a millionth of kT at a thousand rows; where the potential itself is one cubic between the rows it is exact.
 *
 * @param table equally spaced, at least 2 rows
 */
export function tableCurve({ kind, coordinates, energies, forces }: Table): TableCurve {
  const last = coordinates.length - 1
  const [low, high] = [coordinates[0], coordinates[last]]
  const step = (high - low) / last
  const periodic = kind === 'dihedral' && high - low > 2 * Math.PI - ON_ROW * step
  const at = (coordinate: number): CurvePoint => {
    const position = (folded(coordinate) - low) / step
    const nearest = Math.round(position)
    if (Math.abs(position - nearest) < ON_ROW) return { energy: energies[nearest], force: forces[nearest] }
    const row = Math.min(Math.max(Math.floor(position), 0), last - 1)
    return hermite(position - row, step, [energies[row], energies[row + 1]], [forces[row], forces[row + 1]])
  }
  // Rounding must not throw the first row of a turn to its end.
  const folded = (coordinate: number): number =>
    kind === 'dihedral'
      ? coordinate - 2 * Math.PI * Math.floor((coordinate - low) / (2 * Math.PI) + 1e-12)
      : coordinate
  const covers = (coordinate: number): boolean => {
    const position = (folded(coordinate) - low) / step
    return periodic || (position > -ON_ROW && position < last + ON_ROW)
  }
  return { low, high, step, periodic, covers, at }
}

/** The cubic between two rows at the share t of their distance. */
function hermite(
  t: number,
  step: number,
  [energy, nextEnergy]: readonly [number, number],
  [force, nextForce]: readonly [number, number],
): CurvePoint {
  const rise = nextEnergy - energy
  // Slopes times the step; the rest beyond the chord vanishes at both rows.
  const [left, right] = [-force * step - rise, -nextForce * step - rise]
  const u = 1 - t
  return {
    energy: energy + t * rise + t * u * (u * left - t * right),
    force: -(rise + u * (1 - 3 * t) * left + t * (3 * t - 2) * right) / step,
  }
}
