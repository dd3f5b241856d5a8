import type { Point, RepeatUnit } from '@shared/chemistry'
import { beadGraph, beadLinks, type BeadPlace, type MappingDocument } from '@shared/mapping'

/** The chain as it runs: beads of three units, the ones on the backbone on one line, side groups below. */
export interface ChainLayout {
  readonly beads: readonly (BeadPlace & Point)[]
  readonly bonds: readonly { readonly from: Point; readonly to: Point }[]
  readonly width: number
  readonly height: number
}

export const CHAIN_UNITS = 3
const UNIT_WIDTH = 200
const LINE = 34
const DEPTH_STEP = 23
const SIDE_STEP = 19
const ROOM_BELOW = 18

/** Lays out the bead graph of a short chain. */
export function chainLayout(unit: RepeatUnit, document: MappingDocument): ChainLayout {
  const graph = beadGraph(unit, document, CHAIN_UNITS)
  const inUnit = unitPlaces(unit, document)
  const beads = graph.beads.map((place) => {
    const index = document.beads.findIndex(({ id }) => id === place.bead)
    const { x, y } = inUnit[index]
    return { ...place, x: x + place.unit * UNIT_WIDTH, y }
  })
  const deepest = beads.reduce((most, { y }) => Math.max(most, y), LINE)
  return {
    beads,
    bonds: graph.bonds.map(({ from, to }) => ({ from: beads[from], to: beads[to] })),
    width: CHAIN_UNITS * UNIT_WIDTH,
    height: deepest + ROOM_BELOW,
  }
}

/** Places of the beads in the first unit: the path that links the units level, everything else hanging from it. */
function unitPlaces(unit: RepeatUnit, document: MappingDocument): Point[] {
  const links = beadLinks(unit, document)
  const neighbours = document.beads.map((_, bead) =>
    links.filter(({ from, shift }) => from === bead && shift === 0).map(({ to }) => to),
  )
  const entry = links.find(({ shift }) => shift < 0)?.from ?? 0
  const exit = links.find(({ shift }) => shift > 0)?.from ?? entry
  const line = shortestPath(neighbours, entry, exit)
  const places: (Point | undefined)[] = document.beads.map(() => undefined)
  line.forEach((bead, step) => {
    places[bead] = { x: ((step + 0.5) * UNIT_WIDTH) / line.length - UNIT_WIDTH / 4, y: LINE }
  })
  const queue = [...line]
  for (const bead of queue) {
    const from = places[bead] as Point
    const children = neighbours[bead].filter((child) => places[child] === undefined)
    children.forEach((child, order) => {
      const side = order % 2 === 0 ? 1 : -1
      places[child] = { x: from.x + side * SIDE_STEP * (1 + Math.floor(order / 2)), y: from.y + DEPTH_STEP }
      queue.push(child)
    })
  }
  // Beads that nothing holds yet wait below the line.
  return places.map((place, bead) => place ?? { x: bead * SIDE_STEP, y: LINE + 4 * DEPTH_STEP })
}

function shortestPath(neighbours: readonly (readonly number[])[], from: number, to: number): number[] {
  if (neighbours.length === 0) return []
  const before = new Map<number, number>([[from, from]])
  const queue = [from]
  for (const bead of queue) {
    for (const next of neighbours[bead]) {
      if (before.has(next)) continue
      before.set(next, bead)
      queue.push(next)
    }
  }
  if (!before.has(to)) return [from]
  const path = [to]
  while (path[0] !== from) path.unshift(before.get(path[0]) as number)
  return path
}
