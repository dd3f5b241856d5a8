/**
 * The smallest ring through each bond that lies in a ring, each ring once: every bond of every ring is covered. Not
 * necessarily a smallest set; what matters here is which atoms close a ring together.
 *
 * @param neighbours neighbour lists of a simple graph
 * @returns rings as atom indices in ring order
 */
export function smallestRings(neighbours: readonly (readonly number[])[]): number[][] {
  const rings = new Map<string, number[]>()
  neighbours.forEach((list, from) => {
    for (const to of list) {
      if (to < from) continue
      const ring = shortestWay(neighbours, from, to)
      if (!ring) continue
      const key = ring.toSorted((a, b) => a - b).join(' ')
      if (!rings.has(key)) rings.set(key, ring)
    }
  })
  return [...rings.values()]
}

/** Breadth-first way between the two ends of a bond that does not use the bond itself. */
function shortestWay(neighbours: readonly (readonly number[])[], from: number, to: number): number[] | null {
  const cameFrom = new Map<number, number>([[from, from]])
  const queue = [from]
  for (const atom of queue) {
    for (const next of neighbours[atom]) {
      if (cameFrom.has(next) || (atom === from && next === to)) continue
      cameFrom.set(next, atom)
      if (next !== to) {
        queue.push(next)
        continue
      }
      const way = [to]
      while (way[0] !== from) way.unshift(cameFrom.get(way[0]) as number)
      return way
    }
  }
  return null
}
