/**
 * The basins of an energy on a graph as it floods from below: where each is born, where and how deep it dies, and which cells
 * it holds.
 */
export interface MergeTree {
  /** Cell of each minimum, in ascending order of energy: the first is the lowest. */
  readonly minima: Int32Array
  /** Cell over which each spills into one with a lower minimum; −1 where no way leads to one. */
  readonly saddles: Int32Array
  /** Energy of the saddle less that of the minimum, above 0; Infinity where the saddle is −1. */
  readonly depths: Float64Array
  /** The basin on the other side of the saddle; −1 where there is none. Following it ends at a basin without a saddle. */
  readonly neighbours: Int32Array
  /** Basin of each cell; −1 for a wall. */
  readonly labels: Int32Array
}

/** Writes the neighbours of a cell into `into` and returns how many there are. */
export type NeighbourList = (cell: number, into: Int32Array) => number

/**
 * Merge tree of an energy on a graph and its pairing of minima with saddles by topological persistence: where two basins meet,
 * the one with the higher minimum dies (Edelsbrunner, Letscher, Zomorodian, Discrete Comput. Geom. 28 (2002) 511). Equal
 * energies are taken in the order of the cells, and what they give birth to with depth 0 is no basin. A cell belongs to the
 * basin of its lowest neighbour.
 *
 * @param energies any unit; what is not finite is a wall
 * @param neighboursOf symmetric; at most 8 a cell
 * @returns no basins where all cells are walls
 */
export function mergeTree(energies: Float64Array, neighboursOf: NeighbourList): MergeTree {
  const order = ascending(energies)
  const labels = new Int32Array(energies.length).fill(-1)
  const flood: Flood = { energies, minima: [], saddles: [], others: [], roots: [] }
  const around = new Int32Array(8)
  for (const cell of order) {
    const count = neighboursOf(cell, around)
    let lowest = -1
    for (let index = 0; index < count; index++) {
      const near = around[index]
      if (labels[near] >= 0 && (lowest < 0 || energies[near] < energies[lowest])) lowest = near
    }
    labels[cell] = lowest < 0 ? born(flood, cell) : labels[lowest]
    for (let index = 0; index < count; index++) {
      const near = around[index]
      if (labels[near] >= 0) meet(flood, cell, labels[cell], labels[near])
    }
  }
  return withoutFlats(flood, labels)
}

interface Flood {
  readonly energies: Float64Array
  readonly minima: number[]
  readonly saddles: number[]
  readonly others: number[]
  /** Union–find over the basins; a root is the one of lowest minimum, born first. */
  readonly roots: number[]
}

/** Cells that are no walls, lowest first; equal ones in their own order. */
function ascending(energies: Float64Array): Int32Array {
  const cells = Int32Array.from(energies.keys()).filter((cell) => Number.isFinite(energies[cell]))
  return cells.sort((a, b) => energies[a] - energies[b] || a - b)
}

function born({ minima, saddles, others, roots }: Flood, cell: number): number {
  minima.push(cell)
  saddles.push(-1)
  others.push(-1)
  roots.push(roots.length)
  return minima.length - 1
}

function meet({ roots, saddles, others }: Flood, cell: number, one: number, other: number): void {
  const [first, second] = [rootOf(roots, one), rootOf(roots, other)]
  if (first === second) return
  // Basins are numbered as they are born, so the larger number has the higher minimum: it dies.
  const dying = Math.max(first, second)
  roots[dying] = Math.min(first, second)
  saddles[dying] = cell
  others[dying] = dying === first ? other : one
}

function rootOf(roots: number[], basin: number): number {
  let root = basin
  while (roots[root] !== root) {
    roots[root] = roots[roots[root]]
    root = roots[root]
  }
  return root
}

/** Leaves out the basins of depth 0, which a flat bottom gives birth to, and numbers the others anew. */
function withoutFlats({ energies, minima, saddles, others }: Flood, labels: Int32Array): MergeTree {
  const depthOf = (basin: number) =>
    saddles[basin] < 0 ? Infinity : energies[saddles[basin]] - energies[minima[basin]]
  const all = Array.from(minima.keys())
  const kept = all.filter((basin) => depthOf(basin) > 0)
  const places = new Map(kept.map((basin, place) => [basin, place]))
  const owner = (basin: number): number => {
    for (let at = basin; at >= 0; at = others[at]) {
      const place = places.get(at)
      if (place !== undefined) return place
    }
    return -1
  }
  const owners = all.map(owner)
  return {
    minima: Int32Array.from(kept, (basin) => minima[basin]),
    saddles: Int32Array.from(kept, (basin) => saddles[basin]),
    depths: Float64Array.from(kept, depthOf),
    neighbours: Int32Array.from(kept, (basin) => owner(others[basin])),
    labels: labels.map((label) => (label < 0 ? -1 : owners[label])),
  }
}
