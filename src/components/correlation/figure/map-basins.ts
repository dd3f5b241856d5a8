import type { Correlation, MatchedBasin } from '@shared/correlation'
import type { MapAxis } from './map-model'

/** A basin as the map shows it, in the units shown. */
export interface MapBasin {
  /** Numbered from the lowest energy on; null for a basin that only the product of the two distributions has. */
  readonly number: number | null
  readonly x: number
  readonly y: number
  /** kT; null for the lowest. */
  readonly depth: number | null
  /** Share of the configurations. */
  readonly population: number | null
  /** Whether the other landscape, product or map, has the same basin. */
  readonly shared: boolean
}

/** Radius of the ring around a number, in pixels. */
export const BASIN_RADIUS = 9

/** The basins of the map, and behind them those that only the product has; none where the sample size is not stated. */
export function mapBasins({ basins }: Correlation, x: MapAxis, y: MapAxis): MapBasin[] {
  if (basins === null) return []
  const shown = (basin: MatchedBasin, number: number | null): MapBasin => ({
    number,
    x: basin.x / x.scale,
    y: basin.y / y.scale,
    depth: basin.depth,
    population: basin.population,
    shared: basin.counterpart !== null,
  })
  return [
    ...basins.map.basins.map((basin, index) => shown(basin, index + 1)),
    ...basins.product.basins
      .filter(({ counterpart }) => counterpart === null)
      .map((basin) => shown(basin, null)),
  ]
}
