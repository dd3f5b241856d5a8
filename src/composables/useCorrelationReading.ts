import { shallowRef, watch, type ShallowRef } from 'vue'
import type { CellPlace } from '@/components/correlation/figure/cell-reading'

/** The bins the reading moves in, both ends included, and the cell where it starts. */
export interface ReadingBounds {
  readonly x: readonly [first: number, last: number]
  readonly y: readonly [first: number, last: number]
  readonly start: CellPlace
}

/** The cell that is read, by pointer or keys; gone when the map changes. */
export function useCorrelationReading(bounds: () => ReadingBounds | null): {
  readonly place: Readonly<ShallowRef<CellPlace | null>>
  readonly read: (place: CellPlace | null) => void
  /** Moves by whole cells; the first move shows the start. Stops at the border. */
  readonly move: (dx: number, dy: number) => void
} {
  const place = shallowRef<CellPlace | null>(null)
  watch(bounds, () => {
    place.value = null
  })

  const read = (next: CellPlace | null): void => {
    place.value = next
  }
  const move = (dx: number, dy: number): void => {
    const within = bounds()
    if (within === null) return
    place.value =
      place.value === null
        ? within.start
        : { ix: kept(place.value.ix + dx, within.x), iy: kept(place.value.iy + dy, within.y) }
  }

  return { place, read, move }
}

const kept = (bin: number, [first, last]: readonly [number, number]): number =>
  Math.min(last, Math.max(first, bin))
