import type { Point, RepeatUnit } from '@shared/chemistry'
import { beadGraph, type BeadPlace, type MappingDocument } from '@shared/mapping'
import { countCollisions } from './count-collisions'
import { hangUnit, type Slope } from './hang-unit'
import { unitLayers } from './unit-layers'

/** The chain as it runs: beads of three units, the ones on the backbone on one line, side groups below. Lengths in px. */
export interface ChainLayout {
  readonly beads: readonly (BeadPlace & Point)[]
  readonly bonds: readonly { readonly from: BeadPlace & Point; readonly to: BeadPlace & Point }[]
  /** From the left edge to the first bead of the line, and from its last one to the right edge; null when no unit is linked. */
  readonly ends: { readonly first: Point; readonly last: Point } | null
  /** Shift from one unit to the next. */
  readonly unitWidth: number
  readonly width: number
  readonly height: number
}

/** Room for the drawing, px. */
export interface ChainRoom {
  readonly width: number
  readonly height: number
}

/** The room of the board on a desk at 1280 px. */
export const DESK_ROOM: ChainRoom = { width: 680, height: 134 }

export const CHAIN_UNITS = 3
export const BEAD_RADIUS = 10
const WIDEST_UNIT = 200
const NARROWEST_STEP = 34
const MARGIN = { left: 44, right: 36, top: 20, bottom: 18 }
/** From the steep one of a short side chain to ever flatter ones, all with 30 px from bead to bead. */
const SLOPES: readonly Slope[] = [23, 20, 17, 14, 11, 8, 5].map((down) => ({
  along: Math.sqrt(900 - down * down),
  down,
}))

/**
 * Lays out the bead graph of a short chain. Of the unit widths and slopes that are tried the one is taken in which the fewest
 * beads and bonds lie on one another, then the one that has to be shrunk least, then the steepest and widest.
 */
export function chainLayout(
  unit: RepeatUnit,
  document: MappingDocument,
  room: ChainRoom = DESK_ROOM,
): ChainLayout {
  const graph = beadGraph(unit, document, CHAIN_UNITS)
  const layers = unitLayers(unit, document)
  const narrowest = NARROWEST_STEP * Math.max(1, layers.line.length)
  const widest = Math.max(WIDEST_UNIT, narrowest)
  const slopes = layers.layers.length > 1 ? SLOPES : SLOPES.slice(0, 1)
  let best: { layout: ChainLayout; collisions: number; scale: number } | null = null
  for (const slope of slopes) {
    for (let unitWidth = widest; unitWidth >= narrowest; unitWidth -= 10) {
      const inUnit = hangUnit(layers, unitWidth / Math.max(1, layers.line.length), slope)
      const layout = repeated(graph, document, inUnit, unitWidth, layers.linked ? layers.line : null)
      const scale = chainScale(layout, room)
      // Counting takes nearly all of the time, and this one could not be taken.
      if (best?.collisions === 0 && scale <= best.scale) continue
      const collisions = countCollisions({ beads: layout.beads, bonds: indexed(layout) })
      if (
        best === null ||
        collisions < best.collisions ||
        (collisions === best.collisions && scale > best.scale)
      )
        best = { layout, collisions, scale }
      if (collisions === 0 && scale === 1) return layout
    }
  }
  return (best as { layout: ChainLayout }).layout
}

/** By how much a drawing is shrunk to fit; never magnified. */
export function chainScale({ width, height }: ChainRoom, room: ChainRoom): number {
  return Math.min(1, room.width / width, room.height / height)
}

function repeated(
  graph: ReturnType<typeof beadGraph>,
  document: MappingDocument,
  inUnit: readonly (Point | undefined)[],
  unitWidth: number,
  line: readonly number[] | null,
): ChainLayout {
  const points = inUnit.filter((point) => point !== undefined)
  const left = Math.min(0, ...points.map(({ x }) => x)) - MARGIN.left
  const right = Math.max(0, ...points.map(({ x }) => x)) + MARGIN.right
  const at = (point: Point, unit: number): Point => ({
    x: point.x - left + unit * unitWidth,
    y: point.y + MARGIN.top,
  })
  const all = graph.beads.map((place, index) => {
    const point = inUnit[index % document.beads.length]
    return point && { ...place, ...at(point, place.unit) }
  })
  const ends =
    line === null
      ? null
      : {
          first: at(inUnit[line[0]] as Point, 0),
          last: at(inUnit[line[line.length - 1]] as Point, CHAIN_UNITS - 1),
        }
  return {
    beads: all.filter((bead) => bead !== undefined),
    bonds: graph.bonds.flatMap(({ from, to }) => {
      const [one, other] = [all[from], all[to]]
      return one && other ? [{ from: one, to: other }] : []
    }),
    ends,
    unitWidth,
    width: (CHAIN_UNITS - 1) * unitWidth + right - left,
    height: Math.max(0, ...points.map(({ y }) => y)) + MARGIN.top + MARGIN.bottom,
  }
}

function indexed({ beads, bonds }: ChainLayout): { from: number; to: number }[] {
  return bonds.map(({ from, to }) => ({ from: beads.indexOf(from), to: beads.indexOf(to) }))
}
