/** An even grid: centre k stands at start + k · width. */
export interface UniformGrid {
  readonly start: number
  readonly width: number
  /** Place of each given centre on the grid, ascending from 0. */
  readonly places: Int32Array
  /** Number of bins from the first to the last centre, those without a row included. */
  readonly size: number
}

/** Printed digits may move a centre by this share of the bin width and the grid still counts as even. */
const TOLERANCE = 0.1

/**
 * The even grid on which bin centres lie, some of them possibly left out; null when they lie on none. The width comes
 * from a least-squares line through all centres, so the rounding of printed digits averages out of it.
 *
 * @param centres ascending, at least two
 * @example fitUniformGrid(Float64Array.of(1, 2, 4))?.size // 4
 */
export function fitUniformGrid(centres: Float64Array): UniformGrid | null {
  const steps = new Float64Array(centres.length - 1)
  for (let i = 0; i < steps.length; i++) steps[i] = centres[i + 1] - centres[i]
  const ascending = Float64Array.from(steps).sort()
  const typical = ascending[(ascending.length - 1) >> 1]
  // Where most rows are left out the typical step spans several bins, and only the least one is a single bin.
  return fitWithStep(centres, steps, typical) ?? fitWithStep(centres, steps, ascending[0])
}

function fitWithStep(centres: Float64Array, steps: Float64Array, step: number): UniformGrid | null {
  const n = centres.length
  const places = new Int32Array(n)
  for (let i = 1; i < n; i++) {
    const bins = Math.round(steps[i - 1] / step)
    if (bins < 1) return null
    places[i] = places[i - 1] + bins
  }
  const meanPlace = places.reduce((sum, place) => sum + place, 0) / n
  const meanCentre = centres.reduce((sum, centre) => sum + centre, 0) / n
  let products = 0
  let squares = 0
  for (let i = 0; i < n; i++) {
    products += (places[i] - meanPlace) * (centres[i] - meanCentre)
    squares += (places[i] - meanPlace) ** 2
  }
  const width = products / squares
  const start = meanCentre - width * meanPlace
  for (let i = 0; i < n; i++) {
    if (Math.abs(start + places[i] * width - centres[i]) > TOLERANCE * width) return null
  }
  return { start, width, places, size: places[n - 1] + 1 }
}
