import { GAUSS_LEGENDRE } from '../numeric'

const TURN = 2 * Math.PI
/** Panels of half a degree, each with five points: exact to rounding for anything that a histogram could show. */
const PANELS = 720

/**
 * Kullback–Leibler divergence Σ p ln(p/q) of binned probabilities from the flat distribution over a turn, q the share of the
 * turn in each bin (Kullback & Leibler, Ann. Math. Stat. 22 (1951) 79). Empty bins add nothing, and nor does what the bins leave
 * out of the turn.
 *
 * @param weights counts or masses, any factor, with a positive sum; length n
 * @param edges rad, within one turn; length n + 1
 * @returns nats, at least 0 up to rounding
 * @example binnedFlatDivergence(Float64Array.of(1, 0), Float64Array.of(-Math.PI, 0, Math.PI)) // ln 2
 */
export function binnedFlatDivergence(weights: Float64Array, edges: Float64Array): number {
  const total = weights.reduce((sum, weight) => sum + weight, 0)
  return weights.reduce((sum, weight, bin) => {
    if (weight === 0) return sum
    const share = weight / total
    return sum + share * Math.log((share * TURN) / (edges[bin + 1] - edges[bin]))
  }, 0)
}

/**
 * What a flat distribution shows of the binned divergence by chance, to first order (Miller 1955; Wilks, Ann. Math. Stat. 9
 * (1938) 60).
 *
 * @param bins K that fill the turn
 * @param independentSamples N > 0
 * @returns (K − 1)/(2N) nats
 */
export function flatDivergenceByChance(bins: number, independentSamples: number): number {
  return (bins - 1) / (2 * independentSamples)
}

/**
 * Kullback–Leibler divergence of p ∝ exp(−u) from the flat distribution over a turn, by quadrature: −⟨u⟩ − ln ⟨exp(−u)⟩ with
 * the second mean over the flat distribution.
 *
 * @param energy u(φ) in kT, φ in rad, any constant
 * @returns nats
 * @example curveFlatDivergence(() => 3) // 0
 */
export function curveFlatDivergence(energy: (angle: number) => number): number {
  const half = Math.PI / PANELS
  const values: { readonly u: number; readonly share: number }[] = []
  for (let panel = 0; panel < PANELS; panel++) {
    const middle = -Math.PI + (2 * panel + 1) * half
    for (const { node, weight } of GAUSS_LEGENDRE) {
      values.push({ u: energy(middle + node * half), share: weight / (2 * PANELS) })
    }
  }
  // Least energy 0: nothing overflows, and a flat curve gives 0 without cancellation.
  const least = values.reduce((lowest, { u }) => Math.min(lowest, u), Infinity)
  let [norm, mean] = [0, 0]
  for (const { u, share } of values) {
    const mass = share * Math.exp(least - u)
    norm += mass
    mean += mass * (u - least)
  }
  return -mean / norm - Math.log(norm)
}
