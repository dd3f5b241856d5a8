import type { JointAxis } from './joint-surface'

/** Fewest expected counts of a coefficient that data speak for. */
const LEAST_SUPPORT = 1

/**
 * Keeps a surface from turning down beyond its data inside the fitted range, where only the smoothing speaks. Coefficients
 * that stand for less than one expected count and lie outside the supported stretch of their line (never those of a gap
 * within it, nor along a dihedral) are raised, from the data outwards, to at least the continuation of the two before them
 * with the least bend of the axis. Where the fit rises faster, it stays.
 *
 * @param axes both axes of the surface
 * @param coefficients kJ/mol, row-major
 * @param support expected counts of each coefficient
 * @returns new coefficients; those with support are unchanged
 */
export function holdUp(
  axes: readonly [JointAxis, JointAxis],
  coefficients: Float64Array,
  support: Float64Array,
): Float64Array {
  const ny = axes[1].size
  const supported = Array.from(support, (counts) => counts >= LEAST_SUPPORT)
  const distances = cityBlockDistances(axes, supported)
  const held = Float64Array.from(coefficients)
  const order = Array.from(held.keys()).filter((place) => distances[place] > 0)
  order.sort((one, other) => distances[one] - distances[other])
  for (const place of order) {
    const [ix, iy] = [Math.floor(place / ny), place % ny]
    const lines = [
      { axis: axes[0], index: ix, stride: ny, start: iy },
      { axis: axes[1], index: iy, stride: 1, start: ix * ny },
    ]
    for (const line of lines) {
      for (const inwards of [-1, 1] as const) {
        const next = continuation(line, inwards, held, distances, supported)
        if (next > held[place]) held[place] = next
      }
    }
  }
  return held

  /** The least a coefficient may be as seen from the two before it on one side; −∞ where that side says nothing. */
  function continuation(
    { axis, index, stride, start }: Line,
    inwards: -1 | 1,
    values: Float64Array,
    far: Int32Array,
    known: boolean[],
  ): number {
    const neighbour = index + inwards
    if (axis.periodic || neighbour < 0 || neighbour >= axis.size) return -Infinity
    const at = (k: number) => start + k * stride
    if (far[at(neighbour)] >= far[at(index)]) return -Infinity
    for (let k = index - inwards; k >= 0 && k < axis.size; k -= inwards) {
      if (known[at(k)]) return -Infinity
    }
    const second = neighbour + inwards
    const slope = second < 0 || second >= axis.size ? 0 : values[at(neighbour)] - values[at(second)]
    return values[at(neighbour)] + Math.max(slope, 0) + axis.leastBend
  }
}

interface Line {
  readonly axis: JointAxis
  readonly index: number
  readonly stride: number
  readonly start: number
}

/** Steps along the axes from each coefficient to the nearest supported one. */
function cityBlockDistances([x, y]: readonly [JointAxis, JointAxis], supported: boolean[]): Int32Array {
  const unknown = x.size + y.size
  const distances = new Int32Array(supported.length).fill(unknown)
  let front = Array.from(supported.keys()).filter((place) => supported[place])
  front.forEach((place) => (distances[place] = 0))
  for (let steps = 1; front.length > 0; steps++) {
    const next: number[] = []
    for (const place of front.flatMap((each) => neighbours([x, y], each))) {
      if (distances[place] !== unknown) continue
      distances[place] = steps
      next.push(place)
    }
    front = next
  }
  return distances
}

function neighbours([x, y]: readonly [JointAxis, JointAxis], place: number): number[] {
  const [ix, iy] = [Math.floor(place / y.size), place % y.size]
  const step = (axis: JointAxis, index: number, by: number) => {
    if (axis.periodic) return (index + by + axis.size) % axis.size
    return index + by >= 0 && index + by < axis.size ? index + by : null
  }
  return [-1, 1].flatMap((by) => {
    const [column, row] = [step(x, ix, by), step(y, iy, by)]
    return [...(column === null ? [] : [column * y.size + iy]), ...(row === null ? [] : [ix * y.size + row])]
  })
}
