import type { SmoothingBasis } from './smoothing-basis'
import type { TensorAxis } from './tensor-axis'

/** What is said once per axis, the first coordinate first. */
export type PerAxis<Value> = readonly [x: Value, y: Value]

/** Roughness along one axis of a grid of coefficients and its gradient. */
export interface AxisRoughness {
  /** |Dβ|², summed over all lines along the axis. */
  readonly roughness: number
  /** D′Dβ */
  readonly stiffness: Float64Array
}

/**
 * Third differences along one axis of a grid of coefficients.
 *
 * @param stride distance in memory of neighbours along the axis
 * @param lines how many lines run along it
 * @param lineStride distance in memory of neighbouring lines
 */
export function axisRoughness(
  { size, penaltyStarts, penaltyValues }: SmoothingBasis,
  coefficients: Float64Array,
  stride: number,
  lines: number,
  lineStride: number,
): AxisRoughness {
  const stiffness = new Float64Array(coefficients.length)
  let roughness = 0
  for (let row = 0; row < penaltyStarts.length; row++) {
    for (let line = 0; line < lines; line++) {
      // D′(Dβ) in two steps, not (D′D)β: the polynomial part cancels in the first and takes its rounding with it.
      let difference = 0
      for (let k = 0; k < 4; k++) {
        const place = ((penaltyStarts[row] + k) % size) * stride + line * lineStride
        difference += penaltyValues[row * 4 + k] * coefficients[place]
      }
      roughness += difference * difference
      for (let k = 0; k < 4; k++) {
        const place = ((penaltyStarts[row] + k) % size) * stride + line * lineStride
        stiffness[place] += penaltyValues[row * 4 + k] * difference
      }
    }
  }
  return { roughness, stiffness }
}

/**
 * How many of the parameters that the penalty λx Dx′Dx ⊗ I + λy I ⊗ Dy′Dy sees each axis answers for: λ_m tr(S⁻ S_m) with
 * S⁻ the pseudo-inverse of the whole, from the eigenvalues of both axes.
 *
 * @param weights λ on the coefficients, both above 0
 */
export function penaltyRanks(x: TensorAxis, y: TensorAxis, weights: PerAxis<number>): [number, number] {
  const ranks: [number, number] = [0, 0]
  for (const one of x.eigenvalues) {
    for (const other of y.eigenvalues) {
      const [alongX, alongY] = [weights[0] * one, weights[1] * other]
      if (alongX + alongY === 0) continue
      ranks[0] += alongX / (alongX + alongY)
      ranks[1] += alongY / (alongX + alongY)
    }
  }
  return ranks
}
