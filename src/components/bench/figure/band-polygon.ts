import type { Point } from '@/components/figure/stepped-outline'

/** Half width of a 95 % band in standard deviations. */
export const BAND_DEVIATIONS = 1.96

/**
 * The band value ± 1.96 σ as closed polygons: along the upper side, back along the lower. Where σ is NaN nothing is known
 * and the band is interrupted, so there is one polygon per stretch of at least two points.
 *
 * @param coordinates ascending, length n
 * @param values length n
 * @param deviations standard deviations, length n, not negative or NaN
 */
export function bandPolygons(
  coordinates: ArrayLike<number>,
  values: ArrayLike<number>,
  deviations: ArrayLike<number>,
): Point[][] {
  const polygons: Point[][] = []
  let upper: Point[] = []
  let lower: Point[] = []
  const close = (): void => {
    if (upper.length > 1) polygons.push([...upper, ...lower.reverse()])
    upper = []
    lower = []
  }
  for (let index = 0; index < coordinates.length; index += 1) {
    const half = BAND_DEVIATIONS * deviations[index]
    if (Number.isNaN(half)) {
      close()
      continue
    }
    upper.push([coordinates[index], values[index] + half])
    lower.push([coordinates[index], values[index] - half])
  }
  close()
  return polygons
}
