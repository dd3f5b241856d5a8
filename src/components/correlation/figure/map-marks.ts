import { axisTicks } from '@/components/figure/axis-ticks'
import { linearScale, type LinearScale } from '@/components/figure/linear-scale'
import { fixedText } from '@/components/figure/number-text'
import type { MapFrame } from './map-frame'
import type { MapModel } from './map-model'

/** A tick of the map at a pixel, with its label where there is room for one. */
export interface MapMark {
  readonly at: number
  readonly label: string | null
}

/** Ticks of both axes in pixels, and the scales they were made with. */
export interface MapMarks {
  readonly x: LinearScale
  readonly y: LinearScale
  readonly xTicks: readonly MapMark[]
  readonly yTicks: readonly MapMark[]
}

/** Pixels between labels at least. */
const EVERY = { wide: { x: 80, y: 70 }, narrow: { x: 50, y: 45 } } as const
/** Room for the name of the axis at its right end, under the map. */
const NAME = { wide: 84, narrow: 74 } as const

/** Places the ticks of the map. */
export function mapMarks({ map, narrow }: MapFrame, model: MapModel): MapMarks {
  const width = narrow ? 'narrow' : 'wide'
  const right = map.left + map.width
  const x = linearScale(model.x.window, [map.left, right])
  const y = linearScale(model.y.window, [map.top + map.height, map.top])
  const ticks = (scale: LinearScale, pixels: number, every: number, degrees: boolean) =>
    axisTicks(...scale.domain, Math.max(2, Math.floor(pixels / every)), degrees)
  const across = ticks(x, map.width, EVERY[width].x, model.x.degrees)
  const up = ticks(y, map.height, EVERY[width].y, model.y.degrees)
  return {
    x,
    y,
    xTicks: across.major.map((value) => {
      const at = half(x.at(value))
      return { at, label: at < right - NAME[width] ? fixedText(value, across.decimals) : null }
    }),
    yTicks: up.major.map((value) => ({ at: half(y.at(value)), label: fixedText(value, up.decimals) })),
  }
}

/** Lines of one pixel lie on half pixels. */
const half = (pixel: number): number => Math.round(pixel - 0.5) + 0.5
