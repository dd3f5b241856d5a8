/**
 * Classes of the vertices of a graph that its structure cannot tell apart: colour refinement (1-dimensional
 * Weisfeiler–Leman). Vertices start with a label; in each pass a vertex is told apart by its class and the classes and edge
 * labels around it, until nothing changes. Vertices that a symmetry of the graph exchanges always share a class.
 *
 * @param labels label of each vertex
 * @param edges undirected; `label` tells kinds of edges apart
 * @returns one class number per vertex, from 0, in the order of first appearance
 * @example refineClasses(['C', 'C', 'C'], [{ from: 0, to: 1 }, { from: 1, to: 2 }]) // [0, 1, 0]
 */
export function refineClasses(labels: readonly string[], edges: readonly LabelledEdge[]): number[] {
  return refined(labels, edges, firstSeen)
}

/**
 * The same classes, numbered by rank: vertices of two graphs that are the same graph get the same numbers, however either is
 * numbered.
 *
 * @returns one class number per vertex, from 0
 */
export function rankClasses(labels: readonly string[], edges: readonly LabelledEdge[]): number[] {
  return refined(labels, edges, ranked)
}

/** An undirected edge; `label` tells kinds of edges apart. */
export interface LabelledEdge {
  readonly from: number
  readonly to: number
  readonly label?: string
}

function refined(
  labels: readonly string[],
  edges: readonly LabelledEdge[],
  numbered: (keys: readonly string[]) => number[],
): number[] {
  const around: { to: number; label: string }[][] = labels.map(() => [])
  for (const { from, to, label = '' } of edges) {
    around[from].push({ to, label })
    around[to].push({ to: from, label })
  }
  let classes = numbered(labels)
  for (;;) {
    const before = classes
    const signatures = before.map((own, vertex) => {
      const seen = around[vertex].map(({ to, label }) => `${label}:${before[to]}`).sort()
      return `${own}|${seen.join(',')}`
    })
    classes = numbered(signatures)
    if (Math.max(-1, ...classes) === Math.max(-1, ...before)) return classes
  }
}

function firstSeen(keys: readonly string[]): number[] {
  const numbers = new Map<string, number>()
  for (const key of keys) if (!numbers.has(key)) numbers.set(key, numbers.size)
  return keys.map((key) => numbers.get(key) as number)
}

function ranked(keys: readonly string[]): number[] {
  const numbers = new Map([...new Set(keys)].sort().map((key, rank) => [key, rank]))
  return keys.map((key) => numbers.get(key) as number)
}
