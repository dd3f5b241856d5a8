import type { RepeatUnit } from '@shared/chemistry'
import { beadLinks, type MappingDocument } from '@shared/mapping'

/** How the beads of one unit hang: by index in the document. Beads without atoms are on no chain and left out. */
export interface UnitLayers {
  /** The shortest way from the bead that the unit before holds to the one that holds the next unit. */
  readonly line: readonly number[]
  /** What hangs from the line, by the number of bonds to it; parts that nothing holds yet start in the first. */
  readonly layers: readonly (readonly number[])[]
  /** Bonded beads inside the unit. */
  readonly neighbours: readonly (readonly number[])[]
  /** Whether the line goes on in the next unit. */
  readonly linked: boolean
}

/** Sorts the beads of a unit into the line of the chain and what hangs from it. */
export function unitLayers(unit: RepeatUnit, document: MappingDocument): UnitLayers {
  const links = beadLinks(unit, document)
  const neighbours = document.beads.map((_, bead) =>
    links.filter(({ from, shift }) => from === bead && shift === 0).map(({ to }) => to),
  )
  const held = document.beads.flatMap(({ atoms }, bead) => (atoms.length > 0 ? [bead] : []))
  const onward = links.find(({ shift }) => shift > 0)
  const line =
    held.length === 0 ? [] : shortestPath(neighbours, onward?.to ?? held[0], onward?.from ?? held[0])
  const placed = new Set(line)
  const layers: number[][] = []
  for (let above: readonly number[] = line; ; above = layers[layers.length - 1]) {
    const next = above.flatMap((bead) => neighbours[bead]).filter((bead) => !placed.has(bead))
    const layer = [...new Set(next)]
    if (layer.length === 0) break
    layer.forEach((bead) => placed.add(bead))
    layers.push(layer)
  }
  for (const root of held) {
    if (placed.has(root)) continue
    let layer = [root]
    for (let depth = 0; layer.length > 0; depth++) {
      layer.forEach((bead) => placed.add(bead))
      layers[depth] = [...(layers[depth] ?? []), ...layer]
      layer = [...new Set(layer.flatMap((bead) => neighbours[bead]))].filter((bead) => !placed.has(bead))
    }
  }
  return { line, layers, neighbours, linked: onward !== undefined }
}

/** Breadth first; where there is no way, only the start. */
function shortestPath(neighbours: readonly (readonly number[])[], from: number, to: number): number[] {
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
