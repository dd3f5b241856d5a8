/** A drawing area in pixels. */
export interface Area {
  readonly left: number
  readonly top: number
  readonly width: number
  readonly height: number
}

/** Where the parts of the figure stand: the map, the distribution of each coordinate alone above and right of it. */
export interface MapFrame {
  readonly width: number
  readonly height: number
  readonly narrow: boolean
  readonly map: Area
  readonly above: Area
  readonly right: Area
}

const WIDE = { left: 56, above: 68, right: 92, gap: 6, below: 30, largest: 640 } as const
const NARROW = { left: 38, above: 44, right: 48, gap: 4, below: 30, largest: 640 } as const

/**
 * Lays the figure into the width it has; the height of the map follows the room there is, within 260 px and its width.
 *
 * @param width of the column, px
 * @param height there is for the whole figure, px
 */
export function mapFrame(width: number, height: number): MapFrame {
  const narrow = width < 480
  const space = narrow ? NARROW : WIDE
  const mapWidth = Math.max(120, Math.min(space.largest, width - space.left - space.gap - space.right))
  const wanted = height - space.above - space.gap - space.below
  const mapHeight = Math.round(narrow ? mapWidth : Math.max(260, Math.min(wanted, mapWidth * 1.05)))
  const top = space.above + space.gap
  const map = { left: space.left, top, width: Math.floor(mapWidth), height: mapHeight }
  return {
    width,
    height: top + mapHeight + space.below,
    narrow,
    map,
    above: { left: map.left, top: 2, width: map.width, height: space.above - 2 },
    right: { left: map.left + map.width + space.gap, top, width: space.right - 2, height: mapHeight },
  }
}
