import { InvalidInputError } from '../errors'
import { type BandedFactor, factorBanded } from '../numeric'
import type { CoefficientHold } from './penalised-system'
import type { TensorAxis } from './tensor-axis'
import type { PerAxis } from './tensor-penalty'
import { tensorGram } from './tensor-products'

/**
 * Share of its diagonal that a pivot keeps at least. Far from all data only the weaker penalty determines the coefficients,
 * beside the stronger one: few digits are left of such a pivot, and no more are needed, since nothing is read off there and
 * Newton's method goes by the gradient.
 */
const LEAST_PIVOT = 1e-15
/**
 * Where even that is lost, as around a cell that outweighs all others, the diagonal is strengthened by the first of these shares
 * that helps: steps along the lost directions then come out shorter, and Newton's method takes more of them.
 */
const DAMPINGS = [0, 1e-13, 1e-11, 1e-9]

/** The matrix H = B′WB + λx Dx′Dx ⊗ I + λy I ⊗ Dy′Dy + hold of a tensor basis as a band. */
export interface TensorSystem {
  readonly x: TensorAxis
  readonly y: TensorAxis
  readonly hold: CoefficientHold
  readonly size: number
  readonly halfBandwidth: number
  /** Place of each coefficient in the band. */
  readonly places: Int32Array
  /**
   * Where a product of coefficients (i, a)·(i + d, a + e), laid out as `tensorGram`, stands in the band; and where its twin
   * (i, a + e)·(i + d, a) stands, −1 where both are one.
   */
  readonly slots: Int32Array
  readonly twins: Int32Array
}

/** Lays out the band once; weights and λ come later. */
export function tensorSystem(x: TensorAxis, y: TensorAxis, hold: CoefficientHold): TensorSystem {
  const [nx, ny] = [x.basis.size, y.basis.size]
  const halfBandwidth = x.reach * ny + y.reach
  const stride = halfBandwidth + 1
  const beyond = (axis: TensorAxis, index: number) => !axis.basis.periodic && index >= axis.basis.size
  const slot = (ix: number, iy: number, jx: number, jy: number) => {
    // Products past the end of an axis are 0, and so are the weights of what is read there: any place will do.
    if (beyond(x, jx) || beyond(y, jy) || beyond(y, iy)) return 0
    const one = x.places[ix % nx] * ny + y.places[iy % ny]
    const other = x.places[jx % nx] * ny + y.places[jy % ny]
    return Math.max(one, other) * stride + Math.abs(one - other)
  }
  const slots = new Int32Array(nx * ny * 16)
  const twins = new Int32Array(nx * ny * 16).fill(-1)
  for (let index = 0; index < slots.length; index++) {
    const [e, a] = [index % 4, Math.floor(index / 4) % ny]
    const [d, i] = [Math.floor(index / (4 * ny)) % 4, Math.floor(index / (16 * ny))]
    slots[index] = slot(i, a, i + d, a + e)
    if (d > 0 && e > 0) twins[index] = slot(i, a + e, i + d, a)
  }
  const places = Int32Array.from(
    { length: nx * ny },
    (_, index) => x.places[Math.floor(index / ny)] * ny + y.places[index % ny],
  )
  return { x, y, hold, size: nx * ny, halfBandwidth, places, slots, twins }
}

/**
 * Factors H.
 *
 * @param weights W, one per cell
 * @param lambdas on the coefficients
 * @throws {InvalidInputError} SINGULAR_SYSTEM when the weights do not determine the coefficients
 */
export function factorTensor(
  system: TensorSystem,
  weights: Float64Array,
  lambdas: PerAxis<number>,
): BandedFactor {
  const { x, y, hold, size, halfBandwidth, slots, twins } = system
  const products = tensorGram(x.basis, y.basis, weights)
  addPenalty(system, products, lambdas, hold.strength)
  for (const damping of DAMPINGS) {
    const matrix = new Float64Array(size * (halfBandwidth + 1))
    for (let index = 0; index < products.length; index++) {
      matrix[slots[index]] += products[index]
      if (twins[index] >= 0) matrix[twins[index]] += products[index]
    }
    for (let row = 0; row < size; row++) matrix[row * (halfBandwidth + 1)] *= 1 + damping
    const factor = factorBanded(matrix, size, halfBandwidth, LEAST_PIVOT)
    if (factor !== null) return factor
  }
  throw new InvalidInputError('SINGULAR_SYSTEM', 'The counts do not determine a smooth surface.')
}

function addPenalty(
  { x, y }: TensorSystem,
  products: Float64Array,
  lambdas: PerAxis<number>,
  hold: number,
): void {
  const [nx, ny] = [x.basis.size, y.basis.size]
  for (let i = 0; i < nx; i++) {
    for (let a = 0; a < ny; a++) {
      for (let distance = 0; distance < 4; distance++) {
        products[((i * 4 + distance) * ny + a) * 4] += lambdas[0] * x.penalty[i * 4 + distance]
        products[(i * 4 * ny + a) * 4 + distance] += lambdas[1] * y.penalty[a * 4 + distance]
      }
      products[(i * 4 * ny + a) * 4] += hold
    }
  }
}

/**
 * The entries of a symmetric matrix that meet in a cell, added up to the layout of `tensorGram`: (i, a)·(i + d, a + e), its
 * twin, and both again for the other triangle.
 *
 * @param band lower band of the matrix
 */
export function tensorSums({ slots, twins, y }: TensorSystem, band: Float64Array): Float64Array {
  const ny = y.basis.size
  const sums = new Float64Array(slots.length)
  for (let index = 0; index < slots.length; index++) {
    const sum = band[slots[index]] + (twins[index] >= 0 ? band[twins[index]] : 0)
    const diagonal = index % 4 === 0 && Math.floor(index / (4 * ny)) % 4 === 0
    sums[index] = diagonal ? sum : 2 * sum
  }
  return sums
}

/** tr(Z S_m) for the penalty S_m of each axis, with the entries of Z as `tensorSums` gives them. */
export function penaltyTraces({ x, y }: TensorSystem, sums: Float64Array): [number, number] {
  const [nx, ny] = [x.basis.size, y.basis.size]
  const traces: [number, number] = [0, 0]
  for (let i = 0; i < nx; i++) {
    for (let a = 0; a < ny; a++) {
      for (let distance = 0; distance < 4; distance++) {
        traces[0] += x.penalty[i * 4 + distance] * sums[((i * 4 + distance) * ny + a) * 4]
        traces[1] += y.penalty[a * 4 + distance] * sums[(i * 4 * ny + a) * 4 + distance]
      }
    }
  }
  return traces
}
