import type { CoordinateKind } from '../units'

/**
 * Exact volumes ∫ J dq of bins. Dividing a histogram by them removes what geometry alone puts there, without the
 * singularity a Jacobian taken at the bin centre has at r = 0, 0° or 180°.
 *
 * @param edges checked edges in internal units, length n + 1 (see `checkEdges`)
 * @param useJacobian false gives the plain bin widths
 * @returns length n: bond (b³ − a³)/3 in nm³, angle cos a − cos b, dihedral b − a
 * @example binVolumes('bond', Float64Array.of(0, 1, 2)) // 1/3, 7/3
 */
export function binVolumes(kind: CoordinateKind, edges: Float64Array, useJacobian = true): Float64Array {
  const volume = useJacobian ? VOLUMES[kind] : width
  return Float64Array.from({ length: edges.length - 1 }, (_, bin) => volume(edges[bin], edges[bin + 1]))
}

const width = (low: number, high: number): number => high - low

// Differences of cubes and cosines are factored: thin bins would lose all digits to cancellation.
const VOLUMES: Record<CoordinateKind, (low: number, high: number) => number> = {
  bond: (low, high) => ((high - low) * (high * high + high * low + low * low)) / 3,
  angle: (low, high) => 2 * Math.sin((low + high) / 2) * Math.sin((high - low) / 2),
  dihedral: width,
}
