import { computed, shallowRef, watch, type ComputedRef } from 'vue'
import type { Histogram } from '@shared/histogram'
import { coordinateToInternal, type CoordinateUnit } from '@shared/units'
import type { InversionAnswer } from '@/workers'

/** Where the reading stands. */
export interface BenchReading {
  /** The bin that is read; null without data. */
  readonly bin: ComputedRef<number | null>
  readonly move: (bins: number) => void
  readonly go: (bin: number) => void
  /** To the bin that holds a coordinate, in the given unit; outside the histogram to its nearest end. */
  readonly point: (coordinate: number, unit: CoordinateUnit) => void
}

/**
 * The reading moves over the bins of the histogram. It starts where the potential is least and stays where it is while
 * settings change; another histogram starts anew.
 */
export function useBenchReading(
  histogram: () => Histogram | null,
  answer: () => InversionAnswer | null,
): BenchReading {
  const chosen = shallowRef<number | null>(null)
  watch(histogram, () => (chosen.value = null))

  const bin = computed(() => {
    const data = histogram()
    if (data === null) return null
    if (chosen.value !== null) return chosen.value
    const found = answer()
    return found === null ? null : binOf(data.edges, found.inversion.minimum.coordinate)
  })
  const go = (next: number): void => {
    const data = histogram()
    if (data !== null) chosen.value = Math.min(data.weights.length - 1, Math.max(0, next))
  }

  return {
    bin,
    go,
    move: (bins) => {
      if (bin.value !== null) go(bin.value + bins)
    },
    point: (coordinate, unit) => {
      const data = histogram()
      if (data !== null) go(binOf(data.edges, coordinateToInternal(coordinate, unit)))
    },
  }
}

/** Index of the half-open bin that holds a coordinate; the first or last one outside. */
export function binOf(edges: Float64Array, coordinate: number): number {
  let low = 0
  let high = edges.length - 1
  while (high - low > 1) {
    const middle = (low + high) >> 1
    if (edges[middle] <= coordinate) low = middle
    else high = middle
  }
  return low
}
