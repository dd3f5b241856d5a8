import { coordinateDomain } from '@shared/histogram'
import { coordinateFromInternal, type CoordinateKind, type CoordinateUnit } from '@shared/units'
import { tickStep } from '@/components/figure/axis-ticks'
import type { EmptyRun } from './empty-bins'

/** Part of the populated range that is shown beyond each of its ends. */
const MARGIN = 0.18
/** Part of a panel's height kept free for the name and unit at the head of its axis. */
const HEAD_ROOM = 0.14
/** Part of the potential's panel kept free below zero. */
const FOOT_ROOM = 0.05

/**
 * What the shared axis shows, in the unit of `edges`: a dihedral its full turn; others the populated bins with a margin on
 * both sides, rounded outward to minor ticks and cut at the domain of the kind.
 */
export function shownDomain(
  kind: CoordinateKind,
  edges: ArrayLike<number>,
  populated: EmptyRun,
  unit: CoordinateUnit,
): [number, number] {
  const [least, most] = coordinateDomain(kind).map((end) => coordinateFromInternal(end, unit))
  if (kind === 'dihedral') return [least, most]
  const low = edges[populated.first]
  const high = edges[populated.last + 1]
  const margin = MARGIN * (high - low)
  const [, minor] = tickStep(low - margin, high + margin, 7, unit === 'degree')
  return [
    Math.max(least, Math.floor((low - margin) / minor) * minor),
    Math.min(most, Math.ceil((high + margin) / minor) * minor),
  ]
}

/** Top of a distribution's axis: the tallest of the heights with room above for the head of the axis. */
export function densityTop(...heights: readonly ArrayLike<number>[]): number {
  return largest(heights) / (1 - HEAD_ROOM)
}

/**
 * Range of a potential's axis. Every bin by bin point is inside; the comparison curve may add at most a third to it,
 * since it runs to infinity where the Jacobian vanishes.
 */
export function energyDomain(points: ArrayLike<number>, comparison: ArrayLike<number>): [number, number] {
  const highest = Math.max(largest([points]), 1e-3)
  const top = Math.min(largest([points, comparison]), highest * (4 / 3)) / (1 - HEAD_ROOM)
  const least = Array.from(points).reduce((low, value) => (value < low ? value : low), 0)
  return [Math.min(-FOOT_ROOM * top, 1.3 * least), top]
}

function largest(lists: readonly ArrayLike<number>[]): number {
  let most = 0
  for (const list of lists) {
    for (let index = 0; index < list.length; index += 1) if (list[index] > most) most = list[index]
  }
  return most
}
