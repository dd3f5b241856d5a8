import { fixedText } from '@/components/figure/number-text'
import type { MapAxis } from './map-model'

const MOST_DECIMALS = 5

/** A place on an axis as text, with the decimals that the middles of its bins need: 0.464 nm, 91°. */
export function coordinateAt(axis: MapAxis, internal: number): string {
  return `${fixedText(internal / axis.scale, middleDecimals(axis.edges))}${axis.names.valueSuffix}`
}

/** The least number of decimals that writes out the middles of the first two bins; the others follow by whole bins. */
function middleDecimals(edges: ArrayLike<number>): number {
  const middles = [(edges[0] + edges[1]) / 2, (edges[1] + edges[2]) / 2]
  const written = (decimals: number) =>
    middles.every((middle) => {
      const shifted = middle * 10 ** decimals
      return Math.abs(shifted - Math.round(shifted)) < 1e-3
    })
  let decimals = 0
  while (decimals < MOST_DECIMALS && !written(decimals)) decimals += 1
  return decimals
}
