import { InvalidInputError } from '../errors'
import type { CoordinateKind } from '../units'
import { coordinateDomain } from './coordinate-domain'

/** Rounding of a unit conversion that an edge may lie outside its domain, in rad. */
const EDGE_SLACK = 1e-9

/**
 * Checks the edges of a histogram and copies them. An edge within 1e-9 rad of 0, π or ±π is that end: what a conversion
 * from degrees leaves behind is not data outside the domain.
 *
 * @param edges in internal units, at least two
 * @returns copy of length n + 1, ascending, inside the domain of the kind
 * @throws {InvalidInputError} LENGTH_MISMATCH with fewer than two edges; NUMBER_NOT_FINITE; EDGES_NOT_ASCENDING with the
 *   index of the first edge that is not above the one before; EDGE_NEGATIVE (bond); EDGE_OUT_OF_RANGE (angle, dihedral)
 */
export function checkEdges(kind: CoordinateKind, edges: ArrayLike<number>): Float64Array {
  if (edges.length < 2) {
    throw new InvalidInputError('LENGTH_MISMATCH', 'A histogram needs at least one bin, that is two edges.')
  }
  const [low, high] = coordinateDomain(kind)
  const checked = Float64Array.from(edges)
  for (let index = 0; index < checked.length; index++) {
    if (Math.abs(checked[index] - low) < EDGE_SLACK) checked[index] = low
    if (Math.abs(checked[index] - high) < EDGE_SLACK) checked[index] = high
    checkEdge(kind, checked, index, low, high)
  }
  return checked
}

function checkEdge(kind: CoordinateKind, edges: Float64Array, index: number, low: number, high: number) {
  const edge = edges[index]
  if (!Number.isFinite(edge)) {
    throw new InvalidInputError('NUMBER_NOT_FINITE', `Bin edge ${index + 1} is not a finite number.`, {
      index,
    })
  }
  if (index > 0 && edge <= edges[index - 1]) {
    throw new InvalidInputError(
      'EDGES_NOT_ASCENDING',
      `Bin edges must ascend, but edge ${index + 1} is not above the one before it.`,
      { index },
    )
  }
  if (edge >= low && edge <= high) return
  if (kind === 'bond') {
    throw new InvalidInputError('EDGE_NEGATIVE', `Bin edge ${index + 1} of a bond is below zero.`, { index })
  }
  const range = kind === 'angle' ? '0° to 180°' : '−180° to 180°'
  throw new InvalidInputError('EDGE_OUT_OF_RANGE', `Bin edge ${index + 1} lies outside ${range}.`, { index })
}
