import { fixedText } from '@/components/bench/figure/number-text'
import type { MapAxis } from './map-model'

const MOST_DECIMALS = 5

/** A place on an axis as text, with the decimals that the middles of its bins need: 0.464 nm, 91°. */
export function coordinateAt(axis: MapAxis, internal: number): string {
  return `${fixedText(internal / axis.scale, middleDecimals(axis.edges))}${axis.names.valueSuffix}`
}

/** The least number of decimals that writes the middle of the first bin out; the other middles follow by whole bins. */
function middleDecimals(edges: ArrayLike<number>): number {
  const middle = (edges[0] + edges[1]) / 2
  for (let decimals = 0; decimals < MOST_DECIMALS; decimals += 1) {
    const shifted = middle * 10 ** decimals
    if (Math.abs(shifted - Math.round(shifted)) < 1e-3) return decimals
  }
  return MOST_DECIMALS
}
