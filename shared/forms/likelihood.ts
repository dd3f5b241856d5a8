import type { LikelihoodCells } from './likelihood-cells'

/** η = −U/kT of a form up to a constant, as a function of fit parameters β. */
export interface Shape {
  /** Length of β. */
  readonly size: number
  /** Fills η (one value for each point) and ∂η/∂β (point after point, `size` values each) at β. */
  readonly fill: (beta: Float64Array, eta: Float64Array, gradient: Float64Array) => void
}

/** A likelihood at one β, per sample, with what a scoring step needs; arrays are buffers that are written over. */
export interface LikelihoodPoint {
  readonly beta: Float64Array
  /** Σ share · ln π over the cells; −∞ where a filled cell has no probability. */
  value: number
  /** π of each cell, sum 1. */
  readonly probabilities: Float64Array
  readonly score: Float64Array
  /** Fisher information, row-major. */
  readonly information: Float64Array
}

/** Below this share of the largest density a cell's sum has lost its digits or vanished. */
const VANISHED = 1e-280
/** In kT: exp(−50) is below the rounding of the sums. */
const NEGLIGIBLE = 50

/**
 * Evaluates the multinomial likelihood of binned data under a form: π_c = ∫_c J exp(η) dq / Z. The returned function fills
 * the point's value, score and expected information at its β; all from one pass over the quadrature points.
 */
export function likelihoodOf(cells: LikelihoodCells, { size, fill }: Shape) {
  const { measures, shares, pointsPerCell } = cells
  const count = shares.length
  const eta = new Float64Array(measures.length)
  const gradient = new Float64Array(measures.length * size)
  const cellGradient = new Float64Array(count * size)
  const meanGradient = new Float64Array(size)
  const logs = new Float64Array(count)

  const newPoint = (beta: ArrayLike<number>): LikelihoodPoint => ({
    beta: Float64Array.from(beta),
    value: -Infinity,
    probabilities: new Float64Array(count),
    score: new Float64Array(size),
    information: new Float64Array(size * size),
  })

  /** ∫ exp(η − shift) of one cell, and the mean gradient in it. */
  const integrate = (cell: number, shift: number): number => {
    const start = cell * size
    let mass = 0
    cellGradient.fill(0, start, start + size)
    for (let p = cell * pointsPerCell; p < (cell + 1) * pointsPerCell; p++) {
      const density = measures[p] * Math.exp(eta[p] - shift)
      mass += density
      for (let j = 0; j < size; j++) cellGradient[start + j] += density * gradient[p * size + j]
    }
    if (mass > 0) for (let j = 0; j < size; j++) cellGradient[start + j] /= mass
    return mass
  }

  /** An empty cell so high up that it adds nothing to any sum. */
  const isEmpty = (cell: number, top: number): boolean => {
    for (let p = cell * pointsPerCell; p < (cell + 1) * pointsPerCell; p++) {
      if (eta[p] - top > -NEGLIGIBLE) return false
    }
    return true
  }

  const evaluate = (point: LikelihoodPoint): void => {
    fill(point.beta, eta, gradient)
    let top = -Infinity
    for (let p = 0; p < eta.length; p++) if (eta[p] > top) top = eta[p]
    let total = 0
    meanGradient.fill(0)
    for (let cell = 0; cell < count; cell++) {
      if (shares[cell] === 0 && isEmpty(cell, top)) {
        point.probabilities[cell] = 0
        continue
      }
      const mass = integrate(cell, top)
      point.probabilities[cell] = mass
      total += mass
      for (let j = 0; j < size; j++) meanGradient[j] += mass * cellGradient[cell * size + j]
      if (shares[cell] === 0) continue
      if (mass > VANISHED) logs[cell] = Math.log(mass)
      else {
        // Far out, where exp(η − top) underflows: the same sum about the cell's own top.
        const start = cell * pointsPerCell
        const ownTop = Math.max(...eta.subarray(start, start + pointsPerCell))
        logs[cell] = ownTop - top + Math.log(integrate(cell, ownTop))
      }
    }
    for (let j = 0; j < size; j++) meanGradient[j] /= total
    summarise(point, total)
  }

  const summarise = (point: LikelihoodPoint, total: number): void => {
    const { probabilities, score, information } = point
    const logTotal = Math.log(total)
    let value = 0
    score.fill(0)
    information.fill(0)
    for (let cell = 0; cell < count; cell++) {
      const start = cell * size
      const share = shares[cell]
      if (share === 0 && probabilities[cell] === 0) continue
      const probability = (probabilities[cell] /= total)
      if (share > 0) value += share * (logs[cell] - logTotal)
      for (let j = 0; j < size; j++) {
        const centred = cellGradient[start + j] - meanGradient[j]
        score[j] += share * centred
        const weighted = probability * centred
        for (let k = 0; k <= j; k++)
          information[j * size + k] += weighted * (cellGradient[start + k] - meanGradient[k])
      }
    }
    for (let j = 0; j < size; j++)
      for (let k = 0; k < j; k++) information[k * size + j] = information[j * size + k]
    point.value = Number.isNaN(value) ? -Infinity : value
  }

  return { newPoint, evaluate }
}
