import { type Potential, regenerate } from '../inversion'
import { thermalEnergy } from '../units'
import { type BasinCurve, type BasinThreshold, DEFAULT_BASIN_THRESHOLD } from './basin'
import { basinCurve, countBasins } from './counted-basins'
import { deviationAt } from './curve-deviation'
import { type CurvePoints, curvePoints } from './curve-points'
import { mergeTree, type NeighbourList } from './merge-tree'

/** A basin of a potential. */
export interface CurveBasin {
  /** Where it is lowest, nm or rad; a dihedral in [−π, π). */
  readonly coordinate: number
  /** kJ/mol above the least energy of the potential. */
  readonly energy: number
  /** Barrier less minimum in kT; null for the lowest basin: no way leads lower. */
  readonly depth: number | null
  /** Standard deviation of the depth in kT; null where it has none or nothing is known. */
  readonly deviation: number | null
  /** The barrier it spills over into a lower basin, nm or rad and kJ/mol; null with the depth. */
  readonly barrier: { readonly coordinate: number; readonly energy: number } | null
  /** Share of the probability ∝ J exp(−U/kT), over the range that holds data. */
  readonly population: number
}

/** The basins of a potential with what they were asked at. */
export interface CurveBasins {
  readonly threshold: BasinThreshold
  /** Ascending energy; never empty. */
  readonly basins: readonly CurveBasin[]
  readonly curve: BasinCurve
}

/**
 * Basins of a potential by topological persistence (`mergeTree`), from the exact minima and barriers of its spline over the
 * range that holds data; of a dihedral over the whole turn. An end of the data towards which the energy falls is a minimum. The
 * deviation of a depth is √(σ² of barrier + σ² of minimum), each towards the most likely place: exact for the lowest minimum,
 * else it overstates, so that noise is rather left out. A flat curve is one basin.
 *
 * @param useJacobian false for a potential made without it; populations only
 * @throws {InvalidInputError} SETTING_INVALID for a threshold below 0; SINGULAR_SYSTEM as `regenerate`
 * @example curveBasins(potential, { depth: 1, deviations: 0 }).basins.length // basins deeper than 1 kT
 */
export function curveBasins(
  potential: Potential,
  threshold: BasinThreshold = DEFAULT_BASIN_THRESHOLD,
  useJacobian = true,
): CurveBasins {
  const kT = thermalEnergy(potential.temperature)
  const points = curvePoints(potential)
  const { coordinates, energies } = points
  const tree = mergeTree(energies, alongLine(coordinates.length, potential.period !== null))
  const inKt = { ...tree, depths: tree.depths.map((depth) => depth / kT) }
  const sigmaAt = (point: number) => deviationAt(potential, coordinates[point]) / kT
  const sigmas = Float64Array.from(tree.minima, (minimum, basin) =>
    tree.saddles[basin] < 0 ? NaN : Math.hypot(sigmaAt(minimum), sigmaAt(tree.saddles[basin])),
  )
  const { kept, holders } = countBasins(inKt, sigmas, threshold)
  const ownerOf = (point: number) => holders[tree.labels[point]]
  const populations = populationsOf(potential, points, ownerOf, kept.length, useJacobian)
  const place = (point: number) => ({ coordinate: coordinates[point], energy: energies[point] })
  const basins = kept.map((basin, index): CurveBasin => {
    const saddle = tree.saddles[basin]
    return {
      ...place(tree.minima[basin]),
      depth: saddle < 0 ? null : inKt.depths[basin],
      deviation: Number.isNaN(sigmas[basin]) ? null : sigmas[basin],
      barrier: saddle < 0 ? null : place(saddle),
      population: populations[index],
    }
  })
  return { threshold, basins, curve: basinCurve(inKt) }
}

function alongLine(count: number, turns: boolean): NeighbourList {
  return (point, into) => {
    const [before, after] = turns
      ? [(point + count - 1) % count, (point + 1) % count]
      : [point - 1, point + 1]
    let neighbours = 0
    if (before >= 0) into[neighbours++] = before
    if (after < count) into[neighbours++] = after
    return neighbours
  }
}

/** Between two neighbouring points the curve is monotonic: the stretch belongs to the basin of the lower one. */
function populationsOf(
  potential: Potential,
  { coordinates, energies }: CurvePoints,
  ownerOf: (point: number) => number,
  count: number,
  useJacobian: boolean,
): Float64Array {
  const edges = potential.period === null ? coordinates : Float64Array.of(...coordinates, Math.PI)
  const populations = new Float64Array(count)
  regenerate(potential.kind, potential, edges, useJacobian).forEach((mass, point) => {
    const next = (point + 1) % coordinates.length
    populations[ownerOf(energies[next] < energies[point] ? next : point)] += mass
  })
  return populations
}
