import type { CoordinateKind } from '../units'
import type { FormName, ParameterDimension } from './form'
import type { LikelihoodCells } from './likelihood-cells'
import type { Maximum } from './maximise-likelihood'

/** A name of a parameter in a formula, with its unit. */
export interface ParameterName {
  readonly name: string
  readonly dimension: ParameterDimension
}

/** A form where its likelihood is largest, in the parameters of its formula; internal units. */
export interface FormSolution {
  readonly values: readonly number[]
  /** Covariance of the values for one sample, row-major. */
  readonly covariance: Float64Array
  readonly atBound: readonly boolean[]
  readonly maximum: Maximum
}

/** How many terms a form may have, and how a search for their number ends. */
export interface TermLimits {
  readonly least: number
  readonly most: number
  /** The search ends after so many numbers in a row that do not lower AIC; null tries them all. */
  readonly patience: number | null
}

/** An analytic form: what it is called, how it is written, evaluated and fitted. */
export interface FormDefinition {
  readonly form: FormName
  readonly kinds: readonly CoordinateKind[]
  /** Limits of the number of terms; null where the form has none. */
  readonly terms: TermLimits | null
  /** The formula in full; `terms` is 0 for a form without a number of terms. */
  readonly formula: (kind: CoordinateKind, terms: number) => string
  readonly parameters: (kind: CoordinateKind, terms: number) => readonly ParameterName[]
  /** How many of the parameters are free. */
  readonly freeParameters: (terms: number) => number
  /** The formula, evaluated: U in kJ/mol up to a constant at a coordinate in nm or rad; finite everywhere in the domain. */
  readonly energy: (values: readonly number[], coordinate: number, kT: number) => number
  /**
   * Fits the form.
   *
   * @param smaller the solution with one term less, where it was found
   * @throws {RefusedForm}
   */
  readonly fit: (cells: LikelihoodCells, terms: number, smaller: FormSolution | null) => FormSolution
}

/** r, θ or φ. */
export const COORDINATE_SYMBOLS: Record<CoordinateKind, string> = { bond: 'r', angle: 'θ', dihedral: 'φ' }

/** A parameter's name and the powers of its unit. */
export function parameterName(name: string, energy: 0 | 1, coordinate: number): ParameterName {
  return { name, dimension: { energy, coordinate } }
}
