import { svgNumber } from '../picture'

/** A place in a drawing, or a coordinate with its value. */
export type FigurePoint = readonly [x: number, y: number]

/** What of a line is drawn, and where. */
export interface LineOptions {
  /** The line ends where it rises above this value. */
  readonly limit?: number
  /** Only stretches of coordinates for which this holds; the first and the last reach the next point. */
  readonly shown?: (x: number) => boolean
  readonly place?: (point: FigurePoint) => FigurePoint
}

/** A line through points as the path of an SVG, cut where it leaves the limit. */
export function curveLine(points: readonly FigurePoint[], options: LineOptions = {}): string {
  const { limit = Infinity, shown = () => true, place = (point) => point } = options
  let path = ''
  let open = false
  for (let index = 1; index < points.length; index++) {
    const [from, to] = [points[index - 1], points[index]]
    const drawn = shown((from[0] + to[0]) / 2) && Math.min(from[1], to[1]) < limit
    if (!drawn) {
      open = false
      continue
    }
    const [start, end] = [cut(from, to, limit), cut(to, from, limit)]
    if (!open || start !== from) path += `M${written(place(start))}`
    path += `L${written(place(end))}`
    open = end === to
  }
  return path
}

/** The value between two places of a line. */
export function interpolated(xs: readonly number[], ys: readonly number[], x: number): number {
  const next = xs.findIndex((each) => each >= x)
  if (next <= 0) return next === 0 ? ys[0] : ys[ys.length - 1]
  const share = (x - xs[next - 1]) / (xs[next] - xs[next - 1])
  return ys[next - 1] * (1 - share) + ys[next] * share
}

/** The point itself, or where the line towards the other one comes back under the limit. */
function cut(point: FigurePoint, other: FigurePoint, limit: number): FigurePoint {
  if (point[1] <= limit) return point
  const share = (limit - other[1]) / (point[1] - other[1])
  return [other[0] + share * (point[0] - other[0]), limit]
}

const written = ([x, y]: FigurePoint): string => `${svgNumber(x)} ${svgNumber(y)}`
