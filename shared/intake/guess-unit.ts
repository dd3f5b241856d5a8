import type { CoordinateKind } from '../histogram/histogram'
import type { CoordinateUnit } from '../units'

/** A guess and, for the user, what it rests on. */
export interface UnitGuess {
  readonly unit: CoordinateUnit
  readonly reason: string
}

/** Bonds between beads are longer than this in ångström and shorter in nanometre. */
const LONGEST_IN_NM = 1.2

/**
 * Guesses the unit of a coordinate from the name of its column, or else from the size of its values.
 *
 * @param values of the coordinate; NaN where a field holds no number
 * @param weights how much each value counts, or null for all alike
 * @param name of the column, or null
 */
export function guessUnit(
  kind: CoordinateKind,
  values: Float64Array,
  weights: Float64Array | null,
  name: string | null,
): UnitGuess {
  const named = name === null ? null : unitOfName(kind, name)
  if (named !== null) return { unit: named, reason: `The column is called “${name}”.` }
  return kind === 'bond' ? lengthFromMean(values, weights) : angleFromRange(kind, values)
}

function unitOfName(kind: CoordinateKind, name: string): CoordinateUnit | null {
  if (kind === 'bond') {
    if (/Å|Å|ang|[([_]a[)\]]?$/i.test(name)) return 'angstrom'
    return /(?:^|[^a-z])nm(?:[^a-z]|$)/i.test(name) ? 'nm' : null
  }
  if (/deg|°/i.test(name)) return 'degree'
  return /(?:^|[^a-z])rad/i.test(name) ? 'radian' : null
}

function lengthFromMean(values: Float64Array, weights: Float64Array | null): UnitGuess {
  let sum = 0
  let total = 0
  values.forEach((value, row) => {
    const weight = weights === null ? 1 : weights[row]
    if (!(weight > 0) || !Number.isFinite(value)) return
    sum += weight * value
    total += weight
  })
  const mean = sum / total
  const shown = Number(mean.toPrecision(3))
  if (mean > LONGEST_IN_NM)
    return { unit: 'angstrom', reason: `A mean of ${shown} would be a long bond in nm: Å.` }
  return { unit: 'nm', reason: `A mean of ${shown} is a bond length in nm.` }
}

function angleFromRange(kind: CoordinateKind, values: Float64Array): UnitGuess {
  // A little beyond π or 2π, for printed digits.
  const limit = kind === 'angle' ? 3.15 : 6.3
  const largest = values.reduce((most, value) => Math.max(most, Math.abs(value) || 0), 0)
  const shown = Number(largest.toPrecision(4))
  if (largest > limit) return { unit: 'degree', reason: `Values reach ${shown}: degrees.` }
  return { unit: 'radian', reason: `No value is beyond ${shown}: radians.` }
}
