export type Point = readonly [x: number, y: number]

/** A line of one contour; closed lines end where they began. */
export type ContourLine = readonly Point[]

/**
 * Contours of a function on a grid, by marching squares with linear interpolation. A saddle is parted by the mean of its
 * four corners. Infinite values count as above the level.
 *
 * @param xs ascending, length nx
 * @param ys ascending, length ny
 * @param values row-major, length nx · ny
 */
export function contourLines(
  xs: ArrayLike<number>,
  ys: ArrayLike<number>,
  values: ArrayLike<number>,
  level: number,
): ContourLine[] {
  return joined(segmentsOf(xs, ys, values, level))
}

type Segment = readonly [from: string, to: string]
interface Segments {
  readonly points: Map<string, Point>
  readonly list: Segment[]
}

/** Edges of a square, in order: bottom, right, top, left; the pairs that a line joins, by which corners lie below. */
const CROSSINGS: Readonly<Record<number, readonly (readonly [number, number])[]>> = {
  1: [[3, 0]],
  2: [[0, 1]],
  3: [[3, 1]],
  4: [[1, 2]],
  6: [[0, 2]],
  7: [[3, 2]],
  8: [[2, 3]],
  9: [[2, 0]],
  11: [[2, 1]],
  12: [[1, 3]],
  13: [[1, 0]],
  14: [[0, 3]],
}

function segmentsOf(
  xs: ArrayLike<number>,
  ys: ArrayLike<number>,
  values: ArrayLike<number>,
  level: number,
): Segments {
  const ny = ys.length
  const segments: Segments = { points: new Map(), list: [] }
  const at = (ix: number, iy: number) => Math.min(values[ix * ny + iy], Number.MAX_VALUE)
  for (let ix = 0; ix < xs.length - 1; ix += 1) {
    for (let iy = 0; iy < ny - 1; iy += 1) {
      const corners = [at(ix, iy), at(ix + 1, iy), at(ix + 1, iy + 1), at(ix, iy + 1)]
      const below = corners.reduce((code, value, i) => code + (value < level ? 1 << i : 0), 0)
      for (const [from, to] of crossingsOf(below, corners, level)) {
        segments.list.push([
          crossing(segments.points, xs, ys, ix, iy, from, corners, level),
          crossing(segments.points, xs, ys, ix, iy, to, corners, level),
        ])
      }
    }
  }
  return segments
}

function crossingsOf(below: number, corners: readonly number[], level: number) {
  if (below !== 5 && below !== 10) return CROSSINGS[below] ?? []
  const centreBelow = corners.reduce((sum, value) => sum + value / 4, 0) < level
  const apart = [
    [3, 0],
    [1, 2],
  ] as const
  const across = [
    [0, 1],
    [2, 3],
  ] as const
  return (below === 5) === centreBelow ? across : apart
}

/** The point where a contour crosses one edge of a square; kept under a name that both squares at that edge share. */
function crossing(
  points: Map<string, Point>,
  xs: ArrayLike<number>,
  ys: ArrayLike<number>,
  ix: number,
  iy: number,
  edge: number,
  corners: readonly number[],
  level: number,
): string {
  const a = corners[edge]
  const b = corners[(edge + 1) % 4]
  const share = (level - a) / (b - a)
  const horizontal = edge % 2 === 0
  const column = edge === 1 ? ix + 1 : ix
  const row = edge === 2 ? iy + 1 : iy
  const name = `${horizontal ? 'h' : 'v'}${column},${row}`
  if (!points.has(name)) {
    const along = edge < 2 ? share : 1 - share
    points.set(
      name,
      horizontal
        ? [xs[ix] + along * (xs[ix + 1] - xs[ix]), ys[row]]
        : [xs[column], ys[iy] + along * (ys[iy + 1] - ys[iy])],
    )
  }
  return name
}

/** Segments joined end to end. */
function joined({ points, list }: Segments): ContourLine[] {
  const at = new Map<string, Segment[]>()
  for (const segment of list) {
    for (const end of segment) at.set(end, [...(at.get(end) ?? []), segment])
  }
  const used = new Set<Segment>()
  const follow = (start: string): string[] => {
    const names = [start]
    for (;;) {
      const end = names[names.length - 1]
      const next = at.get(end)?.find((segment) => !used.has(segment))
      if (next === undefined) return names
      used.add(next)
      names.push(next[0] === end ? next[1] : next[0])
    }
  }
  const lines: ContourLine[] = []
  for (const segment of list) {
    if (used.has(segment)) continue
    used.add(segment)
    const forward = follow(segment[1])
    const backward = follow(segment[0])
    lines.push([...backward.toReversed(), ...forward].map((name) => points.get(name)!))
  }
  return lines
}
