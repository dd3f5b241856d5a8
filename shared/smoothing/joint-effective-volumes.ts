import { GAUSS_LEGENDRE } from '../numeric'
import { LARGEST_CORRECTION } from './effective-volumes'
import type { TensorAxis } from './tensor-axis'
import { tensorValues } from './tensor-products'

const POINTS = GAUSS_LEGENDRE.length

/**
 * Prepares the logarithms of effective volumes ∫∫_cell J exp(η(q) − η(m)) dq about the midpoint m of each cell, by
 * Gauss–Legendre with five by five points: the two-dimensional form of `logEffectiveVolumes`, with η from its own spline.
 *
 * @returns function from coefficients to ln of the effective volumes, one per cell
 */
export function jointLogEffectiveVolumes(
  x: TensorAxis,
  y: TensorAxis,
): (coefficients: Float64Array) => Float64Array {
  const exact = jointLogVolumes(x, y)
  const [xShares, yShares] = [nodeShares(x), nodeShares(y)]
  const ny = y.basis.bins
  const middle = POINTS >> 1
  return (coefficients) => {
    const eta = tensorValues(x.nodes, y.nodes, coefficients)
    const at = (column: number, row: number) => column * ny * POINTS + row
    return exact.map((volume, cell) => {
      const [column, row] = [Math.floor(cell / ny) * POINTS, (cell % ny) * POINTS]
      const centre = eta[at(column + middle, row + middle)]
      let sum = 0
      for (let i = column; i < column + POINTS; i++) {
        for (let j = row; j < row + POINTS; j++) {
          // Beyond the largest correction the result is cut off anyway; the bound keeps exp from overflowing.
          const change = Math.min(eta[at(i, j)] - centre, 4 * LARGEST_CORRECTION)
          sum += xShares[i] * yShares[j] * Math.exp(change)
        }
      }
      const effective = Math.log(sum)
      return Math.min(Math.max(effective, volume - LARGEST_CORRECTION), volume + LARGEST_CORRECTION)
    })
  }
}

/** ln(V_i · V_j) of the exact volumes of each cell. */
export function jointLogVolumes({ geometry: x }: TensorAxis, { geometry: y }: TensorAxis): Float64Array {
  const ny = y.volumes.length
  return Float64Array.from(
    { length: x.volumes.length * ny },
    (_, cell) => Math.log(x.volumes[Math.floor(cell / ny)]) + Math.log(y.volumes[cell % ny]),
  )
}

/** Weight of each quadrature point, the Jacobian included. */
function nodeShares({ geometry: { edges, midpoints, jacobian } }: TensorAxis): Float64Array {
  const shares = new Float64Array(midpoints.length * POINTS)
  midpoints.forEach((midpoint, bin) => {
    const half = (edges[bin + 1] - edges[bin]) / 2
    GAUSS_LEGENDRE.forEach(({ node, weight }, point) => {
      shares[bin * POINTS + point] = weight * half * jacobian(midpoint + node * half)
    })
  })
  return shares
}
