/** A coarser grid of one coordinate: groups of neighbouring bins. */
export interface MergedBins {
  /** Group of each bin; −1 for empty bins below the first and above the last that hold something. */
  readonly groups: Int32Array
  /** Edges of the groups, length count + 1. */
  readonly edges: Float64Array
  readonly count: number
}

/** Halvings of the interval in which the share of a group is sought. */
const HALVINGS = 40

/**
 * Merges neighbouring bins into at most `count` groups of about equal mass. A bin heavier than its share stays alone, so
 * that only thin parts are merged. The groups depend on this marginal alone, which keeps a null distribution with fixed
 * margins exact on the merged grid.
 *
 * @param masses not negative, with a positive sum; length n
 * @param edges length n + 1
 * @param count at least 1
 * @example mergeBins(Float64Array.of(1, 1, 2, 0), Float64Array.of(0, 1, 2, 3, 4), 2).edges // 0, 2, 3
 */
export function mergeBins(masses: Float64Array, edges: Float64Array, count: number): MergedBins {
  return grouped(masses, edges, (remaining, group) =>
    group < count - 1 ? remaining / (count - group) : Infinity,
  )
}

/**
 * Merges no more than it takes to come down to `most` groups: a group is closed once it holds a share of the mass, and the
 * share is the smallest that leaves at most `most` groups. Bins few enough stay as they are, thin or not; empty ones join the
 * filled one before. Depends on this marginal alone, as `mergeBins`.
 *
 * @param masses not negative, with a positive sum; length n
 * @param edges length n + 1
 * @param most at least 1
 * @example mergeThinBins(Float64Array.of(1, 1, 2, 9, 0), Float64Array.of(0, 1, 2, 3, 4, 5), 3).edges // 0, 2, 3, 4
 */
export function mergeThinBins(masses: Float64Array, edges: Float64Array, most: number): MergedBins {
  const withShare = (share: number) => grouped(masses, edges, () => share)
  const unmerged = withShare(0)
  if (unmerged.count <= most) return unmerged
  let low = 0
  let high = 2 * masses.reduce((sum, mass) => sum + mass, 0)
  let found = withShare(high)
  for (let halving = 0; halving < HALVINGS; halving++) {
    const share = (low + high) / 2
    const tried = withShare(share)
    if (tried.count <= most) [found, high] = [tried, share]
    else low = share
  }
  return found
}

/** `shareOf`: mass that closes a group, from the mass of this and all later groups and the number of the group. */
function grouped(
  masses: Float64Array,
  edges: Float64Array,
  shareOf: (remaining: number, group: number) => number,
): MergedBins {
  const first = masses.findIndex((mass) => mass > 0)
  const last = masses.findLastIndex((mass) => mass > 0)
  const groups = new Int32Array(masses.length).fill(-1)
  const groupEdges = [edges[first]]
  let remaining = masses.reduce((sum, mass) => sum + mass, 0)
  let group = 0
  let held = 0
  for (let bin = first; bin <= last; bin++) {
    // Close the group where stopping short of its share misses it by less than going beyond it.
    if (held > 0 && masses[bin] > 0 && held + masses[bin] / 2 > shareOf(remaining + held, group)) {
      groupEdges.push(edges[bin])
      group++
      held = 0
    }
    groups[bin] = group
    held += masses[bin]
    remaining -= masses[bin]
  }
  groupEdges.push(edges[last + 1])
  return { groups, edges: Float64Array.from(groupEdges), count: group + 1 }
}

/** Sums the cells of a row-major grid over the groups of both coordinates. */
export function mergeCells(cells: Float64Array, x: MergedBins, y: MergedBins): Float64Array {
  const ny = y.groups.length
  const merged = new Float64Array(x.count * y.count)
  cells.forEach((mass, cell) => {
    if (mass > 0) merged[x.groups[Math.floor(cell / ny)] * y.count + y.groups[cell % ny]] += mass
  })
  return merged
}
