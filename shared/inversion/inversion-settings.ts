/** How λ is chosen: by marginal likelihood (Fellner–Schall update) or by Akaike's criterion. */
export type SmoothingCriterion = 'likelihood' | 'aic'

export type SmoothingSettings =
  | { readonly mode: 'auto'; readonly criterion: SmoothingCriterion }
  | { readonly mode: 'off' }
  | { readonly mode: 'manual'; readonly log10Lambda: number }

/** Extent of the table, internal units; null takes the default of the kind (`tableDomain`). */
export interface TableSettings {
  /** Number of rows, both ends included. */
  readonly rows: number
  readonly low: number | null
  readonly high: number | null
  /** Highest energy in kJ/mol, or null for none. */
  readonly cap: number | null
}

/** What an angle does at 180°: whatever the data say, or its slope vanishes there, as that of a form in cos θ does. */
export type StraightAngle = 'free' | 'level'

/** How a bond or an angle goes on where its data end. */
export interface TailSettings {
  /** Least curvature of the quadratic tails as a multiple of kT/σ², the stiffness of a spring with the spread of the data. */
  readonly stiffness: number
}

/** Everything a user may choose about an inversion; stored with each result. */
export interface InversionSettings {
  readonly version: 1
  /** Divide by the exact volume of each bin; off divides by its width only. */
  readonly jacobian: boolean
  readonly smoothing: SmoothingSettings
  /** Statistical inefficiency g ≥ 1 that counts are divided by; null takes what the distribution says. */
  readonly inefficiency: number | null
  readonly straightAngle: StraightAngle
  readonly tails: TailSettings
  /** Name of the analytic form the table is written from; null writes the smoothed curve itself. */
  readonly form: string | null
  readonly table: TableSettings
}

/** What an inversion starts from unless the user says otherwise. */
export const DEFAULT_INVERSION_SETTINGS: InversionSettings = {
  version: 1,
  jacobian: true,
  smoothing: { mode: 'auto', criterion: 'likelihood' },
  inefficiency: null,
  straightAngle: 'free',
  tails: { stiffness: 0.5 },
  form: null,
  table: { rows: 1000, low: null, high: null, cap: null },
}

/**
 * Limits that forms, contracts and the core all read. λ reaches as far as an automatic choice does on 5,000 bins and a billion
 * counts, so that every choice can be repeated by hand.
 */
export const SETTING_LIMITS = {
  log10Lambda: { low: -6, high: 30 },
  inefficiency: { low: 1, high: 1e6 },
  tailStiffness: { low: 0.05, high: 20 },
  rows: { low: 2, high: 100_000 },
} as const
