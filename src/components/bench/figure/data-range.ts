import type { Inversion } from '@shared/inversion'
import type { EmptyRun } from './empty-bins'

/**
 * From where to where the potential stands on data, in internal units: between the midpoints of the outermost bins with
 * counts, where the spline is anchored. A dihedral measured all around the turn has no ends: its outer edges bound it.
 */
export function dataRange({ kind, bins }: Inversion, { first, last }: EmptyRun): [number, number] {
  if (kind === 'dihedral' && first === 0 && last === bins.midpoints.length - 1) {
    return [bins.edges[first], bins.edges[last + 1]]
  }
  return [bins.midpoints[first], bins.midpoints[last]]
}
