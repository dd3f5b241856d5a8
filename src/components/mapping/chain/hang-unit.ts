import type { Point } from '@shared/chemistry'
import type { UnitLayers } from './unit-layers'

/** How steeply the layers of a unit hang, px. */
export interface Slope {
  /** From one layer to the next, to the right. */
  readonly along: number
  /** From one layer to the next, down. */
  readonly down: number
}

/** Least distance of two beads side by side, px. */
const SIDE_BY_SIDE = 28
/** The first layer, and every layer in which beads stand side by side, keeps this distance from the one above, px. */
const FULL_STEP = 24

/**
 * Places of the beads of one unit: the line level at y = 0 from x = 0 on, each layer below the beads it hangs from. A single
 * file runs down aslant; where beads branch or close a ring they stand side by side, straight below.
 *
 * @param layers the beads of the unit
 * @param step px from one bead of the line to the next
 * @returns by bead; undefined for beads that are on no chain
 */
export function hangUnit(layers: UnitLayers, step: number, slope: Slope): (Point | undefined)[] {
  const places: (Point | undefined)[] = layers.neighbours.map(() => undefined)
  layers.line.forEach((bead, index) => (places[bead] = { x: index * step, y: 0 }))
  let y = 0
  let above: readonly number[] = layers.line
  layers.layers.forEach((layer, depth) => {
    const parents = layer.map((bead) => layers.neighbours[bead].filter((other) => above.includes(other)))
    const single =
      parents.every((list) => list.length <= 1) && new Set(parents.flat()).size === parents.flat().length
    y += depth === 0 || !single ? Math.max(FULL_STEP, slope.down) : slope.down
    const wishes = parents.map((list, index) => {
      const xs = list.map((bead) => (places[bead] as Point).x)
      const mean = xs.length === 0 ? index * SIDE_BY_SIDE : xs.reduce((sum, x) => sum + x, 0) / xs.length
      return mean + (single ? slope.along : 0)
    })
    spread(wishes).forEach((x, index) => (places[layer[index]] = { x, y }))
    above = layer
  })
  return places
}

/** Moves points on a line apart until each has its room, groups that touch staying centred on their wishes. */
function spread(wishes: readonly number[]): number[] {
  const order = wishes
    .map((_, index) => index)
    .sort((one, other) => wishes[one] - wishes[other] || one - other)
  const groups: { members: number[]; centre: number }[] = []
  for (const index of order) {
    let group = { members: [index], centre: wishes[index] }
    for (let last = groups.at(-1); last && touches(last, group); last = groups.at(-1)) {
      groups.pop()
      const members = [...last.members, ...group.members]
      const centre = members.reduce((sum, member) => sum + wishes[member], 0) / members.length
      group = { members, centre }
    }
    groups.push(group)
  }
  const placed = wishes.map((wish) => wish)
  for (const { members, centre } of groups) {
    members.forEach((member, rank) => {
      placed[member] = centre + (rank - (members.length - 1) / 2) * SIDE_BY_SIDE
    })
  }
  return placed
}

function touches(
  one: { members: number[]; centre: number },
  next: { members: number[]; centre: number },
): boolean {
  const room = ((one.members.length + next.members.length) / 2) * SIDE_BY_SIDE
  return next.centre - one.centre < room - 1e-9
}
