import { InvalidInputError } from '../errors'
import type { BasinCurve, BasinStep, BasinThreshold } from './basin'
import type { MergeTree } from './merge-tree'

/** Which basins of a merge tree count. */
export interface CountedBasins {
  /** Numbers in the tree, ascending energy. */
  readonly kept: readonly number[]
  /** For each basin of the tree the place in `kept` of the one that holds it: itself, or where it spills into. */
  readonly holders: Int32Array
}

/**
 * Chooses the basins that are deep enough. One without a saddle counts always; one that does not count belongs to its
 * neighbour over the saddle.
 *
 * @param deviations standard deviation of each depth, in the unit of the depths; NaN or null where unknown, and then only the
 *   depth is asked
 * @throws {InvalidInputError} SETTING_INVALID for a threshold below 0 or not finite
 */
export function countBasins(
  { depths, neighbours }: MergeTree,
  deviations: Float64Array | null,
  threshold: BasinThreshold,
): CountedBasins {
  checkThreshold(threshold)
  const counts = (basin: number) => {
    const sigma = deviations?.[basin] ?? NaN
    const least = Math.max(threshold.depth, Number.isNaN(sigma) ? 0 : threshold.deviations * sigma)
    return depths[basin] > least
  }
  const kept = Array.from(depths.keys()).filter(counts)
  const places = new Map(kept.map((basin, place) => [basin, place]))
  const holders = Int32Array.from(depths, (_, basin) => {
    let at = basin
    while (!places.has(at)) at = neighbours[at]
    return places.get(at) ?? -1
  })
  return { kept, holders }
}

/** The number of basins against the depth they are asked at, the band left aside. */
export function basinCurve({ depths }: MergeTree): BasinCurve {
  const lasting = depths.reduce((count, depth) => count + (depth === Infinity ? 1 : 0), 0)
  const steps: BasinStep[] = []
  Array.from(depths)
    .filter(Number.isFinite)
    .sort((a, b) => b - a)
    .forEach((depth, index) => {
      if (steps.at(-1)?.depth === depth) steps.pop()
      steps.push({ depth, count: lasting + index + 1 })
    })
  return { lasting, steps }
}

function checkThreshold(threshold: BasinThreshold): void {
  for (const field of ['depth', 'deviations'] as const) {
    const value = threshold[field]
    if (value >= 0 && Number.isFinite(value)) continue
    throw new InvalidInputError(
      'SETTING_INVALID',
      `The ${field} of a basin is ${value}; it must be 0 or more.`,
      {
        field,
      },
    )
  }
}
