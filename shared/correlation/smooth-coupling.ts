import type { BasinAxis } from './basin-axis'

/** Bandwidths that are tried, in spreads of each coordinate; besides, no coupling at all. */
const BANDWIDTHS = [1, 0.7, 0.5, 0.35, 0.25, 0.18, 0.12]

/** Samples added to what was seen and to what independence expects: without data the coupling is 0. */
const PRIOR = 1

/** A smooth ln[p₁₂/(p₁p₂)] on the grid of two axes, row-major, in kT. */
export interface SmoothCoupling {
  readonly values: Float64Array
  /** Standard deviation of each value; 0 where samples speak for no coupling at all. */
  readonly deviations: Float64Array
  /** In spreads of each coordinate; null for no coupling at all. */
  readonly bandwidth: number | null
}

/**
 * Smooths the coupling of two coordinates: ln of the samples seen under a normal kernel over the samples that independence
 * expects there, both with one more. Of a few bandwidths and of no coupling that one is taken under which each sample is
 * likeliest from all the others (leave-one-out likelihood: Stone, J. R. Stat. Soc. B 36 (1974) 111; Duin, IEEE Trans. Comput.
 * 25 (1976) 1175). Both smoothings blur alike, so that independent coordinates give 0 but for noise.
 *
 * @param counts independent samples in each cell, row-major
 */
export function smoothCoupling(counts: Float64Array, x: BasinAxis, y: BasinAxis): SmoothCoupling {
  const none = {
    values: new Float64Array(counts.length),
    deviations: new Float64Array(counts.length),
    bandwidth: null,
  }
  let best: SmoothCoupling = none
  let highest = 0
  for (const bandwidth of BANDWIDTHS) {
    const { gain, coupling } = tried(counts, x, y, bandwidth)
    if (gain > highest) [highest, best] = [gain, coupling]
  }
  return best
}

/** The coupling under a bandwidth, and the leave-one-out log-likelihood it gains over none. */
function tried(
  counts: Float64Array,
  x: BasinAxis,
  y: BasinAxis,
  bandwidth: number,
): { gain: number; coupling: SmoothCoupling } {
  const [kx, ky] = [kernel(x, bandwidth), kernel(y, bandwidth)]
  const seen = smoothed(counts, kx, ky)
  const squares = smoothed(
    counts,
    kx.map((value) => value * value),
    ky.map((value) => value * value),
  )
  const [alongX, alongY] = [line(x.counts, kx), line(y.counts, ky)]
  const total = x.counts.reduce((sum, count) => sum + count, 0)
  const values = new Float64Array(counts.length)
  const deviations = new Float64Array(counts.length)
  let gain = 0
  for (let cell = 0; cell < counts.length; cell++) {
    const [ofX, ofY] = [alongX[Math.floor(cell / y.count)], alongY[cell % y.count]]
    values[cell] = Math.log((seen[cell] + PRIOR) / ((ofX * ofY) / total + PRIOR))
    deviations[cell] = Math.sqrt(squares[cell] + PRIOR) / (seen[cell] + PRIOR)
    if (counts[cell] === 0) continue
    // A kernel is 1 at its own place: without one sample there, each sum is one less.
    const left = Math.max(0, seen[cell] - 1)
    const expected = (Math.max(0, ofX - 1) * Math.max(0, ofY - 1)) / Math.max(1, total - 1)
    gain += counts[cell] * Math.log((left + PRIOR) / (expected + PRIOR))
  }
  return { gain, coupling: { values, deviations, bandwidth } }
}

/** Normal kernel between the cells of an axis, 1 at its own place; around the turn of a dihedral. */
function kernel({ midpoints, count, periodic, spread }: BasinAxis, bandwidth: number): Float64Array {
  const width = bandwidth * spread
  return Float64Array.from({ length: count * count }, (_, pair) => {
    const apart = Math.abs(midpoints[Math.floor(pair / count)] - midpoints[pair % count])
    const distance = periodic ? Math.min(apart, 2 * Math.PI - apart) : apart
    return Math.exp(-((distance / width) ** 2) / 2)
  })
}

function line(counts: Float64Array, weights: Float64Array): Float64Array {
  const count = counts.length
  return counts.map((_, cell) => {
    let sum = 0
    for (let other = 0; other < count; other++) sum += weights[cell * count + other] * counts[other]
    return sum
  })
}

/** Kx N Ky of a grid, one axis after the other. */
function smoothed(counts: Float64Array, kx: Float64Array, ky: Float64Array): Float64Array {
  const ny = Math.sqrt(ky.length)
  const nx = counts.length / ny
  const rows = new Float64Array(counts.length)
  const result = new Float64Array(counts.length)
  for (let ix = 0; ix < nx; ix++) {
    for (let other = 0; other < ny; other++) {
      const count = counts[ix * ny + other]
      if (count === 0) continue
      for (let iy = 0; iy < ny; iy++) rows[ix * ny + iy] += ky[other * ny + iy] * count
    }
  }
  for (let ix = 0; ix < nx; ix++) {
    for (let other = 0; other < nx; other++) {
      const weight = kx[ix * nx + other]
      for (let iy = 0; iy < ny; iy++) result[ix * ny + iy] += weight * rows[other * ny + iy]
    }
  }
  return result
}
