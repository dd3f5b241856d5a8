/** Our default: a dihedral whose potential rises by less than this many kT may be dropped (common practice). */
export const FLAT_BELOW = 0.5

/** The amplitude must keep clear of the threshold by this many standard deviations of the band. */
export const FLAT_DEVIATIONS = 2

/** May a dihedral be dropped? 'undecided': the band leaves both open, or nobody said how many samples there are. */
export type FlatnessVerdict = 'flat' | 'keep' | 'undecided'

/** Why a verdict is 'undecided'. */
export type FlatnessDoubt = 'SAMPLE_SIZE_UNKNOWN' | 'BAND_TOO_WIDE'

/** Likelihood ratio of the histogram against a flat distribution. */
export interface FlatLikelihoodRatio {
  /** 2N Σ p ln(p/q), on the histogram's bins merged until each expects 5 independent samples. */
  readonly value: number
  /** Number of those bins less 1. */
  readonly freedom: number
  /** Probability that a flat dihedral reaches it (chi-square: Wilks, Ann. Math. Stat. 9 (1938) 60). */
  readonly pValue: number
}

/** How flat a dihedral is (methods §7). Energies in kT, divergences in nats. */
export interface DihedralFlatness {
  /** Largest less least U over the bins that hold data. */
  readonly amplitude: number
  /** Standard deviation of the amplitude from the band; null where unknown. */
  readonly amplitudeDeviation: number | null
  /**
   * Least and largest amplitude within two deviations of the band, all around the turn: what nobody visited counts with what the
   * curve says of it; null without a sample size. The verdict rests on it.
   */
  readonly amplitudeRange: readonly [low: number, high: number] | null
  /** Divergence of the smooth curve from the flat distribution. */
  readonly divergence: number
  /** The same of the histogram as it is. */
  readonly divergenceBinned: number
  /** What a flat dihedral of as many samples shows of `divergenceBinned` by chance; null without a sample size. */
  readonly divergenceByChance: number | null
  /** Null without a sample size, or with fewer than 10 independent samples. */
  readonly likelihoodRatio: FlatLikelihoodRatio | null
  readonly independentSamples: number | null
  /** Threshold the verdict was reached at, in kT. */
  readonly flatBelow: number
  readonly verdict: FlatnessVerdict
  readonly doubt: FlatnessDoubt | null
}
