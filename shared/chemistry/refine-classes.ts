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
export function refineClasses(
  labels: readonly string[],
  edges: readonly { readonly from: number; readonly to: number; readonly label?: string }[],
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

function numbered(keys: readonly string[]): number[] {
  const numbers = new Map<string, number>()
  return keys.map((key) => {
    const known = numbers.get(key)
    if (known !== undefined) return known
    numbers.set(key, numbers.size)
    return numbers.size - 1
  })
}
