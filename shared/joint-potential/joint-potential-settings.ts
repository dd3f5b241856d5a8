import type { SmoothingCriterion } from '../inversion'

/** How both λ of a joint potential come about; a joint histogram is never inverted without smoothing. */
export type JointSmoothingSettings =
  | { readonly mode: 'auto'; readonly criterion: SmoothingCriterion }
  /** log₁₀ λ along the first and the second coordinate, within `SETTING_LIMITS.log10Lambda`. */
  | { readonly mode: 'manual'; readonly log10Lambdas: readonly [number, number] }

/** Everything a user may choose about a joint potential. */
export interface JointPotentialSettings {
  readonly version: 1
  /** Divide by the exact volume of each cell; off divides by its area only. */
  readonly jacobian: boolean
  readonly smoothing: JointSmoothingSettings
}

/** What a joint potential starts from unless the user says otherwise. */
export const DEFAULT_JOINT_SETTINGS: JointPotentialSettings = {
  version: 1,
  jacobian: true,
  smoothing: { mode: 'auto', criterion: 'likelihood' },
}
