import type { BlockTree } from './block-tree'

/** What cutting costs beside the imbalance of masses. */
export interface CutCosts {
  /** Cost of ending a bead at an edge of the tree, by its index. */
  readonly ofEdge: (edge: number) => number
  /** Cost of a bead of a single heavy atom, by its block; Infinity forbids it. */
  readonly ofLoneAtom: (block: number) => number
}

/** Edges to cut, ascending, and what they cost. */
export interface Cuts {
  readonly edges: readonly number[]
  readonly cost: number
}

/** Of the beads below a block: how many are closed, and the one that is still open and holds the block. */
interface Partial {
  readonly closed: number
  readonly mass: number
  /** The open bead is one heavy atom. */
  readonly lone: boolean
  readonly cost: number
  /** The states it was joined from and the edge cut between them; most states are dropped before anyone asks for edges. */
  readonly from: { readonly above: Partial; readonly below: Partial; readonly cut: number | null } | null
}

/** Costs closer than this are equal; then the cuts that come first win, whatever the order of additions. */
export const COST_TIE = 1e-9

/**
 * Cuts a tree of blocks into beads with the least cost: Σ ((mᵢ − m̄)/m̄)² over the beads, m̄ = M/n, and the costs given. Exact,
 * by dynamic programming from the leaves: of all ways to cut below a block that leave the same number of closed beads and the
 * same open mass (to 0.001 g/mol), only the cheapest can be part of the best.
 *
 * @param beads how many, from 1
 * @returns null when the tree cannot be cut into so many
 */
export function balanceCuts(tree: BlockTree, beads: number, costs: CutCosts): Cuts | null {
  if (beads > tree.blocks.length) return null
  const mean = tree.blocks.reduce((sum, { mass }) => sum + mass, 0) / beads
  const around: { to: number; edge: number }[][] = tree.blocks.map(() => [])
  tree.edges.forEach(({ from, to }, edge) => {
    around[from].push({ to, edge })
    around[to].push({ to: from, edge })
  })
  const closing = (block: number, { mass, lone, cost }: Partial): number =>
    cost + ((mass - mean) / mean) ** 2 + (lone ? costs.ofLoneAtom(block) : 0)

  const below = (block: number, parent: number): Partial[] => {
    const { mass, atoms } = tree.blocks[block]
    let states: Partial[] = [{ closed: 0, mass, lone: atoms.length === 1, cost: 0, from: null }]
    for (const { to, edge } of around[block]) {
      if (to === parent) continue
      const children = below(to, block)
      const ends = children.map((child) => closing(to, child) + costs.ofEdge(edge))
      const next = new Map<number, Partial>()
      for (const above of states) {
        children.forEach((child, index) => {
          const closed = above.closed + child.closed
          if (closed >= beads) return
          const from = { above, below: child, cut: null }
          const cost = above.cost + child.cost
          keep(next, { closed, mass: above.mass + child.mass, lone: false, cost, from })
          if (closed + 1 >= beads) return
          const { mass: open, lone } = above
          const ended = above.cost + ends[index]
          keep(next, { closed: closed + 1, mass: open, lone, cost: ended, from: { ...from, cut: edge } })
        })
      }
      states = [...next.values()]
    }
    return states
  }

  const ended = below(0, -1)
    .filter(({ closed }) => closed === beads - 1)
    .map((state) => ({ ...state, cost: closing(0, state) }))
    .filter(({ cost }) => Number.isFinite(cost))
  if (ended.length === 0) return null
  const best = ended.reduce((first, state) => (comesFirst(state, first) ? state : first))
  return { edges: edgesOf(best), cost: best.cost }
}

/** Keeps the cheaper of two states. */
function keep(states: Map<number, Partial>, state: Partial): void {
  if (!Number.isFinite(state.cost)) return
  // Up to 2²⁶ thousandths of a g/mol; 200 of the heaviest atoms weigh less.
  const key = (2 * state.closed + Number(state.lone)) * 2 ** 26 + Math.round(1000 * state.mass)
  const known = states.get(key)
  if (!known || comesFirst(state, known)) states.set(key, state)
}

function comesFirst(a: Partial, b: Partial): boolean {
  if (Math.abs(a.cost - b.cost) > COST_TIE) return a.cost < b.cost
  const [edges, others] = [edgesOf(a), edgesOf(b)]
  const differ = edges.findIndex((edge, index) => edge !== others[index])
  return differ >= 0 && edges[differ] < others[differ]
}

/** The edges cut on the way to a state, ascending. */
function edgesOf(state: Partial): number[] {
  const edges: number[] = []
  const pending = [state]
  for (let next = pending.pop(); next; next = pending.pop()) {
    if (!next.from) continue
    if (next.from.cut !== null) edges.push(next.from.cut)
    pending.push(next.from.above, next.from.below)
  }
  return edges.sort((a, b) => a - b)
}
