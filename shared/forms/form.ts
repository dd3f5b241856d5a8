import type { CoordinateKind } from '../units'

/** Names of the analytic forms. Stable: files, the command line and stored choices use them. */
export type FormName =
  | 'harmonic'
  | 'quartic'
  | 'morse'
  | 'cosine-harmonic'
  | 'cosine-series'
  | 'cosine-series-phases'
  | 'cosine-powers'
  | 'gaussians'

/** The unit of a parameter as powers of the energy and of the coordinate: kJ/mol/nm² is { energy: 1, coordinate: −2 }. */
export interface ParameterDimension {
  readonly energy: 0 | 1
  readonly coordinate: number
}

/** A parameter of a fitted form; internal units (nm, rad, kJ/mol). */
export interface FormParameter {
  /** As it stands in the formula, such as k, r0, θ0, k1, δ1, C0, w1. */
  readonly name: string
  readonly value: number
  /**
   * From the Fisher information by the delta method, as if the form were true; null when the number of independent samples
   * is unknown, and at a bound.
   */
  readonly standardError: number | null
  readonly dimension: ParameterDimension
  /** The likelihood pushes it out of its domain: it was held at the end of it (θ0 at 0° or 180°). */
  readonly atBound: boolean
}

/** Pearson's chi-square over neighbouring bins merged until each expects at least 5 effective counts. */
export interface FormGoodness {
  readonly chiSquare: number
  /** Merged bins, less one, less the free parameters; at least 1. */
  readonly freedom: number
}

/** Where a form and a smooth potential differ most, among the bins that hold the data. */
export interface LargestDeviation {
  /** |ΔU| in kT. */
  readonly value: number
  /** nm or rad */
  readonly coordinate: number
}

/** One number of terms that was tried for a form with an open number of terms. */
export interface TriedTerms {
  readonly terms: number
  /** null when that number was refused. */
  readonly aic: number | null
}

/** A form fitted to a histogram; plain data in internal units. */
export interface FormFit {
  readonly outcome: 'fitted'
  readonly form: FormName
  readonly kind: CoordinateKind
  /** K */
  readonly temperature: number
  /** Cosines or Gaussians; null for a form without a number of terms. */
  readonly terms: number | null
  /** In full, with every ½ written out, in the names of `parameters`; the constant of U is free. */
  readonly formula: string
  readonly parameters: readonly FormParameter[]
  /** Covariance of the parameters, row-major; null when the number of independent samples is unknown. */
  readonly covariance: Float64Array | null
  /** What AIC counts: parameters that do not follow from the others, one held at a bound included. */
  readonly freeParameters: number
  /** Σ n ln π over effective counts, without the multinomial constant; null when their number is unknown. */
  readonly logLikelihood: number | null
  /** 2 × free parameters − 2 × log-likelihood; null when the number of independent samples is unknown. */
  readonly aic: number | null
  /** null when the number of independent samples is unknown or too few bins are filled. */
  readonly goodness: FormGoodness | null
  /** Against the reference potential; null when there is none. */
  readonly largestDeviation: LargestDeviation | null
  readonly independentSamples: number | null
  /** Numbers of terms that were compared; empty when the number was given or the form has none. */
  readonly tried: readonly TriedTerms[]
  /** Outer edges of the first and the last bin that holds data, nm or rad. */
  readonly populated: readonly [low: number, high: number]
  /** Variance of the coordinate in the data, nm² or rad². */
  readonly variance: number
}

/** Why a form does not fit. Stable codes. */
export type FormRefusalCode =
  /** The best curve does not rise outwards: k or k4 not above 0. */
  | 'UNBOUNDED'
  /** The lowest point of the best curve lies outside the domain of the coordinate. */
  | 'OUTSIDE_DOMAIN'
  /** The form goes over into a simpler one: two Gaussians coincide, Morse becomes harmonic. */
  | 'DEGENERATE'
  | 'NOT_CONVERGED'
  /** Not more filled bins than parameters. */
  | 'TOO_FEW_BINS'
  /** A number of terms can be chosen by AIC only where the number of independent samples is known. */
  | 'SAMPLE_SIZE_UNKNOWN'

/** A form that was tried and does not fit, with its reason. */
export interface FormRefusal {
  readonly outcome: 'refused'
  readonly form: FormName
  readonly kind: CoordinateKind
  readonly terms: number | null
  readonly code: FormRefusalCode
  /** For a person. */
  readonly message: string
}
