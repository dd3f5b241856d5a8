import type { Inversion } from './inversion'
import type { PreparedBins } from './prepared-bins'
import type { FittedCurve } from './smooth-curve'
import { openBarriers, turnBarriers } from './unsampled-barriers'
import type { Warning } from './warning'
import { placeWords } from './warning-words'

/** Bins with fewer expected counts do not speak about the fit. */
const LEAST_EXPECTED = 5
/** Pearson's χ² this many of its own deviations above its mean is no accident. */
const MISFIT_DEVIATIONS = 6
/** Smaller misses in the energy do not matter even where they are significant, in kT. */
const MISFIT_ENERGY = 0.1

/** Doubts about the curve: bridged gaps, barriers without samples, a curve that misses the data. */
export function curveWarnings(
  inversion: Omit<Inversion, 'warnings'>,
  bins: PreparedBins,
  fitted: FittedCurve,
  kT: number,
): Warning[] {
  return [
    ...bridgedGaps(inversion, bins, fitted),
    ...unsampledBarriers(inversion, bins, fitted),
    ...missedData(bins, fitted, kT),
  ]
}

function bridgedGaps(
  { kind }: Omit<Inversion, 'warnings'>,
  { counts, filled: [first, last] }: PreparedBins,
  { density }: FittedCurve,
): Warning[] {
  if (density !== null) return []
  const inside = kind === 'dihedral' ? counts : counts.subarray(first, last + 1)
  const empty = inside.reduce((sum, count) => sum + (count > 0 ? 0 : 1), 0)
  if (empty === 0) return []
  return [
    {
      code: 'GAPS_BRIDGED',
      message: `Without smoothing, ${empty} empty ${empty === 1 ? 'bin' : 'bins'} between filled ones got a straight line; a barrier there would be higher.`,
      action: 'Smooth the curve, or merge bins until none between filled ones is empty.',
    },
  ]
}

function unsampledBarriers(
  { kind }: Omit<Inversion, 'warnings'>,
  bins: PreparedBins,
  { density }: FittedCurve,
): Warning[] {
  if (density === null) return []
  const { edges } = bins
  const barriers = kind === 'dihedral' ? turnBarriers(bins) : openBarriers(bins)
  if (barriers.length === 0) return []
  const [[from, to]] = barriers
  return [
    {
      code: 'BARRIER_UNSAMPLED',
      message: `No sample was seen between ${placeWords(kind, edges[from])} and ${placeWords(kind, edges[to])}, with populations on both sides: the height of the barrier there is what the smoothing makes of empty bins, and too few crossings may have been seen to weigh one side against the other.`,
      action: 'Sample the barrier, with longer, hotter or biased runs, before its height is trusted.',
    },
  ]
}

function missedData({ counts }: PreparedBins, { range, density }: FittedCurve, kT: number): Warning[] {
  if (density === null) return []
  let squares = 0
  let used = 0
  let worst = 0
  density.means.forEach((mean, bin) => {
    if (mean < LEAST_EXPECTED) return
    const count = counts[range[0] + bin]
    squares += (count - mean) ** 2 / mean
    used += 1
    if (count > 0) worst = Math.max(worst, Math.abs(Math.log(count / mean)))
  })
  const freedom = used - density.effectiveDimension
  if (
    freedom < 1 ||
    (squares - freedom) / Math.sqrt(2 * freedom) < MISFIT_DEVIATIONS ||
    worst < MISFIT_ENERGY
  ) {
    return []
  }
  return [
    {
      code: 'CURVE_MISSES_DATA',
      message: `The curve misses the histogram by more than noise: by up to ${(worst * kT).toFixed(2)} kJ/mol (${worst.toFixed(2)} kT) where the data live.`,
      action: 'Choose a smaller λ, or state how many independent samples the counts stand for.',
    },
  ]
}
