import { thermalEnergy } from '../units'

/** Energies above this many kT in both tables are never visited: what changes there matters to nobody. */
export const REACHED = 10

/** Energies on one or two axes of coordinates; internal units. */
export interface EnergyGrid {
  /** Ascending. */
  readonly coordinates: ArrayLike<number>
  /** null for one axis. */
  readonly secondCoordinates: ArrayLike<number> | null
  /** kJ/mol, row-major. */
  readonly energies: ArrayLike<number>
}

/** Where two tables differ most. */
export interface LargestChange {
  /** |ΔU| in kT. */
  readonly kT: number
  /** nm or rad, one or two. */
  readonly coordinates: number[]
}

/**
 * The largest |U_after − U_before| at the rows of the new table, both with least value 0, where at least one of the two is
 * below 10 kT; the old one is read between its rows linearly (bilinearly on a grid).
 *
 * @param temperature K, of the new table
 * @returns null when no row of the new table lies in the range of the old one or the two have a different number of axes
 * @example largestEnergyChange(table, table, 400) // { kT: 0, coordinates: [...] }
 */
export function largestEnergyChange(
  before: EnergyGrid,
  after: EnergyGrid,
  temperature: number,
): LargestChange | null {
  const second = after.secondCoordinates
  if ((before.secondCoordinates === null) !== (second === null)) return null
  const kT = thermalEnergy(temperature)
  const [oldLeast, newLeast] = [least(before.energies), least(after.energies)]
  const columns = second?.length ?? 1
  const ys = second === null ? null : Array.from(second, (y) => place(before.secondCoordinates!, y))
  let largest: LargestChange | null = null
  for (let row = 0; row < after.coordinates.length; row++) {
    const x = place(before.coordinates, after.coordinates[row])
    if (x === null) continue
    for (let column = 0; column < columns; column++) {
      const y = ys === null ? NO_AXIS : ys[column]
      if (y === null) continue
      const old = interpolated(before, x, y) - oldLeast
      const now = after.energies[row * columns + column] - newLeast
      if (Math.min(old, now) > REACHED * kT) continue
      const change = Math.abs(now - old) / kT
      if (largest !== null && change <= largest.kT) continue
      const at = [after.coordinates[row], ...(second === null ? [] : [second[column]])]
      largest = { kT: change, coordinates: at }
    }
  }
  return largest
}

/** A place on an axis: the row at or below it, and the share of the way to the next. */
interface Place {
  readonly index: number
  readonly share: number
}

const NO_AXIS: Place = { index: 0, share: 0 }
/** Rounding by which a place may lie beyond the last row. */
const SLACK = 1e-9

function place(axis: ArrayLike<number>, coordinate: number): Place | null {
  const last = axis.length - 1
  if (coordinate < axis[0] - SLACK || coordinate > axis[last] + SLACK) return null
  let [low, high] = [0, last]
  while (high - low > 1) {
    const middle = (low + high) >> 1
    if (axis[middle] <= coordinate) low = middle
    else high = middle
  }
  if (high === low) return { index: low, share: 0 }
  const share = (coordinate - axis[low]) / (axis[high] - axis[low])
  return { index: low, share: Math.min(1, Math.max(0, share)) }
}

function interpolated({ secondCoordinates, energies }: EnergyGrid, x: Place, y: Place): number {
  const columns = secondCoordinates?.length ?? 1
  const along = (row: number): number => {
    const start = row * columns + y.index
    return y.share === 0 ? energies[start] : energies[start] * (1 - y.share) + energies[start + 1] * y.share
  }
  return x.share === 0 ? along(x.index) : along(x.index) * (1 - x.share) + along(x.index + 1) * x.share
}

function least(energies: ArrayLike<number>): number {
  let value = Infinity
  for (let index = 0; index < energies.length; index++) value = Math.min(value, energies[index])
  return value
}
