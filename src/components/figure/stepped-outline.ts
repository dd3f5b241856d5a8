export type Point = readonly [number, number]

/**
 * The outline of a histogram as points in data coordinates: from the base line up over every bin and down again, without
 * a closing line along the base.
 *
 * @param edges ascending, length n + 1
 * @param heights length n
 */
export function steppedOutline(edges: ArrayLike<number>, heights: ArrayLike<number>): Point[] {
  const points: Point[] = [[edges[0], 0]]
  for (let bin = 0; bin < heights.length; bin += 1) {
    points.push([edges[bin], heights[bin]], [edges[bin + 1], heights[bin]])
  }
  points.push([edges[heights.length], 0])
  return points
}
